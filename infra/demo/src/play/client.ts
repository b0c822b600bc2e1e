/** Speaks to the server as a browser does: typed by the contracts, with the cookies of the person. */
import { randomUUID } from 'node:crypto';
import {
  type BodyInput,
  fillPath,
  IDEMPOTENCY_HEADER,
  needsIdempotencyKey,
  type ParamsInput,
  type QueryInput,
  type ResponseOf,
  type RouteContract,
  routes,
} from '@skyberth/shared';

/** Everybody in the scenario has the same one; it stands on the first page of `npm start`. */
export const PASSWORD = 'calm water at the quay';

/** A person with a browser of their own. */
export interface Actor {
  readonly name: string;
  readonly email: string;
  readonly cookies: Map<string, string>;
}

export const actor = (name: string, email: string): Actor => ({ name, email, cookies: new Map() });

type Part<Name extends string, T> = undefined extends T ? { readonly [K in Name]?: T } : { readonly [K in Name]: T };
export type CallInput<C extends RouteContract> = Part<'params', ParamsInput<C>> &
  Part<'query', QueryInput<C>> &
  Part<'body', BodyInput<C>>;

interface Loose {
  readonly params?: Record<string, string>;
  readonly query?: Record<string, unknown>;
  readonly body?: unknown;
}

/** A refusal, with its code, so that the play can go on where one is expected. */
export class Refused extends Error {
  constructor(
    readonly code: string,
    detail: string,
  ) {
    super(detail);
  }
}

export type Call = <C extends RouteContract>(
  who: Actor | null,
  route: C,
  input: CallInput<C>,
) => Promise<ResponseOf<C>>;

/** Makes the function that calls the server at `url`; a session that has run out is renewed first. Throws `Refused`. */
export function clientOf(url: string): Call {
  return async (who, route, input) => {
    let response = await send(url, who, route, input as Loose);
    if (response.status === 401 && who && route.access !== 'public') {
      await signInAgain(url, who);
      response = await send(url, who, route, input as Loose);
    }
    return (await answerOf(response, route)) as never;
  };
}

async function send(
  url: string,
  who: Actor | null,
  route: RouteContract,
  { params, query = {}, body }: Loose,
): Promise<Response> {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) if (value !== undefined) search.set(name, String(value));
  const headers: Record<string, string> = {};
  if (body !== undefined) headers['Content-Type'] = route.consumes ?? 'application/json';
  if (needsIdempotencyKey(route)) headers[IDEMPOTENCY_HEADER] = randomUUID();
  if (who) headers['Cookie'] = [...who.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
  const response = await fetch(`${url}${fillPath(route.path, params)}${search.size > 0 ? `?${search}` : ''}`, {
    method: route.method,
    headers,
    ...(body === undefined ? {} : { body: route.consumes ? (body as Uint8Array<ArrayBuffer>) : JSON.stringify(body) }),
  });
  for (const line of response.headers.getSetCookie()) {
    const pair = line.split(';')[0] ?? '';
    who?.cookies.set(pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1));
  }
  return response;
}

async function signInAgain(url: string, who: Actor): Promise<void> {
  who.cookies.clear();
  await answerOf(
    await send(url, who, routes.signIn, { body: { email: who.email, password: PASSWORD } }),
    routes.signIn,
  );
}

async function answerOf(response: Response, route: RouteContract): Promise<unknown> {
  if (response.ok && route.produces !== undefined) return response.text();
  const answer: unknown = await response.json();
  if (response.ok) return answer;
  const problem = answer as { code: string; detail: string; errors?: unknown };
  throw new Refused(problem.code, `${route.name}: ${problem.detail} ${JSON.stringify(problem.errors ?? '')}`);
}
