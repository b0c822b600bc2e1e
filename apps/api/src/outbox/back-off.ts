/** How patiently the outbox tries again. */

/** After so many attempts a person must look at it. */
export const MOST_ATTEMPTS = 12;
const FIRST_WAIT_MS = 5_000;
const LONGEST_WAIT_MS = 3_600_000;

/** Milliseconds to wait after the `attempt`-th failure (from 1): doubling from five seconds, at most an hour. */
export const waitAfterMs = (attempt: number): number => Math.min(FIRST_WAIT_MS * 2 ** (attempt - 1), LONGEST_WAIT_MS);
