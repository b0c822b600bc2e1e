/** A refusal that a person can act on. Services throw it; only the problem filter knows about HTTP. */
import type { ErrorCode, FieldError } from '@skyberth/shared';

export class DomainError extends Error {
  override readonly name = 'DomainError';

  constructor(
    readonly code: ErrorCode,
    /** What happened, to what, and what to do: one or two sentences. */
    detail: string,
    readonly fields: readonly FieldError[] = [],
  ) {
    super(detail);
  }
}

export const notFound = (what: string): DomainError =>
  new DomainError('not-found', `There is no such ${what}, or it belongs to someone else.`);
