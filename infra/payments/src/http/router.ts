import { ApiError } from '../core/errors.js';
import type { Route } from './call.js';

interface Compiled {
  route: Route;
  pattern: RegExp;
  names: string[];
}

export interface Match {
  route: Route;
  params: Record<string, string>;
}

/** Finds the operation for a method and path. Fixed paths are listed before those with parts, and win. */
export class Router {
  readonly #routes: Compiled[];

  constructor(routes: readonly Route[]) {
    this.#routes = routes.map((route) => {
      const names: string[] = [];
      const source = route.path.replace(/:(\w+)/g, (_whole, name: string) => {
        names.push(name);
        return '([^/]+)';
      });
      return { route, names, pattern: new RegExp(`^${source}$`) };
    });
  }

  /** @throws ApiError 404 for a path that nothing serves. */
  match(method: string, path: string): Match {
    for (const { route, names, pattern } of this.#routes) {
      const found = route.method === method ? pattern.exec(path) : null;
      if (!found) continue;
      return { route, params: Object.fromEntries(names.map((name, index) => [name, decode(found[index + 1] ?? '')])) };
    }
    throw new ApiError(
      404,
      'invalid_request_error',
      `Unrecognized request URL (${method}: ${path}). This local service does not have it.`,
    );
  }
}

function decode(text: string): string {
  try {
    return decodeURIComponent(text);
  } catch {
    return text;
  }
}
