/** The only place that shapes an error body: RFC 9457 problem details. */
import { type ArgumentsHost, Catch, type ExceptionFilter, HttpException, Logger } from '@nestjs/common';
import { ERROR_CODES, type ErrorCode, PROBLEM_MEDIA_TYPE, type Problem } from '@skyberth/shared';
import type { Request, Response } from 'express';
import { DomainError } from './domain-error.js';
import { newId } from './ids.js';

@Catch()
export class ProblemFilter implements ExceptionFilter {
  private readonly log = new Logger('Problem');

  catch(error: unknown, host: ArgumentsHost): void {
    const request = host.switchToHttp().getRequest<Request>();
    const response = host.switchToHttp().getResponse<Response>();
    const problem = this.problemOf(error, request);
    if (response.headersSent) {
      response.end();
      return;
    }
    response.status(problem.status).type(PROBLEM_MEDIA_TYPE).send(JSON.stringify(problem));
  }

  private problemOf(error: unknown, request: Request): Problem {
    const instance = request.originalUrl.split('?')[0] ?? '/';
    if (error instanceof DomainError) {
      return {
        ...shape(error.code, error.message),
        instance,
        ...(error.fields.length > 0 ? { errors: [...error.fields] } : {}),
      };
    }
    const status = statusOf(error);
    if (status === 413) return { ...shape('too-large', 'The request is larger than this address takes.'), instance };
    if (status === 404) return { ...shape('not-found', 'There is nothing at this address.'), instance };
    if (status === 429)
      return { ...shape('too-many', 'Too many requests in a short time. Wait a minute and try again.'), instance };
    if (status !== undefined && status >= 400 && status < 500)
      return { ...shape('bad-input', 'The request cannot be read.'), instance };
    const trace = newId();
    this.log.error(
      `${request.method} ${instance} ${trace}`,
      error instanceof Error ? (error.stack ?? error.message) : String(error),
    );
    return {
      ...shape('internal', `Nothing was changed as far as we know. If it happens again, tell us the number ${trace}.`),
      instance,
    };
  }
}

const shape = (code: ErrorCode, detail: string): Problem => ({
  type: `https://skyberth.example/problems/${code}`,
  title: ERROR_CODES[code].title,
  status: ERROR_CODES[code].status,
  detail,
  code,
});

/** The status of an error of Nest or of a body parser. */
function statusOf(error: unknown): number | undefined {
  if (error instanceof HttpException) return error.getStatus();
  const status = (error as { status?: unknown } | null)?.status;
  return typeof status === 'number' ? status : undefined;
}
