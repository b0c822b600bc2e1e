/**
 * Stable error codes, their HTTP status and their title. A refusal travels as an RFC 9457 problem detail:
 * `detail` says what happened, to what, and what to do; `errors` points at fields.
 */
import { z } from 'zod';

export const ERROR_CODES = {
  'bad-input': { status: 400, title: 'Something in the request cannot be used' },
  'bad-signature': { status: 400, title: 'The signature does not match' },
  'not-signed-in': { status: 401, title: 'Sign in first' },
  'wrong-credentials': { status: 401, title: 'E-mail and password do not match' },
  'api-key-refused': { status: 401, title: 'The API key opens nothing' },
  'session-ended': { status: 401, title: 'The session has ended' },
  'card-declined': { status: 402, title: 'The card was declined' },
  'not-allowed': { status: 403, title: 'Your role does not allow this' },
  'cross-site': { status: 403, title: 'The request came from another site' },
  'not-found': { status: 404, title: 'Not found' },
  'already-exists': { status: 409, title: 'It exists already' },
  'changed-meanwhile': { status: 409, title: 'Someone changed it meanwhile' },
  'berth-taken': { status: 409, title: 'That time has just been taken' },
  'spacecraft-busy': { status: 409, title: 'The spacecraft has a contact at that time' },
  'hold-ended': { status: 409, title: 'The hold has ended' },
  'dish-not-clear': { status: 409, title: 'Somebody is at the dish, or it is to stay still' },
  'wrong-state': { status: 409, title: 'Not possible in this state' },
  'price-changed': { status: 409, title: 'The price has changed' },
  'key-reused': { status: 409, title: 'The idempotency key was used for something else' },
  'in-progress': { status: 409, title: 'The same request is still being carried out' },
  'too-large': { status: 413, title: 'Too large' },
  'file-refused': { status: 422, title: 'This kind of file is not taken' },
  'group-refused': { status: 409, title: 'Not all of the group can be had' },
  'over-limit': { status: 409, title: 'The monthly account does not bear it' },
  'not-cleared': { status: 422, title: 'No clearance to transmit is in force' },
  'not-for-sale': { status: 422, title: 'That time is not for sale' },
  'elements-unusable': { status: 422, title: 'The orbital elements cannot be used' },
  'elements-too-old': { status: 422, title: 'The orbital elements are too old' },
  'key-missing': { status: 428, title: 'An idempotency key is needed' },
  'too-many': { status: 429, title: 'Too many requests' },
  internal: { status: 500, title: 'Something went wrong on our side' },
  'payment-unavailable': { status: 503, title: 'The payment service does not answer' },
  unavailable: { status: 503, title: 'Not available just now' },
} as const;

export type ErrorCode = keyof typeof ERROR_CODES;
export const ErrorCode = z.enum(Object.keys(ERROR_CODES) as [ErrorCode, ...ErrorCode[]]);

export const FieldError = z.object({
  pointer: z.string().describe('JSON pointer to the field, such as /radios/0/frequencyMhz'),
  detail: z.string(),
});
export type FieldError = z.infer<typeof FieldError>;

/** RFC 9457, with our `code` and, where fields are at fault, `errors`. */
export const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  instance: z.string().optional(),
  code: ErrorCode,
  errors: z.array(FieldError).optional(),
});
export type Problem = z.infer<typeof Problem>;
export const PROBLEM_MEDIA_TYPE = 'application/problem+json';
