/** API keys: how a program acts for an organisation, and no further than its scopes. */
import { z } from 'zod';
import { type Permission } from '../permissions.js';
import { Done, Id, IdParams, Name, UtcTime } from '../primitives.js';
import { defineRoute, type RouteContract } from '../route.js';

/** The permissions that a key may be given; every other act needs a person with a session. */
export const API_KEY_SCOPES = [
  'bookings.read',
  'bookings.report',
  'run-sheet.read',
  'market.search',
  'messages.read',
  'messages.write',
] as const satisfies readonly Permission[];
export const ApiKeyScope = z.enum(API_KEY_SCOPES);
export type ApiKeyScope = z.infer<typeof ApiKeyScope>;

/** How every key begins. */
export const API_KEY_PREFIX = 'sky_';
/** Living keys that an organisation may have at a time. */
export const MOST_API_KEYS = 20;

/** The scope that opens the route to a key, or null where no key is taken. */
export function scopeOf({ access, inPerson }: RouteContract): ApiKeyScope | null {
  return inPerson ? null : (API_KEY_SCOPES.find((scope) => scope === access) ?? null);
}

export const ApiKeyState = z.enum(['in force', 'ended', 'revoked', 'maker left']);
export type ApiKeyState = z.infer<typeof ApiKeyState>;

export const ApiKey = z.object({
  id: Id,
  name: z.string(),
  tail: z.string().describe('the last four characters of the key, to tell keys apart'),
  scopes: z.array(ApiKeyScope),
  state: ApiKeyState,
  madeByName: z.string().describe('the key acts in this person’s name'),
  createdUtc: UtcTime,
  endsUtc: UtcTime.nullable(),
  lastUsedUtc: UtcTime.nullable().describe('to the minute'),
  revokedUtc: UtcTime.nullable(),
});
export type ApiKey = z.infer<typeof ApiKey>;

const tag = 'api keys';
export const apiKeyRoutes = {
  listApiKeys: defineRoute({
    name: 'listApiKeys',
    method: 'GET',
    path: '/api/keys',
    summary: 'The API keys of the organisation, the newest first; the keys themselves are not shown again',
    tag,
    access: 'api-keys.make',
    data: 'own',
    response: z.object({ items: z.array(ApiKey) }),
  }),
  /** Takes no idempotency key: the remembered answer would keep the secret in clear. */
  makeApiKey: defineRoute({
    name: 'makeApiKey',
    method: 'POST',
    path: '/api/keys',
    summary: 'Make an API key; it is shown in this answer alone',
    tag,
    access: 'api-keys.make',
    data: 'own',
    body: z.object({
      name: Name,
      scopes: z
        .array(ApiKeyScope)
        .min(1, 'Choose what the key may do.')
        .max(API_KEY_SCOPES.length)
        .transform((scopes) => API_KEY_SCOPES.filter((scope) => scopes.includes(scope))),
      endsUtc: UtcTime.nullable().default(null),
    }),
    response: z.object({ apiKey: ApiKey, secret: z.string().describe('sent as Authorization: Bearer') }),
    status: 201,
    idempotencyKey: 'none',
    errors: ['bad-input', 'wrong-state'],
  }),
  revokeApiKey: defineRoute({
    name: 'revokeApiKey',
    method: 'POST',
    path: '/api/keys/:id/revoke',
    summary: 'End an API key at once and for good',
    tag,
    access: 'api-keys.revoke',
    data: 'own',
    params: IdParams,
    response: Done,
    errors: ['not-found', 'wrong-state'],
  }),
} as const;
