/** What goes wrong with money, as a value that a caller can tell apart. */

export type MoneyErrorCode =
  | 'unknown currency'
  | 'currency without minor units'
  | 'different currencies'
  | 'not whole'
  | 'too large'
  | 'not an amount'
  | 'bad allocation'
  | 'unbalanced'
  | 'bad posting'
  | 'no rate'
  | 'bad invoice'
  | 'bad payout'
  | 'bad month';

/** Thrown by every function of this package. `code` is stable, `message` is a sentence with the offending value. */
export class MoneyError extends Error {
  override readonly name = 'MoneyError';

  constructor(
    readonly code: MoneyErrorCode,
    message: string,
    readonly data: Readonly<Record<string, unknown>> = {},
  ) {
    super(message);
  }
}
