/** A client that is typed by the contracts, keeps each person's cookies, and makes idempotency keys. */
import { randomUUID } from 'node:crypto';
import {
  type BodyInput,
  fillPath,
  IDEMPOTENCY_HEADER,
  needsIdempotencyKey,
  type ParamsInput,
  Problem,
  type QueryInput,
  type ResponseOf,
  type RouteContract,
} from '@skyberth/shared';

/** The cookies of one browser. */
export class CookieJar {
  private readonly cookies = new Map<string, { value: string; path: string }>();

  header(path: string): string {
    return [...this.cookies]
      .filter(([, cookie]) => path.startsWith(cookie.path))
      .map(([name, cookie]) => `${name}=${cookie.value}`)
      .join('; ');
  }

  take(response: Response): void {
    for (const line of response.headers.getSetCookie()) {
      const [pair = '', ...attributes] = line.split('; ');
      const name = pair.slice(0, pair.indexOf('='));
      const value = pair.slice(pair.indexOf('=') + 1);
      const path = attributes.find((each) => each.startsWith('Path='))?.slice(5) ?? '/';
      if (value === '') this.cookies.delete(name);
      else this.cookies.set(name, { value, path });
    }
  }

  get(name: string): string | undefined {
    return this.cookies.get(name)?.value;
  }

  set(name: string, value: string, path = '/api'): void {
    this.cookies.set(name, { value, path });
  }
}

type Part<Name extends string, T> = undefined extends T ? { readonly [K in Name]?: T } : { readonly [K in Name]: T };

export type CallInput<C extends RouteContract> = Part<'params', ParamsInput<C>> &
  Part<'query', QueryInput<C>> &
  Part<'body', BodyInput<C>> & {
    readonly as?: { readonly jar: CookieJar } | undefined;
    /** A key of the test's own; null sends none. */
    readonly key?: string | null;
    readonly headers?: Readonly<Record<string, string>>;
  };

/** What came back: `body` where it went well, `problem` where it was refused. */
export type Answer<C extends RouteContract> = { readonly status: number; readonly headers: Headers } & (
  | { readonly ok: true; readonly body: ResponseOf<C>; readonly problem?: undefined }
  | { readonly ok: false; readonly problem: Problem; readonly body?: undefined }
);

interface Loose {
  readonly params?: Record<string, string>;
  readonly query?: Record<string, unknown>;
  readonly body?: unknown;
  readonly as?: { readonly jar: CookieJar };
  readonly key?: string | null;
  readonly headers?: Readonly<Record<string, string>>;
}

export class Client {
  constructor(readonly url: string) {}

  /** Calls a route. Files and other media come back as a Buffer. */
  async call<C extends RouteContract>(route: C, input: CallInput<C>): Promise<Answer<C>> {
    const response = await this.send(route, input as unknown as Loose);
    const { status, headers } = response;
    if (!response.ok) return { ok: false, status, headers, problem: Problem.parse(await response.json()) };
    const isJson = headers.get('content-type')?.includes('json') ?? false;
    const answer: unknown = isJson ? await response.json() : Buffer.from(await response.arrayBuffer());
    const body = (route.response ? route.response.parse(answer) : answer) as ResponseOf<C>;
    return { ok: true, status, headers, body };
  }

  private async send(route: RouteContract, input: Loose): Promise<Response> {
    const path = fillPath(route.path, input.params);
    const query = new URLSearchParams();
    for (const [name, value] of Object.entries(input.query ?? {})) {
      if (value !== undefined) query.set(name, String(value));
    }
    const key = input.key === undefined && needsIdempotencyKey(route) ? randomUUID() : input.key;
    const response = await fetch(`${this.url}${path}${query.size > 0 ? `?${query}` : ''}`, {
      method: route.method,
      headers: {
        ...(input.body === undefined ? {} : { 'Content-Type': route.consumes ?? 'application/json' }),
        ...(typeof key === 'string' ? { [IDEMPOTENCY_HEADER]: key } : {}),
        ...(input.as ? { Cookie: input.as.jar.header(path) } : {}),
        ...input.headers,
      },
      ...(input.body === undefined
        ? {}
        : { body: route.consumes ? (input.body as Uint8Array<ArrayBuffer>) : JSON.stringify(input.body) }),
    });
    input.as?.jar.take(response);
    return response;
  }
}

/** The body of an answer that must be good; otherwise the test fails with what the server said. */
export async function must<C extends RouteContract>(answer: Promise<Answer<C>>): Promise<ResponseOf<C>> {
  const { ok, status, body, problem } = await answer;
  if (ok) return body;
  throw new Error(`${status} ${problem.code}: ${problem.detail} ${JSON.stringify(problem.errors ?? [])}`);
}
