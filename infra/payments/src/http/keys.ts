import { timingSafeEqual } from 'node:crypto';
import { ApiError } from '../core/errors.js';
import type { Settings } from '../core/settings.js';

function same(left: string, right: string): boolean {
  const [a, b] = [Buffer.from(left), Buffer.from(right)];
  return a.length === b.length && timingSafeEqual(a, b);
}

/**
 * Which of the two keys a request shows, as a bearer token or as the user name of Basic authentication.
 * @throws ApiError 401 without a key or with a wrong one.
 */
export function keyOf(header: string | undefined, settings: Settings): 'secret' | 'publishable' {
  const key = readKey(header);
  if (key === undefined) {
    throw new ApiError(
      401,
      'invalid_request_error',
      'You did not provide an API key. Send it as "Authorization: Bearer <key>".',
    );
  }
  if (same(key, settings.secretKey)) return 'secret';
  if (same(key, settings.publishableKey)) return 'publishable';
  throw new ApiError(401, 'invalid_request_error', `Invalid API Key provided: ${key.slice(0, 8)}****`);
}

function readKey(header: string | undefined): string | undefined {
  const [scheme, value] = (header ?? '').split(' ', 2);
  if (!value) return undefined;
  if (scheme?.toLowerCase() === 'bearer') return value;
  if (scheme?.toLowerCase() === 'basic') return Buffer.from(value, 'base64').toString('utf8').split(':', 1)[0];
  return undefined;
}

export function needsSecretKey(): ApiError {
  return new ApiError(403, 'invalid_request_error', 'This call needs the secret key; a publishable key was sent.', {
    code: 'secret_key_required',
  });
}
