/** Reads the JSON bodies of the test hooks; a wrong one is answered with what was expected. */
export class BadHook extends Error {}

export type Body = Readonly<Record<string, unknown>>;

export function asBody(value: unknown): Body {
  if (typeof value === 'object' && value !== null && !Array.isArray(value)) return value as Body;
  throw new BadHook('send a JSON object');
}

export function wholeNumber(body: Body, field: string, fallback: number): number {
  const value = body[field] ?? fallback;
  if (typeof value === 'number' && Number.isSafeInteger(value) && value >= 0) return value;
  throw new BadHook(`${field} must be a whole number >= 0`);
}

export function word<T extends string>(body: Body, field: string, options: readonly T[]): T {
  const found = options.find((option) => option === body[field]);
  if (found !== undefined) return found;
  throw new BadHook(`${field} must be one of ${options.join(', ')}`);
}

export function textOf(body: Body, field: string, fallback?: string): string {
  const value = body[field] ?? fallback;
  if (typeof value === 'string') return value;
  throw new BadHook(`${field} must be text`);
}

export function wordsOf(body: Body, field: string): string[] {
  const value = body[field] ?? [];
  if (Array.isArray(value) && value.every((item) => typeof item === 'string')) return value;
  throw new BadHook(`${field} must be a list of texts`);
}
