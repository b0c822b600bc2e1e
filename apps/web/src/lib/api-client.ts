/** Calls the API by its contracts: path, input and answer come from `shared/`, and a refusal arrives as a `ProblemError`. */
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
  routes,
} from '@skyberth/shared';

/** A refusal of the API, or a line that is down (`problem` is null). */
export class ProblemError extends Error {
  override readonly name = 'ProblemError';

  constructor(
    readonly problem: Problem | null,
    message: string,
  ) {
    super(message);
  }

  /** What is wrong with one field, by its JSON pointer without the first slash. */
  fieldError(pointer: string): string | undefined {
    return this.problem?.errors?.find((error) => error.pointer === `/${pointer}`)?.detail;
  }
}

type Part<Name extends string, T> = undefined extends T ? { readonly [K in Name]?: T } : { readonly [K in Name]: T };
/** What a call is given: only the parts that the contract names. */
export type CallInput<C extends RouteContract> = Part<'params', ParamsInput<C>> &
  Part<'query', QueryInput<C>> &
  Part<'body', BodyInput<C>> & {
    readonly signal?: AbortSignal | undefined;
    /** Give the same key when the same wish is sent again; a fresh one is made otherwise. */
    readonly idempotencyKey?: string | undefined;
  };

interface LooseInput {
  readonly params?: Record<string, string> | undefined;
  readonly query?: Record<string, unknown> | undefined;
  readonly body?: unknown;
  readonly signal?: AbortSignal | undefined;
  readonly idempotencyKey?: string | undefined;
}

export const newIdempotencyKey = (): string => crypto.randomUUID();

/** The address of a route, with its query; for links to files. */
export function addressOf<C extends RouteContract>(route: C, input: Pick<LooseInput, 'params' | 'query'> = {}): string {
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(input.query ?? {})) {
    if (value !== undefined && value !== null) query.set(name, String(value));
  }
  const text = query.toString();
  return fillPath(route.path, input.params) + (text ? `?${text}` : '');
}

async function send(route: RouteContract, input: LooseInput): Promise<Response> {
  const headers: Record<string, string> = { Accept: 'application/json, application/problem+json' };
  if (input.body !== undefined) headers['Content-Type'] = route.consumes ?? 'application/json';
  if (needsIdempotencyKey(route)) headers[IDEMPOTENCY_HEADER] = input.idempotencyKey ?? newIdempotencyKey();
  try {
    return await fetch(addressOf(route, input), {
      method: route.method,
      headers,
      credentials: 'same-origin',
      ...(input.body !== undefined
        ? { body: route.consumes ? (input.body as Uint8Array<ArrayBuffer>) : JSON.stringify(input.body) }
        : {}),
      ...(input.signal ? { signal: input.signal } : {}),
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new ProblemError(null, 'Skyberth cannot be reached. Check the connection; nothing was sent twice.');
  }
}

let refreshing: Promise<boolean> | null = null;

/** Another tab is renewing the same session just now; its new cookie is ours too, a moment later. */
const OTHER_TAB_MS = 300;

/** One refresh for all calls that found the session's short token gone. */
function refreshSession(): Promise<boolean> {
  refreshing ??= send(routes.refresh, {})
    .then(async (response) => {
      if (response.status !== 409) return response.ok;
      await new Promise((resolve) => setTimeout(resolve, OTHER_TAB_MS));
      return true;
    })
    .catch(() => false)
    .finally(() => {
      refreshing = null;
    });
  return refreshing;
}

async function problemOf(response: Response): Promise<ProblemError> {
  const parsed = Problem.safeParse(await response.json().catch(() => null));
  if (parsed.success) return new ProblemError(parsed.data, parsed.data.detail);
  return new ProblemError(null, `Skyberth answered with ${response.status}. Try again in a moment.`);
}

/** Carries out one call and parses the answer. Throws `ProblemError`. */
export async function call<C extends RouteContract>(route: C, input: CallInput<C>): Promise<ResponseOf<C>> {
  const loose = input as LooseInput;
  const keyed = needsIdempotencyKey(route)
    ? { ...loose, idempotencyKey: loose.idempotencyKey ?? newIdempotencyKey() }
    : loose;
  let response = await send(route, keyed);
  if (response.status === 401 && route.access !== 'public' && (await refreshSession()))
    response = await send(route, keyed);
  if (!response.ok) throw await problemOf(response);
  const answer: unknown = await response.json();
  return (route.response ? route.response.parse(answer) : answer) as ResponseOf<C>;
}
