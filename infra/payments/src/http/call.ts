import type { Desk } from '../core/desk.js';
import type { Input } from '../core/input.js';

/** Enough to change things without a request: what timers and test hooks have. */
export interface Work {
  desk: Desk;
  /** The platform, or the connected account named by the request. */
  account: string;
}

/** One request as the operations see it: no HTTP, only who asks for what. */
export interface Call extends Work {
  input: Input;
  params: Readonly<Record<string, string>>;
  /** True when only a publishable key was shown, as a browser does. */
  publishable: boolean;
  /** Where this service is reached, for the pages that answers point at. */
  baseUrl: string;
  /** Set by an operation whose answer shall come late, though the work is done. */
  delayMs: number;
}

export type Operation = (call: Call) => object;

export interface Route {
  method: 'GET' | 'POST' | 'DELETE';
  /** Path with `:name` parts. */
  path: string;
  run: Operation;
  /** A browser may call it with a publishable key (and, for intents, their client secret). */
  open?: true;
}

/** The path parameter, which the route's own pattern guarantees. */
export function param(call: Call, name: string): string {
  const value = call.params[name];
  if (value === undefined) throw new Error(`the route has no part named ${name}`);
  return value;
}
