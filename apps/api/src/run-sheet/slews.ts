/** Whether a dish gets from one contact to the next in time, and what else stands in the way. Pure. */
import { type Mount, slewTimeS } from '@skyberth/orbit';
import type { SheetConflict, SheetContact } from '@skyberth/shared';
import { utcText } from '../bookings/booking-words.js';
import type { BookingRow } from '../bookings/bookings.repository.js';
import type { DishStop } from './dish.repository.js';
import type { AntennaRow } from './run-sheet.repository.js';

export type Slew = NonNullable<SheetContact['slew']>;
type Turning = Pick<AntennaRow, 'mount' | 'tiltDeg' | 'slewAzimuthDegPerS' | 'slewElevationDegPerS'>;
type Flown = Pick<BookingRow, 'aosMs' | 'losMs' | 'pass'>;

/** From where `before` leaves the dish to where `next` begins, by the mount's rates alone: no run-up, no end stops. */
export function slewBetween(antenna: Turning, before: Flown, next: Flown): Slew {
  const mount: Mount = {
    kind: antenna.mount as Mount['kind'],
    tiltDeg: antenna.tiltDeg,
    first: { rateDegPerS: antenna.slewAzimuthDegPerS },
    second: { rateDegPerS: antenna.slewElevationDegPerS },
  };
  const from = { azimuthDeg: before.pass.azimuthDeg[2], elevationDeg: before.pass.elevationDeg[2] };
  const to = { azimuthDeg: next.pass.azimuthDeg[0], elevationDeg: next.pass.elevationDeg[0] };
  const needS = slewTimeS(mount, from, to);
  const givenS = (next.aosMs - before.losMs) / 1000;
  return {
    fromAzimuthDeg: from.azimuthDeg,
    needS: Number.isFinite(needS) ? needS : null,
    givenS,
    fits: needS <= givenS,
  };
}

interface Closed {
  readonly fromMs: number;
  readonly toMs: number;
  readonly reason: string;
}
type Guarded = Pick<BookingRow, 'id' | 'antennaId' | 'number' | 'state' | 'guardFromMs' | 'guardToMs'>;

/** What is wrong with one contact, in sentences. `stop` is null where the dish may move. */
export function conflictsOf(
  booking: Guarded,
  about: { slew: Slew | null; closed: readonly Closed[]; stop: DishStop | null; nowMs: number; antennaName: string },
): SheetConflict[] {
  const { slew, stop, nowMs, antennaName } = about;
  const conflict = (kind: SheetConflict['kind'], sentence: string): SheetConflict => ({
    antennaId: booking.antennaId,
    bookingId: booking.id,
    kind,
    sentence,
  });
  const found: SheetConflict[] = [];
  if (slew && !slew.fits) {
    const need = slew.needS === null ? 'cannot get there' : `needs ${Math.ceil(slew.needS)} s`;
    found.push(
      conflict(
        'slew',
        `${antennaName} ${need} to turn to berth ${booking.number} and has ${Math.floor(slew.givenS)} s.`,
      ),
    );
  }
  for (const closed of about.closed) {
    const overlapMs = Math.min(closed.toMs, booking.guardToMs) - Math.max(closed.fromMs, booking.guardFromMs);
    if (overlapMs <= 0) continue;
    found.push(
      conflict(
        'blackout',
        `${antennaName} is closed (${closed.reason}) from ${utcText(closed.fromMs)} to ${utcText(closed.toMs)}, ` +
          `${Math.ceil(overlapMs / 1000)} s of it inside berth ${booking.number}. Sold contacts come first: move the closure.`,
      ),
    );
  }
  if (stop && booking.guardFromMs - nowMs < SOON_MS && nowMs < booking.guardToMs) {
    const means =
      booking.state === 'under way'
        ? `berth ${booking.number} runs and the dish moves. Get them out; the emergency stop comes before the contact.`
        : `berth ${booking.number} cannot begin.`;
    if (stop.people.length > 0)
      found.push(conflict('people', `${stop.people.join(', ')} signed in at ${antennaName}: ${means}`));
    if (stop.reason !== null)
      found.push(conflict('stop', `${antennaName} is to stay still (${stop.reason}): ${means}`));
  }
  return found;
}

/** A dish may be worked on as long as its next contact is further off than this. */
const SOON_MS = 60 * 60_000;
