import { describe, expect, it } from 'vitest';
import { jsonText, SAMPLE_NOW_MS, sampleAntenna, sampleFlying, sampleSearch } from '../testing/samples.js';
import type { SearchJob } from '../workers/job-types.js';
import { PassDesk } from './pass-desk.js';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

const text = (desk: PassDesk, job: SearchJob): string => {
  const outcome = desk.carryOut(job);
  if (outcome.kind !== 'found') throw new Error(outcome.kind);
  return `${outcome.forSale} ${jsonText(outcome.json)}`;
};

describe('answers given again', () => {
  const price = {
    ...sampleAntenna().price,
    shortNotice: { underHours: 30, percent: 10 },
    busyHours: [{ days: [2, 3], fromLocal: '08:00', toLocal: '20:00', percent: 20 }],
  };
  const base = sampleAntenna({ price, minNoticeMin: 90, horizonDays: 2 });
  const [first] = sampleFlying().spans;
  if (first === undefined) throw new Error('There are no elements.');
  const busy = (fromMs: number) => ({
    beam: 1,
    guardFromMs: fromMs,
    guardToMs: fromMs + HOUR_MS,
    aosMs: fromMs + 60_000,
    losMs: fromMs + HOUR_MS - 60_000,
    startAzimuthDeg: 20,
    endAzimuthDeg: 200,
    own: null,
  });

  it('are what a fresh desk would answer, however time goes on and whatever changes', () => {
    const warm = new PassDesk();
    const wish = sampleSearch().wish;
    const jobs: SearchJob[] = [];
    for (let minutes = 0; minutes < 4 * 1_440; minutes += 97) {
      const nowMs = SAMPLE_NOW_MS + minutes * 60_000;
      const turn = (minutes / 97) % 7;
      jobs.push(
        sampleSearch({
          nowMs,
          antennas: [
            turn === 2 ? { ...base, busy: [busy(SAMPLE_NOW_MS + 30 * HOUR_MS)] } : base,
            { ...base, id: '01939f7e-0000-7000-8000-0000000000a2', price: turn === 3 ? sampleAntenna().price : price },
          ],
          wish: turn === 4 ? { ...wish, highestPriceMinor: 4_000 } : turn === 5 ? { ...wish, shortestS: 400 } : wish,
          spacecraft: [
            turn === 6
              ? sampleFlying(
                  {},
                  { contacts: [{ fromMs: nowMs, toMs: nowMs + DAY_MS, antennaId: 'x', antennaName: 'X' }] },
                )
              : sampleFlying(),
          ],
        }),
      );
    }
    for (const job of jobs) expect(text(warm, job)).toBe(text(new PassDesk(), job));
  });
});
