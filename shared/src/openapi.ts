/** OpenAPI 3.1 made from the route contracts; nothing is described twice. */
import { z } from 'zod';
import { API_KEY_PREFIX, scopeOf } from './contracts/api-keys.js';
import { ERROR_CODES, PROBLEM_MEDIA_TYPE, Problem } from './errors.js';
import { IDEMPOTENCY_HEADER, needsIdempotencyKey, type RouteContract } from './route.js';

type Json = Record<string, unknown>;

const schemaOf = (schema: z.ZodType, io: 'input' | 'output'): Json => {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' }) as Json;
  return rest;
};

function parametersOf(route: RouteContract): Json[] {
  const list: Json[] = [];
  for (const [place, object] of [
    ['path', route.params],
    ['query', route.query],
  ] as const) {
    if (!object) continue;
    const schema = schemaOf(object, 'input') as { properties?: Json; required?: string[] };
    for (const [name, property] of Object.entries(schema.properties ?? {})) {
      list.push({
        name,
        in: place,
        required: place === 'path' || (schema.required ?? []).includes(name),
        schema: property,
      });
    }
  }
  if (needsIdempotencyKey(route)) {
    list.push({
      name: IDEMPOTENCY_HEADER,
      in: 'header',
      required: true,
      schema: { type: 'string', minLength: 8, maxLength: 255 },
    });
  }
  return list;
}

function answersOf(route: RouteContract): Json {
  const answers: Json = {};
  const media = route.produces ?? 'application/json';
  const schema = route.response ? schemaOf(route.response, 'output') : {};
  answers[String(route.status ?? 200)] = { description: 'Done', content: { [media]: { schema } } };
  const codes = new Set(route.errors ?? []);
  if (route.params || route.query || route.body) codes.add('bad-input');
  if (route.access !== 'public') codes.add('not-signed-in').add('not-allowed');
  if (needsIdempotencyKey(route)) codes.add('key-missing').add('key-reused');
  for (const code of codes) {
    const { status, title } = ERROR_CODES[code];
    const present = answers[String(status)] as { description: string } | undefined;
    const description = `${title} (${code})`;
    answers[String(status)] = {
      description: present ? `${present.description}; ${description}` : description,
      content: { [PROBLEM_MEDIA_TYPE]: { schema: { $ref: '#/components/schemas/Problem' } } },
    };
  }
  return answers;
}

/** Without anything, by a session, or also by an API key with the scope of that name. */
function securityOf(route: RouteContract): Json[] {
  if (route.access === 'public') return [];
  const scope = scopeOf(route);
  return [{ session: [] }, ...(scope === null ? [] : [{ key: [scope] }])];
}

/** The whole document. `version` is the application's. */
export function openApiDocument(routes: Readonly<Record<string, RouteContract>>, version: string): Json {
  const paths: Record<string, Json> = {};
  for (const route of Object.values(routes)) {
    const path = route.path.replace(/:([A-Za-z]+)/g, '{$1}');
    const operation: Json = {
      operationId: route.name,
      summary: route.summary,
      tags: [route.tag],
      'x-access': route.access,
      'x-data': route.data,
      parameters: parametersOf(route),
      responses: answersOf(route),
      security: securityOf(route),
    };
    if (route.body) {
      operation['requestBody'] = {
        required: true,
        content: { [route.consumes ?? 'application/json']: { schema: schemaOf(route.body, 'input') } },
      };
    }
    paths[path] = { ...paths[path], [route.method.toLowerCase()]: operation };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Skyberth',
      version,
      description: 'Contact time on ground-station antennas: find, hold, pay, fly, settle.',
    },
    paths,
    components: {
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'skyberth_access' },
        key: { type: 'http', scheme: 'bearer', description: `An API key; it begins with ${API_KEY_PREFIX}.` },
      },
      schemas: { Problem: schemaOf(Problem, 'output') },
    },
  };
}
