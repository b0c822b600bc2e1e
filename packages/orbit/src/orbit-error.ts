/** What goes wrong in the geometry, as a value that a caller can tell apart. */
export type OrbitErrorCode = 'outside ephemeris' | 'no ephemeris' | 'bad interval';

/** `code` is stable, `message` is a sentence with the offending value and what is permitted. */
export class OrbitError extends Error {
  override readonly name = 'OrbitError';

  constructor(
    readonly code: OrbitErrorCode,
    message: string,
    readonly data: Readonly<Record<string, unknown>> = {},
  ) {
    super(message);
  }
}
