/** The second factor of a person: time-based codes (RFC 6238) that acts with money ask for. */
import { z } from 'zod';
import { Done, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

/** Six digits, as authenticator programs show them. */
export const Code = z
  .string()
  .transform((text) => text.replace(/\s/g, ''))
  .pipe(z.string().regex(/^\d{6}$/, 'Give the six digits that your authenticator shows.'));

const tag = 'accounts';
export const secondFactorRoutes = {
  secondFactor: defineRoute({
    name: 'secondFactor',
    method: 'GET',
    path: '/api/security/second-factor',
    summary: 'Whether the caller has a second factor',
    tag,
    access: 'signed-in',
    data: 'self',
    response: z.object({ sinceUtc: UtcTime.nullable() }),
  }),
  beginSecondFactor: defineRoute({
    name: 'beginSecondFactor',
    method: 'POST',
    path: '/api/security/second-factor/begin',
    summary: 'Make a new secret for an authenticator; it counts once a code has confirmed it',
    tag,
    access: 'signed-in',
    data: 'self',
    body: z.object({ password: z.string().min(1, 'Give your password.').max(200) }),
    response: z.object({ secret: z.string(), uri: z.string() }),
    idempotencyKey: 'none',
    errors: ['wrong-state', 'bad-input', 'too-many'],
  }),
  confirmSecondFactor: defineRoute({
    name: 'confirmSecondFactor',
    method: 'POST',
    path: '/api/security/second-factor/confirm',
    summary: 'Confirm the new secret with its first code',
    tag,
    access: 'signed-in',
    data: 'self',
    body: z.object({ code: Code }),
    response: Done,
    idempotencyKey: 'none',
    errors: ['wrong-state', 'bad-input', 'too-many'],
  }),
} as const;
