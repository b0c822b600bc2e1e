import { setTimeout as sleep } from 'node:timers/promises';
import type { Request, Response } from 'express';
import qs from 'qs';
import type { Desk } from '../core/desk.js';
import { ApiError } from '../core/errors.js';
import { newId } from '../core/ids.js';
import { Input } from '../core/input.js';
import { API_VERSION } from '../core/kinds.js';
import { PLATFORM } from '../core/store.js';
import { runDueTimers } from '../core/timers.js';
import type { Call, Operation } from './call.js';
import { expandAll } from './expand.js';
import type { Fault, Faults } from './faults.js';
import { type Answer, Idempotency, type KeyedRequest } from './idempotency.js';
import { keyOf, needsSecretKey } from './keys.js';
import type { Match, Router } from './router.js';

/** What is known about a request before anything is done for it. */
interface Asked {
  requestId: string;
  account: string;
  publishable: boolean;
  match: Match;
  keyed: KeyedRequest | undefined;
  body: string;
  baseUrl: string;
}

interface Outcome {
  answer: Answer;
  delayMs: number;
}

/** Turns HTTP requests into operations and their results into answers: keys, idempotency, expansion, faults. */
export class Api {
  readonly #idempotency: Idempotency;

  constructor(
    private readonly desk: Desk,
    private readonly router: Router,
    private readonly faults: Faults,
    private readonly onChange: () => void,
  ) {
    this.#idempotency = new Idempotency(desk);
  }

  handle = async (request: Request, response: Response): Promise<void> => {
    const requestId = newId('req');
    response.set({ 'request-id': requestId, 'stripe-version': API_VERSION, 'cache-control': 'no-store' });
    try {
      runDueTimers(this.desk);
      const fault = this.faults.strike(request.method, request.path);
      if (fault?.mode === 'cut_before') {
        request.socket.destroy();
        return;
      }
      const asked = this.#read(request, requestId);
      if (asked.keyed) response.set('idempotency-key', asked.keyed.key);
      if (asked.account !== PLATFORM) response.set('stripe-account', asked.account);
      await this.#answer(asked, fault, request, response);
    } catch (error) {
      send(response, answerOf(error));
    } finally {
      this.onChange();
    }
  };

  /** Runs an operation for one of our own pages: the same transaction rules, no HTTP. */
  runForPage(account: string, baseUrl: string, fields: Readonly<Record<string, unknown>>, run: Operation): Answer {
    const call = {
      desk: this.desk,
      account,
      input: new Input(fields),
      params: {},
      publishable: true,
      baseUrl,
      delayMs: 0,
    };
    try {
      return this.desk.store.transaction(() => {
        this.desk.cause = { requestId: null, idempotencyKey: null };
        return keepingState(() => ({ status: 200, body: JSON.stringify(run(call)) }));
      });
    } catch (error) {
      return answerOf(error);
    } finally {
      this.onChange();
    }
  }

  async #answer(asked: Asked, fault: Fault | undefined, request: Request, response: Response): Promise<void> {
    if (fault?.mode === 'answer' && !fault.kept) {
      send(response, fault);
      return;
    }
    const remembered = asked.keyed ? this.#idempotency.begin(asked.keyed) : undefined;
    if (remembered) {
      response.set({ 'idempotent-replayed': 'true', 'original-request': remembered.requestId });
      send(response, remembered);
      return;
    }
    try {
      const outcome = fault?.mode === 'answer' ? this.#keepFault(asked, fault) : this.#execute(asked);
      this.onChange();
      await waitWhileConnected(response, outcome.delayMs + (fault?.mode === 'delay' ? fault.delayMs : 0));
      if (fault?.mode === 'cut_after') request.socket.destroy();
      else send(response, outcome.answer);
    } finally {
      if (asked.keyed) this.#idempotency.end(asked.keyed);
    }
  }

  #read(request: Request, requestId: string): Asked {
    const publishable = keyOf(request.get('authorization'), this.desk.settings) === 'publishable';
    const match = this.router.match(request.method, request.path);
    if (publishable && !match.route.open) throw needsSecretKey();
    const account = request.get('stripe-account') ?? PLATFORM;
    if (account !== PLATFORM && !this.desk.store.find('account', account)) {
      throw new ApiError(
        403,
        'invalid_request_error',
        `The key has no access to account '${account}', or there is no such account.`,
        {
          code: 'account_invalid',
        },
      );
    }
    const body = request.method === 'POST' ? bodyText(request) : (request.originalUrl.split('?', 2)[1] ?? '');
    const key = request.method === 'POST' ? request.get('idempotency-key') : undefined;
    const route = `${request.method} ${request.path}`;
    return {
      requestId,
      account,
      publishable,
      match,
      body,
      keyed: key ? { account, key, route, body } : undefined,
      baseUrl: `http://${request.get('host') ?? ''}`,
    };
  }

  #execute(asked: Asked): Outcome {
    try {
      return this.desk.store.transaction(() => {
        const outcome = this.#run(asked);
        if (asked.keyed) this.#idempotency.remember(asked.keyed, outcome.answer, asked.requestId);
        return outcome;
      });
    } catch (error) {
      const answer = answerOf(error);
      // A request that was never carried out leaves its key free.
      const executed = !(error instanceof ApiError && error.options.beforeExecution);
      if (asked.keyed && executed) this.#idempotency.remember(asked.keyed, answer, asked.requestId);
      return { answer, delayMs: 0 };
    }
  }

  #run(asked: Asked): Outcome {
    const input = new Input(parseForm(asked.body));
    const call: Call = {
      desk: this.desk,
      account: asked.account,
      input,
      params: asked.match.params,
      publishable: asked.publishable,
      baseUrl: asked.baseUrl,
      delayMs: 0,
    };
    this.desk.cause = { requestId: asked.requestId, idempotencyKey: asked.keyed?.key ?? null };
    const answer = keepingState(() => {
      const expand = input.texts('expand') ?? [];
      const result = asked.match.route.run(call);
      if (expand.length === 0) return { status: 200, body: JSON.stringify(result) };
      const copy: object = structuredClone(result);
      expandAll(this.desk, asked.account, copy, expand);
      return { status: 200, body: JSON.stringify(copy) };
    });
    return { answer, delayMs: call.delayMs };
  }

  #keepFault(asked: Asked, fault: Fault): Outcome {
    const answer = { status: fault.status, body: fault.body };
    if (asked.keyed) this.#idempotency.remember(asked.keyed, answer, asked.requestId);
    return { answer, delayMs: 0 };
  }
}

/** A bank's refusal is an answer whose record stays; every other refusal rolls the work back. */
function keepingState(work: () => Answer): Answer {
  try {
    return work();
  } catch (error) {
    if (error instanceof ApiError && error.options.keepsState) return answerOf(error);
    throw error;
  }
}

function answerOf(error: unknown): Answer {
  if (error instanceof ApiError) return { status: error.status, body: JSON.stringify(error.body()) };
  console.error('payment stand-in:', error);
  const unexpected = new ApiError(500, 'api_error', 'The local payment service failed. Its console says why.');
  return { status: 500, body: JSON.stringify(unexpected.body()) };
}

function send(response: Response, answer: Answer): void {
  if (!response.destroyed) response.status(answer.status).type('application/json').send(answer.body);
}

function bodyText(request: Request): string {
  const body: unknown = request.body;
  return typeof body === 'string' ? body : '';
}

function parseForm(text: string): Record<string, unknown> {
  return qs.parse(text, { depth: 6, parameterLimit: 1000, arrayLimit: 200, plainObjects: true });
}

/** Waits, unless the caller hangs up first: then nobody is kept waiting and the key is free again. */
async function waitWhileConnected(response: Response, delayMs: number): Promise<void> {
  if (delayMs === 0 || response.closed) return;
  const hungUp = new AbortController();
  const onClose = (): void => hungUp.abort();
  response.once('close', onClose);
  await sleep(delayMs, undefined, { signal: hungUp.signal, ref: false }).catch(() => undefined);
  response.off('close', onClose);
}
