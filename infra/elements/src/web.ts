import { setTimeout as sleep } from 'node:timers/promises';
import express, { type Express, type NextFunction, type Request, type Response } from 'express';
import { FAULT_MODES, type Fault, type FaultMode, POISONS, type Poison, spoilElements, spoilText } from './faults.js';
import { type Feed, tagOf } from './feed.js';
import { type Omm, readOmmList } from './omm.js';
import { tleLines } from './tle.js';

const LOCAL_HOST = /^(127\.0\.0\.1|localhost|\[::1\])(:\d+)?$/;

/** The feed over HTTP, and the switches of its faults. */
export class FeedSite {
  readonly app: Express = express();
  #fault: Fault | undefined;

  constructor(private readonly feed: Feed) {
    const { app } = this;
    app.disable('x-powered-by');
    // Tags are our own, made before a fault can change the text.
    app.disable('etag');
    app.use(onlyLocalNames);
    app.get('/health', (_request, response) => this.#health(response));
    app.get('/elements/omm.json', (request, response) => this.#serve(request, response, 'json'));
    app.get('/elements/tle.txt', (request, response) => this.#serve(request, response, 'tle'));
    app.use('/_test', refuseOtherOrigins, express.json({ limit: '2mb' }));
    app.get('/_test/fault', (_request, response) => {
      response.json({ fault: this.#fault ?? null });
    });
    app.post('/_test/fault', (request, response) => this.#setFault(request, response));
    app.delete('/_test/fault', (_request, response) => {
      this.#fault = undefined;
      response.json({ fault: null });
    });
    app.post('/_test/elements', (request, response) => this.#replace(request, response));
    app.delete('/_test/elements', (_request, response) => {
      this.feed.replace(undefined);
      response.status(204).end();
    });
    app.get('/', (_request, response) => this.#index(response));
  }

  async #serve(request: Request, response: Response, format: 'json' | 'tle'): Promise<void> {
    const fault = this.#strike();
    if (fault?.mode === 'error') {
      response.status(fault.status).type('text/plain').send('The feed is out of order (asked for by a test).');
      return;
    }
    if (fault?.mode === 'slow') await sleep(fault.delayMs, undefined, { ref: false });
    const { elements, changedMs } = this.feed.read();
    const chosen = choose(elements, request.query.catalog);
    const spoiled = spoilElements(chosen, fault);
    const sound =
      format === 'json'
        ? JSON.stringify(spoiled)
        : spoiled
            .flatMap(tleLines)
            .map((line) => `${line}\n`)
            .join('');
    const text = spoilText(sound, format, fault);
    const tag = tagOf(text);
    response.set({ etag: tag, 'last-modified': new Date(changedMs).toUTCString(), 'cache-control': 'no-cache' });
    if (isKnown(request, tag, changedMs)) {
      response.status(304).end();
      return;
    }
    response.type(format === 'json' ? 'application/json' : 'text/plain');
    if (fault?.mode !== 'cut') {
      response.send(text);
      return;
    }
    // Says how long it will be, sends half, and hangs up.
    response.set('content-length', String(Buffer.byteLength(text)));
    response.write(text.slice(0, Math.floor(text.length / 2)), () => request.socket.destroy());
  }

  /** The fault for this request; one with a number of times is used up by it. */
  #strike(): Fault | undefined {
    const fault = this.#fault;
    if (fault?.times === undefined) return fault;
    fault.times -= 1;
    if (fault.times <= 0) this.#fault = undefined;
    return fault;
  }

  #health(response: Response): void {
    try {
      response.json({ status: 'ok', elements: this.feed.read().elements.length });
    } catch (error) {
      response.status(503).json({ status: 'down', reason: error instanceof Error ? error.message : String(error) });
    }
  }

  #setFault(request: Request, response: Response): void {
    const fault = readFault(request.body);
    if (typeof fault === 'string') {
      response.status(400).json({ error: fault });
      return;
    }
    this.#fault = fault;
    response.json({ fault });
  }

  #replace(request: Request, response: Response): void {
    try {
      const elements = readOmmList(JSON.stringify(request.body));
      this.feed.replace(elements);
      response.json({ elements: elements.length });
    } catch (error) {
      response.status(400).json({ error: error instanceof Error ? error.message : String(error) });
    }
  }

  #index(response: Response): void {
    const { elements } = this.feed.read();
    response
      .type('text/plain')
      .send(
        `Local element feed (invented spacecraft), ${elements.length} element sets.\n/elements/omm.json\n/elements/tle.txt\nOne spacecraft: ?catalog=<number>\n`,
      );
  }
}

function choose(elements: readonly Omm[], catalog: unknown): readonly Omm[] {
  return typeof catalog === 'string' ? elements.filter((omm) => String(omm.NORAD_CAT_ID) === catalog) : elements;
}

/** RFC 9110 section 13.2.2: If-None-Match decides when it is there, If-Modified-Since only otherwise. */
function isKnown(request: Request, tag: string, changedMs: number): boolean {
  const tags = request.get('if-none-match');
  if (tags !== undefined)
    return tags === '*' || tags.split(',').some((part) => part.trim().replace(/^W\//, '') === tag);
  const since = Date.parse(request.get('if-modified-since') ?? '');
  return !Number.isNaN(since) && Math.floor(changedMs / 1000) * 1000 <= since;
}

/** The fault that a test asks for, or what is wrong with the request. */
function readFault(body: unknown): Fault | string {
  const given = typeof body === 'object' && body !== null ? (body as Readonly<Record<string, unknown>>) : {};
  const mode = FAULT_MODES.find((name): name is FaultMode => name === given.mode);
  const poison = POISONS.find((name): name is Poison => name === (given.poison ?? 'impossible'));
  if (!mode) return `mode must be one of ${FAULT_MODES.join(', ')}`;
  if (!poison) return `poison must be one of ${POISONS.join(', ')}`;
  const numbers = {
    times: given.times,
    status: given.status ?? 500,
    delayMs: given.delayMs ?? 5000,
    staleDays: given.staleDays ?? 30,
  };
  for (const [name, value] of Object.entries(numbers)) {
    if (value !== undefined && !(Number.isInteger(value) && Number(value) >= 0))
      return `${name} must be a whole number >= 0`;
  }
  return {
    mode,
    poison,
    times: numbers.times === undefined ? undefined : Number(numbers.times),
    status: Number(numbers.status),
    delayMs: Number(numbers.delayMs),
    staleDays: Number(numbers.staleDays),
  };
}

function onlyLocalNames(request: Request, response: Response, next: NextFunction): void {
  if (LOCAL_HOST.test(request.get('host') ?? '')) next();
  else response.status(421).type('text/plain').send('This service answers only to local names.');
}

/** Some other page in the same browser must not be able to spoil the feed. */
function refuseOtherOrigins(request: Request, response: Response, next: NextFunction): void {
  const origin = request.get('origin');
  if (origin === undefined || origin === `http://${request.get('host') ?? ''}`) next();
  else response.status(403).json({ error: 'not from another page' });
}
