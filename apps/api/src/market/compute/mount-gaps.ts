/**
 * What a mount cannot follow of a stay, and what that takes away from sale. Passes are looked at along the table that also
 * draws them: two metres in place are a thousandth of a degree, far below what moves a gap by a second.
 */
import { type MountGap, mountCoverage } from '@skyberth/orbit';
import type { AntennaInput, ElementsSpan } from '../workers/job-types.js';
import type { Horizon } from './horizons.js';
import { mountOf } from './mounts.js';
import type { Stay } from './stay.js';
import type { Look, TrackTables } from './track-table.js';

/** Nothing in orbit is faster: escape speed at the surface, km/s (the square root of 2 GM / R). */
const FASTEST_KM_PER_S = 11.2;
const DEG = 180 / Math.PI;
/** Steps of a second; a stay of more than two hours gets longer ones, since nothing turns fast there. */
const STEP_MS = 1_000;
const MOST_STEPS = 7_200;
/**
 * A gap so short inside a pass is a loss of lock that receivers and operators live with; the pass is sold around it, as one.
 * Common practice, no source.
 */
const LIVED_WITH_MS = 30_000;
/** Room for what the quick look below overlooks. */
const MARGIN = 0.8;

export interface FollowQuestion {
  readonly stay: Stay;
  readonly span: ElementsSpan;
  readonly antenna: AntennaInput;
  readonly horizon: Horizon;
}

export class MountGaps {
  private readonly look: Look = { azimuthDeg: 0, elevationDeg: 0 };

  constructor(private readonly tables: TrackTables) {}

  /** Gaps of the whole stay, in rising order; worked out once for each. */
  of(question: FollowQuestion): readonly MountGap[] {
    const { stay } = question;
    stay.gaps ??= this.isFollowed(question) ? [] : this.compute(question);
    return stay.gaps;
  }

  /**
   * Whether a glance tells that nothing is lost: the azimuth of a pass runs fastest at its highest point. Other mounts have
   * their keyhole elsewhere and are always looked at in full.
   */
  private isFollowed({ stay, span, antenna, horizon }: FollowQuestion): boolean {
    const fastestDegPerS = (FASTEST_KM_PER_S / stay.rangeKm[1]) * DEG;
    if (antenna.mount !== 'az-el' || fastestDegPerS > MARGIN * antenna.slewElevationDegPerS) return false;
    const level = Math.cos(stay.maxElevationDeg / DEG);
    if (fastestDegPerS <= MARGIN * antenna.slewAzimuthDegPerS * level) return true;
    const [beforeMs, afterMs] = [stay.tcaMs - STEP_MS / 2, stay.tcaMs + STEP_MS / 2];
    const before = this.azimuthDeg(span, horizon, beforeMs);
    const turned = Math.abs(((this.azimuthDeg(span, horizon, afterMs) - before + 540) % 360) - 180);
    return turned <= MARGIN * antenna.slewAzimuthDegPerS;
  }

  private azimuthDeg(span: ElementsSpan, horizon: Horizon, timeMs: number): number {
    this.tables.look(span, horizon.frame, timeMs, this.look);
    return this.look.azimuthDeg;
  }

  private compute({ stay, span, antenna, horizon }: FollowQuestion): readonly MountGap[] {
    const steps = Math.max(1, Math.min(MOST_STEPS, Math.ceil((stay.losMs - stay.aosMs) / STEP_MS)));
    const track = Array.from({ length: steps + 1 }, (_, i) => {
      const timeMs = stay.aosMs + (i * (stay.losMs - stay.aosMs)) / steps;
      this.tables.look(span, horizon.frame, timeMs, this.look);
      return { timeMs: Math.round(timeMs), ...this.look };
    });
    return mountCoverage(track, mountOf(antenna)).gaps;
  }
}

/** What of the gaps is not sold: one that begins or ends the stay, and one that is longer than can be lived with. */
export const gapsNotSold = (stay: Stay, gaps: readonly MountGap[]): readonly MountGap[] =>
  gaps.filter((gap) => gap.fromMs <= stay.aosMs || gap.toMs >= stay.losMs || gap.toMs - gap.fromMs > LIVED_WITH_MS);

/** Gaps as far as they lie in a part of the stay. */
export const gapsWithin = (gaps: readonly MountGap[], { aosMs, losMs }: Pick<Stay, 'aosMs' | 'losMs'>): MountGap[] =>
  gaps
    .map((gap) => ({ ...gap, fromMs: Math.max(gap.fromMs, aosMs), toMs: Math.min(gap.toMs, losMs) }))
    .filter((gap) => gap.toMs > gap.fromMs);
