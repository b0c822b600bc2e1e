/** Turns a route contract of `shared/` into a Nest handler: path, status, access and validated input. */
import {
  applyDecorators,
  createParamDecorator,
  type ExecutionContext,
  Header,
  HttpCode,
  RequestMapping,
  RequestMethod,
  SetMetadata,
} from '@nestjs/common';
import {
  type ApiKeyScope,
  type BodyOf,
  type ParamsOf,
  type Principal,
  type QueryOf,
  type RouteContract,
} from '@skyberth/shared';
import type { Request } from 'express';

export const CONTRACT = 'skyberth:contract';

const METHODS: Record<RouteContract['method'], RequestMethod> = {
  GET: RequestMethod.GET,
  POST: RequestMethod.POST,
  PUT: RequestMethod.PUT,
  PATCH: RequestMethod.PATCH,
  DELETE: RequestMethod.DELETE,
};

/** Binds a controller method to its contract. A method without one is refused by the guard. */
export const Handles = (contract: RouteContract): MethodDecorator =>
  applyDecorators(
    RequestMapping({ method: METHODS[contract.method], path: contract.path }),
    HttpCode(contract.status ?? 200),
    SetMetadata(CONTRACT, contract),
    ...(contract.produces ? [Header('Content-Type', contract.produces)] : []),
  );

/** The caller, with the session they call in, or the API key that calls in their name. */
export type Caller = Principal & {
  readonly familyId: string | null;
  readonly apiKey?: { readonly id: string; readonly scopes: readonly ApiKeyScope[] };
};

/** What a handler is given: parsed by the contract, with the caller beside it. */
export interface HandlerInput<C extends RouteContract> {
  readonly params: ParamsOf<C>;
  readonly query: QueryOf<C>;
  readonly body: BodyOf<C>;
  /** The caller; on public routes null. */
  readonly caller: C['access'] extends 'public' ? Caller | null : Caller;
}

/** The request with what guard and interceptor have put on it. */
export interface SkyberthRequest extends Request {
  principal?: Caller;
  handlerInput?: { params: unknown; query: unknown; body: unknown };
  rawBody?: Buffer;
}

/** The validated input of the route, as `HandlerInput<typeof routes.x>`. */
export const Input = createParamDecorator((_data: unknown, context: ExecutionContext) => {
  const request = context.switchToHttp().getRequest<SkyberthRequest>();
  return { ...request.handlerInput, caller: request.principal ?? null };
});
