/** What is said about ephemerides. Pure. */
import type { EphemerisSummary } from '@skyberth/shared';

/** The line that a fault names, or null where it is about the whole file. */
export function faultyLine(detail: string): number | null {
  const found = /^Line (\d+)\b/.exec(detail);
  return found ? Number(found[1]) : null;
}

/** Where an ephemeris stands at an instant. */
export function ephemerisState(
  { startUtc, stopUtc, withdrawnUtc }: Pick<EphemerisSummary, 'startUtc' | 'stopUtc' | 'withdrawnUtc'>,
  nowMs: number,
): 'withdrawn' | 'to come' | 'in use' | 'over' {
  if (withdrawnUtc !== null) return 'withdrawn';
  if (nowMs < Date.parse(startUtc)) return 'to come';
  return nowMs <= Date.parse(stopUtc) ? 'in use' : 'over';
}
