import { ommAt } from '../cast/elements.js';
import { OPERATORS } from '../cast/operators.js';

const HOUR_MS = 3_600_000;
/** Higher than the play ever counts. */
const SET_NUMBER = 900;

/** What the local element feed serves after the play: every spacecraft, an hour old. */
export function feedElements(nowMs: number): Record<string, string | number>[] {
  return OPERATORS.flatMap((operator) => operator.spacecraft.map((one) => ommAt(one, nowMs - HOUR_MS, SET_NUMBER)));
}
