/** What goes wrong in the geometry, as a value that a caller can tell apart. */
export type OrbitErrorCode =
  | 'outside ephemeris'
  | 'no ephemeris'
  | 'bad interval'
  | 'bad place'
  | 'bad mask'
  | 'bad elements'
  | 'not expressible'
  /** SGP4 has no answer for the instant: its mean or perturbed elements left their range. */
  | 'elements past use'
  /** SGP4's answer lies under ground. */
  | 'decayed';

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
