/** Newer elements that move booked passes: one by little, so that it is re-timed, and one by much, so that it is asked about. */
import { type BookingSummary, routes } from '@skyberth/shared';
import { tleAt } from '../cast/elements.js';
import type { CastSpacecraft } from '../cast/operators.js';
import { utc } from './days.js';
import type { Company, PlayOperator, PlaySpacecraft } from './settle-in.js';
import type { Stage } from './stage.js';

const HOUR_MS = 3_600_000;
/** Newer than what the local feed serves after the play, so that it stays in force. */
const EPOCH_AGE_MS = HOUR_MS / 2;
const SET_NUMBER = 950;
const LITTLE_S = 7;
/** Over the set-up time of the antenna by so much. */
const OVER_GUARD_S = 35;

interface Booked {
  readonly operator: PlayOperator;
  readonly craft: PlaySpacecraft;
  readonly booking: BookingSummary;
}

export async function moveSomePasses(stage: Stage, company: Company): Promise<void> {
  const [little, much] = await bookedPasses(stage, company);
  if (little) await renew(stage, little, LITTLE_S);
  if (!much) return;
  const { guardS } = await stage.call(much.operator.manager, routes.bookingDrift, { params: { id: much.booking.id } });
  await renew(stage, much, guardS + OVER_GUARD_S);
}

/** One booked contact each of two spacecraft, some hours ahead. */
async function bookedPasses(stage: Stage, company: Company): Promise<Booked[]> {
  const found = new Map<string, Booked>();
  for (const operator of company.operators) {
    const soon = await stage.call(operator.manager, routes.listBookings, {
      query: { fromUtc: utc(stage.nowMs() - HOUR_MS), toUtc: utc(stage.nowMs() + 3 * HOUR_MS), pageSize: 50 },
    });
    // What runs while the visitor comes stays where it is.
    const running = new Set(soon.items.map((booking) => booking.spacecraftName));
    const { items } = await stage.call(operator.manager, routes.listBookings, {
      query: { state: 'confirmed', fromUtc: utc(stage.nowMs() + 3 * HOUR_MS), pageSize: 50 },
    });
    for (const booking of items) {
      const craft = operator.spacecraft.find(({ cast }) => cast.name === booking.spacecraftName);
      if (craft && !running.has(craft.cast.name) && !found.has(craft.id))
        found.set(craft.id, { operator, craft, booking });
    }
  }
  return [...found.values()].slice(0, 2);
}

/** Elements by which the spacecraft is so many seconds late. */
async function renew(stage: Stage, { operator, craft }: Booked, lateS: number): Promise<void> {
  const epochMs = stage.nowMs() - EPOCH_AGE_MS;
  const text = tleAt(late(craft.cast, lateS), epochMs, SET_NUMBER);
  await stage.call(operator.manager, routes.saveElements, {
    body: { text, fileName: 'elements-after-manoeuvre.txt', spacecraftId: craft.id },
  });
  await stage.settle();
}

const GM_KM3_PER_S2 = 398_600.8;
const EARTH_RADIUS_KM = 6_378.135;

function late(cast: CastSpacecraft, lateS: number): CastSpacecraft {
  const meanMotionRadPerS = Math.sqrt(GM_KM3_PER_S2 / (EARTH_RADIUS_KM + cast.orbit.altitudeKm) ** 3);
  const behindDeg = (lateS * meanMotionRadPerS * 180) / Math.PI;
  return { ...cast, orbit: { ...cast.orbit, meanAnomalyDeg: cast.orbit.meanAnomalyDeg - behindDeg } };
}
