/** Puts the fields of a refusal where a form shows them. */
import { ProblemError } from './api-client.js';

/** JSON pointers turned into the dotted paths that forms use; empty where the refusal names no field. */
export function fieldErrors(error: unknown): Record<string, string> {
  if (!(error instanceof ProblemError)) return {};
  return Object.fromEntries(
    (error.problem?.errors ?? []).map((field) => [field.pointer.slice(1).replaceAll('/', '.'), field.detail]),
  );
}

/** One sentence for the person, whatever was thrown. */
export const sentenceOf = (error: unknown): string =>
  error instanceof Error && error.message ? error.message : 'Something went wrong. Try again.';
