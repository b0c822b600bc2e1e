/** Every stay of one spacecraft above the horizons of antennas in a period, by the elements in force for each. */
import { OrbitError } from '@skyberth/orbit';
import type { AntennaInput, CraftInput } from '../workers/job-types.js';
import type { PassBlocks } from './pass-blocks.js';
import type { Stay } from './stay.js';

export interface StaysQuestion {
  readonly craft: CraftInput;
  readonly antennas: readonly { readonly antenna: AntennaInput; readonly floorDeg: number }[];
  readonly fromMs: number;
  readonly toMs: number;
  /** Called after each day of so many antennas; what it throws ends the search. */
  readonly afterDay?: (antennas: number) => void;
}

/**
 * Stays that touch the period, whole where they end within a day of it, sorted, in the order of the antennas. A pass
 * belongs to the element set in force at its highest point. `fault` says from when elements could not be used.
 */
export function staysOf(blocks: PassBlocks, question: StaysQuestion): { stays: Stay[][]; fault: string | null } {
  const { craft, antennas, fromMs, toMs, afterDay } = question;
  const stays: Stay[][] = antennas.map(() => []);
  let fault: string | null = null;
  for (const span of craft.spans) {
    if (span.fromMs >= toMs || span.toMs <= fromMs) continue;
    try {
      const found = blocks.touching({
        span,
        antennas,
        fromMs: Math.max(fromMs, span.fromMs),
        toMs: Math.min(toMs, span.toMs),
        ...(afterDay && { afterDay }),
      });
      fault ??= found.fault;
      found.stays.forEach((some, index) => {
        for (const stay of some) {
          const ours = stay.tcaMs >= span.fromMs && stay.tcaMs < span.toMs;
          if (ours && stay.losMs > fromMs && stay.aosMs < toMs) append(stays[index] ?? [], stay);
        }
      });
    } catch (error) {
      if (!(error instanceof OrbitError)) throw error;
      fault ??= error.message;
    }
  }
  return { stays, fault };
}

/** Two element sets may both claim a pass at the instant where one follows the other; the later set gives way. */
function append(stays: Stay[], stay: Stay): void {
  const before = stays.at(-1);
  if (before === undefined || stay.tcaMs > before.losMs || stay.elementSetId === before.elementSetId) stays.push(stay);
}
