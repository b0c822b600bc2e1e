/** Opening hours of an antenna over whole days, remembered: recurrences cost more than passes do. */
import { type Interval, mergeIntervals, openIntervals, weeklyRule } from '@skyberth/market';
import { WeightedCache } from '../../platform/weighted-cache.js';
import type { AntennaInput } from '../workers/job-types.js';

const DAY_MS = 86_400_000;
/** Weeks of openings kept, counted in intervals. */
const MAX_KEPT = 200_000;

export class OpeningHours {
  private readonly kept = new WeightedCache<readonly Interval[]>(MAX_KEPT);

  /** Open time that covers `[fromMs, toMs)` at least; merged and sorted. */
  of(
    antenna: Pick<AntennaInput, 'weekly' | 'openings' | 'timeZone'>,
    fromMs: number,
    toMs: number,
  ): readonly Interval[] {
    const weekly = this.weekly(antenna, fromMs, toMs);
    return antenna.openings.length === 0 ? weekly : mergeIntervals([...weekly, ...antenna.openings]);
  }

  private weekly(
    antenna: Pick<AntennaInput, 'weekly' | 'timeZone'>,
    fromMs: number,
    toMs: number,
  ): readonly Interval[] {
    const firstDay = Math.floor(fromMs / DAY_MS) - 1;
    const lastDay = Math.ceil(toMs / DAY_MS) + 1;
    const key = JSON.stringify([antenna.timeZone, antenna.weekly, firstDay, lastDay]);
    const known = this.kept.get(key);
    if (known !== undefined) return known;
    // A rule that began a week before the days asked for has had every weekday once.
    const fromDate = new Date((firstDay - 8) * DAY_MS).toISOString().slice(0, 10);
    const rules = antenna.weekly.map((hours, index) =>
      weeklyRule({ ...hours, id: String(index), timeZone: antenna.timeZone, fromDate }),
    );
    const open = openIntervals({ rules, openings: [], fromMs: firstDay * DAY_MS, toMs: lastDay * DAY_MS });
    this.kept.set(key, open, open.length + 1);
    return open;
  }
}
