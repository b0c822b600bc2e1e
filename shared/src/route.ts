/**
 * What a route promises. The API builds its handlers, guards and OpenAPI document from this object, the page its calls:
 * there is no second place that spells a path, a schema or who may call it.
 */
import type { z } from 'zod';
import type { ErrorCode } from './errors.js';
import type { Permission } from './permissions.js';

export type HttpMethod = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** `public`: anyone; `signed-in`: any person with a session; otherwise a permission of the table. */
export type Access = 'public' | 'signed-in' | Permission;

/**
 * Whose data the route touches: `none`; `self` the caller's own account; `own` the caller's organisation;
 * `parties` either side of a contact; `market` what is published for sale; `all` staff work.
 */
export type DataScope = 'none' | 'self' | 'own' | 'parties' | 'market' | 'all';

export interface RouteContract {
  readonly name: string;
  readonly method: HttpMethod;
  /** Begins with /api, parameters as :name. */
  readonly path: string;
  readonly summary: string;
  readonly tag: string;
  readonly access: Access;
  readonly data: DataScope;
  readonly params?: z.ZodObject | undefined;
  readonly query?: z.ZodObject | undefined;
  readonly body?: z.ZodType | undefined;
  /** Media type of a body that is bytes and no JSON; its schema is then `Bytes`. */
  readonly consumes?: string | undefined;
  /** JSON answer; absent where `produces` names another media type. */
  readonly response?: z.ZodType | undefined;
  readonly produces?: string | undefined;
  readonly status?: number | undefined;
  /** Writes take an Idempotency-Key header unless they say why not. */
  readonly idempotencyKey?: 'required' | 'none' | undefined;
  /** A person must do it, with a session: no API key is taken, whatever its scopes. */
  readonly inPerson?: true | undefined;
  readonly errors?: readonly ErrorCode[] | undefined;
}

/** Keeps the literal types of a contract while checking its shape. */
export const defineRoute = <const C extends RouteContract>(contract: C): C => contract;

type Parsed<T> = T extends z.ZodType ? z.output<T> : undefined;
type Given<T> = T extends z.ZodType ? z.input<T> : undefined;
export type ParamsOf<C extends RouteContract> = Parsed<C['params']>;
export type QueryOf<C extends RouteContract> = Parsed<C['query']>;
export type BodyOf<C extends RouteContract> = Parsed<C['body']>;
export type ResponseOf<C extends RouteContract> = Parsed<C['response']>;
export type ParamsInput<C extends RouteContract> = Given<C['params']>;
export type QueryInput<C extends RouteContract> = Given<C['query']>;
export type BodyInput<C extends RouteContract> = Given<C['body']>;

export const IDEMPOTENCY_HEADER = 'Idempotency-Key';

/** Whether the route must be called with an idempotency key. */
export function needsIdempotencyKey(route: RouteContract): boolean {
  return route.method !== 'GET' && route.idempotencyKey !== 'none';
}

/** The path with its parameters filled in and escaped. */
export function fillPath(path: string, params: Readonly<Record<string, string>> = {}): string {
  return path.replace(/:([A-Za-z]+)/g, (_whole, key: string) => {
    const value = params[key];
    if (value === undefined) throw new Error(`The path ${path} needs ${key}.`);
    return encodeURIComponent(value);
  });
}
