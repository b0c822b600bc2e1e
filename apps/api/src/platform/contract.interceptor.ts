/** Validates what comes in and what goes out against the contract, and answers a repeated write as the first time. */
import {
  type CallHandler,
  type ExecutionContext,
  Injectable,
  type NestInterceptor,
  StreamableFile,
} from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import { IDEMPOTENCY_HEADER, needsIdempotencyKey, type RouteContract } from '@skyberth/shared';
import type { Response } from 'express';
import { catchError, map, type Observable, of, throwError } from 'rxjs';
import type { z } from 'zod';
import { CONTRACT, type SkyberthRequest } from './contract.js';
import { DomainError } from './domain-error.js';
import { IdempotencyStore } from './idempotency.store.js';

@Injectable()
export class ContractInterceptor implements NestInterceptor {
  constructor(
    private readonly reflector: Reflector,
    private readonly store: IdempotencyStore,
  ) {}

  intercept(context: ExecutionContext, next: CallHandler): Observable<unknown> {
    const contract = this.reflector.get<RouteContract>(CONTRACT, context.getHandler());
    const request = context.switchToHttp().getRequest<SkyberthRequest>();
    const response = context.switchToHttp().getResponse<Response>();
    request.handlerInput = {
      params: parse(contract.params, request.params, 'params'),
      query: parse(contract.query, request.query, 'query'),
      body: parse(contract.body, request.body, ''),
    };
    const answer = () => next.handle().pipe(map((value) => checkAnswer(contract, value)));
    if (!needsIdempotencyKey(contract)) return answer();
    return this.once(contract, request, response, answer);
  }

  private once(
    contract: RouteContract,
    request: SkyberthRequest,
    response: Response,
    answer: () => Observable<unknown>,
  ): Observable<unknown> {
    const key = request.header(IDEMPOTENCY_HEADER);
    if (!key || key.length < 8 || key.length > 255) {
      throw new DomainError(
        'key-missing',
        `Send an ${IDEMPOTENCY_HEADER} header of 8 to 255 characters, a new one for each new wish.`,
      );
    }
    const claim = this.store.claim({
      caller: callerOf(request),
      key,
      route: `${contract.method} ${request.originalUrl}`,
      organisationId: request.principal?.organisationId ?? '',
      body: request.handlerInput?.body,
    });
    if (claim.kind === 'repeat') {
      response.status(claim.status);
      response.setHeader('Idempotent-Replayed', 'true');
      return of(claim.answer);
    }
    return answer().pipe(
      map((value) => {
        this.store.finish(claim.handle, response.statusCode, value);
        return value;
      }),
      catchError((error: unknown) => {
        this.store.release(claim.handle);
        return throwError(() => error);
      }),
    );
  }
}

/** Whose idempotency key it is: each API key has its own, apart from the person who made it. */
function callerOf({ principal, ip }: SkyberthRequest): string {
  if (principal?.apiKey) return `api-key:${principal.apiKey.id}`;
  return principal?.personId ?? `public:${ip}`;
}

function parse(schema: z.ZodType | undefined, value: unknown, place: string): unknown {
  if (!schema) return undefined;
  const result = schema.safeParse(value ?? {});
  if (result.success) return result.data;
  const fields = result.error.issues.map((issue) => ({
    pointer: `/${[place, ...issue.path.map(String)].filter(Boolean).join('/')}`,
    detail: issue.message,
  }));
  const first = fields[0];
  throw new DomainError(
    'bad-input',
    first ? `${first.detail} (${first.pointer})` : 'The request does not have the right form.',
    fields,
  );
}

/**
 * An answer that breaks its own contract is our fault and must not leave. Bytes were made and typed elsewhere, off this
 * thread; the API tests parse them by the contract.
 */
function checkAnswer(contract: RouteContract, value: unknown): unknown {
  if (!contract.response || value instanceof StreamableFile) return value;
  const result = contract.response.safeParse(value);
  if (result.success) return result.data;
  throw new Error(`The answer of ${contract.name} breaks its contract: ${result.error.message}`);
}
