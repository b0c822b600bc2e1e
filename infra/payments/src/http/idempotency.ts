import { createHash } from 'node:crypto';
import type { Desk } from '../core/desk.js';
import { ApiError } from '../core/errors.js';

/** Published-values, section j: keys up to 255 characters, kept at least 24 hours. */
const KEY_LENGTH_MAX = 255;
const KEPT_MS = 24 * 3600 * 1000;

export interface Answer {
  status: number;
  body: string;
}

export interface RememberedAnswer extends Answer {
  requestId: string;
}

export interface KeyedRequest {
  account: string;
  key: string;
  route: string;
  /** The request's parameters as sent. */
  body: string;
}

/** Repeats the first answer for a key, and refuses a key that comes back with something else. */
export class Idempotency {
  readonly #inProgress = new Map<string, string>();

  constructor(private readonly desk: Desk) {}

  /**
   * Looks a request up and marks its key as being worked on.
   * @throws ApiError 400 for a key used with another request, 409 while the first is still being answered.
   */
  begin(request: KeyedRequest): RememberedAnswer | undefined {
    if (request.key.length > KEY_LENGTH_MAX) {
      throw new ApiError(400, 'invalid_request_error', `Idempotency keys take up to ${KEY_LENGTH_MAX} characters.`);
    }
    const hash = hashOf(request);
    const slot = slotOf(request);
    const current = this.#inProgress.get(slot);
    if (current !== undefined) {
      if (current !== hash) throw otherRequest(request.key);
      throw new ApiError(409, 'idempotency_error', 'Another request with this idempotency key is still in progress.', {
        code: 'idempotency_key_in_use',
      });
    }
    const row = this.desk.store
      .sql(
        'SELECT request_hash, status, body, request_id FROM answers WHERE account = ? AND key = ? AND created_ms > ?',
      )
      .get(request.account, request.key, this.desk.clock.nowMs() - KEPT_MS) as
      | { request_hash: string; status: number; body: string; request_id: string }
      | undefined;
    if (row) {
      if (row.request_hash !== hash) throw otherRequest(request.key);
      return { status: row.status, body: row.body, requestId: row.request_id };
    }
    this.#inProgress.set(slot, hash);
    return undefined;
  }

  /** Keeps an answer; belongs into the transaction that did the work. */
  remember(request: KeyedRequest, answer: Answer, requestId: string): void {
    this.desk.store
      .sql(
        `INSERT OR REPLACE INTO answers (account, key, request_hash, route, status, body, request_id, created_ms)
         VALUES (?, ?, ?, ?, ?, ?, ?, ?)`,
      )
      .run(
        request.account,
        request.key,
        hashOf(request),
        request.route,
        answer.status,
        answer.body,
        requestId,
        this.desk.clock.nowMs(),
      );
  }

  end(request: KeyedRequest): void {
    this.#inProgress.delete(slotOf(request));
  }
}

function slotOf(request: KeyedRequest): string {
  return `${request.account} ${request.key}`;
}

/** Parameters in any order are the same request. */
function hashOf(request: KeyedRequest): string {
  const parameters = [...new URLSearchParams(request.body)].map(([name, value]) => `${name}=${value}`).sort();
  return createHash('sha256')
    .update(JSON.stringify([request.route, parameters]))
    .digest('hex');
}

function otherRequest(key: string): ApiError {
  return new ApiError(
    400,
    'idempotency_error',
    `The idempotency key '${key}' was first used with another request. A key stands for one request only.`,
  );
}
