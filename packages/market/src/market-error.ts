/** What goes wrong in the market's arithmetic, as a value that a caller can tell apart. */
export type MarketErrorCode =
  | 'bad time zone'
  | 'bad local time'
  | 'bad rule'
  | 'bad price card'
  | 'bad ladder'
  | 'bad interval'
  | 'bad antenna';

/** `code` is stable, `message` is a sentence with the offending value and what is permitted. */
export class MarketError extends Error {
  override readonly name = 'MarketError';

  constructor(
    readonly code: MarketErrorCode,
    message: string,
    readonly data: Readonly<Record<string, unknown>> = {},
  ) {
    super(message);
  }
}

/** A fault in what a person entered: which field, and a sentence. */
export interface MarketFault {
  readonly field: string;
  readonly sentence: string;
}
