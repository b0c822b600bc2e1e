/** What `play.mjs` exports. */
export interface PlayedYear {
  readonly bookings: number;
  readonly refunds: number;
  readonly chargebacks: number;
  readonly missedRead: number;
  readonly dropped: number;
  readonly duplicated: number;
  readonly late: number;
  readonly orderFailures: number;
  readonly payouts: number;
  readonly disagreements: readonly string[];
}
export function playYear(wish: { bookings: number; seed: number }): Promise<PlayedYear>;
