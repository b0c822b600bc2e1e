/** Until when a request is answered, and how pressing that is. */
import type { BookingSummary } from '@skyberth/shared';

const PRESSING_MS = 3_600_000;

type Asked = Pick<BookingSummary, 'answerByUtc' | 'aosUtc'>;

/** The end of the time to answer; AOS where none was set. */
export const deadlineMs = ({ answerByUtc, aosUtc }: Asked): number => Date.parse(answerByUtc ?? aosUtc);

export const byDeadline = (one: Asked, other: Asked): number => deadlineMs(one) - deadlineMs(other);

export type Pressure = 'over' | 'pressing' | 'calm';

/** `pressing` in the last hour. */
export function pressureOf(request: Asked, nowMs: number): Pressure {
  const leftMs = deadlineMs(request) - nowMs;
  if (leftMs <= 0) return 'over';
  return leftMs <= PRESSING_MS ? 'pressing' : 'calm';
}
