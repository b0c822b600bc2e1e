/** What other contacts on the same beam take away: their own guarded time, and the time to turn from and to them. */
import type { Interval } from '../interval.js';
import { degreesText, lengthText, timeText } from '../words/words.js';
import { type Block, windowOf } from './blocks.js';
import type { OfferAntenna, OfferBooking, OfferPass } from './offer-types.js';
import { type AzimuthAt, azimuthDistanceDeg, leaveAtMs, longestTurnMs, readyAtMs, turnMs } from './turn.js';

/** A booking as an interval, for searching. */
export interface GuardedBooking extends Interval {
  readonly booking: OfferBooking;
}

/** Below this a turn is not worth a sentence of its own. */
const NOTICEABLE_TURN_MS = 500;

/** Blocks of one beam for one pass: first the contacts themselves, then what must stay free about them. */
export function bookingBlocks(input: {
  readonly pass: OfferPass;
  readonly azimuthAt: AzimuthAt;
  readonly antenna: OfferAntenna;
  readonly bookings: readonly GuardedBooking[];
  readonly longestGuardMs: number;
}): Block[] {
  const { pass, azimuthAt, antenna, longestGuardMs } = input;
  const reachMs = longestTurnMs(antenna);
  const near = windowOf(
    input.bookings,
    pass.aosMs - antenna.setupS * 1000 - reachMs,
    pass.losMs + antenna.teardownS * 1000 + reachMs,
    longestGuardMs,
  );
  if (near.length === 0) return [];
  const taken = near.map(
    ({ booking }): Block => ({
      fromMs: booking.guardFromMs,
      toMs: booking.guardToMs,
      code: 'taken',
      word: booking.mine ? 'yours' : 'taken',
      say: () => ({
        sentence: `${booking.mine ? 'Your own contact keeps' : 'Another contact keeps'} the antenna from ${timeText(booking.guardFromMs, pass.aosMs)} to ${timeText(booking.guardToMs, pass.aosMs)}, set-up and teardown included.`,
        remedy: booking.mine
          ? 'Cancel your own contact first.'
          : 'Wait on standby in case it frees, or choose another antenna.',
      }),
    }),
  );
  const about = near.flatMap(({ booking }) => [
    afterBlock(pass, azimuthAt, antenna, booking),
    beforeBlock(pass, azimuthAt, antenna, booking),
  ]);
  return [...taken, ...about.filter((block) => block !== null)];
}

const whose = (booking: OfferBooking): string => (booking.mine ? 'your own contact' : 'another contact');

function turnWords(antenna: OfferAntenna, fromDeg: number, toDeg: number): string {
  return antenna.turnTimeS === undefined
    ? `turning ${degreesText(azimuthDistanceDeg(fromDeg, toDeg))} at ${antenna.slewAzimuthDegPerS}° a second`
    : `turning from ${degreesText(fromDeg)} to ${degreesText(toDeg)}`;
}

/** From the end of a contact until the dish can follow this pass. */
function afterBlock(pass: OfferPass, azimuthAt: AzimuthAt, antenna: OfferAntenna, booking: OfferBooking): Block | null {
  const { guardToMs, endAzimuthDeg } = booking;
  if (guardToMs >= pass.losMs) return null;
  const setupMs = antenna.setupS * 1000;
  const readyMs =
    endAzimuthDeg === null
      ? guardToMs + setupMs
      : readyAtMs(antenna, azimuthAt, { freeMs: guardToMs, fromDeg: endAzimuthDeg, earliestMs: pass.aosMs });
  if (readyMs <= Math.max(pass.aosMs, guardToMs)) return null;
  const turning = endAzimuthDeg === null ? 0 : turnMs(antenna, endAzimuthDeg, azimuthAt(readyMs));
  const remedy = 'Take the part after it, another pass, or another antenna.';
  if (endAzimuthDeg === null || turning < NOTICEABLE_TURN_MS) {
    return {
      fromMs: guardToMs,
      toMs: readyMs,
      code: 'taken',
      word: booking.mine ? 'yours' : 'taken',
      say: () => ({
        sentence: `The antenna leaves ${whose(booking)} at ${timeText(guardToMs, pass.aosMs)} and needs ${lengthText(setupMs)} of set-up.`,
        remedy,
      }),
    };
  }
  return {
    fromMs: guardToMs,
    toMs: readyMs,
    code: 'turn',
    word: 'turn',
    say: () => ({
      sentence: `The dish cannot turn in time. It leaves ${whose(booking)} at ${timeText(guardToMs, pass.aosMs)} facing ${degreesText(endAzimuthDeg)}; ${turnWords(antenna, endAzimuthDeg, azimuthAt(readyMs))}, and ${lengthText(setupMs)} of set-up, take ${lengthText(turning + setupMs)}.`,
      remedy,
    }),
  };
}

/** From the instant at which the dish must stop following this pass until the next contact's set-up. */
function beforeBlock(
  pass: OfferPass,
  azimuthAt: AzimuthAt,
  antenna: OfferAntenna,
  booking: OfferBooking,
): Block | null {
  const { guardFromMs, startAzimuthDeg } = booking;
  if (guardFromMs <= pass.aosMs) return null;
  const teardownMs = antenna.teardownS * 1000;
  const leaveMs =
    startAzimuthDeg === null
      ? guardFromMs - teardownMs
      : leaveAtMs(antenna, azimuthAt, { dueMs: guardFromMs, toDeg: startAzimuthDeg, latestMs: pass.losMs });
  if (leaveMs >= Math.min(pass.losMs, guardFromMs)) return null;
  const turning = startAzimuthDeg === null ? 0 : turnMs(antenna, azimuthAt(leaveMs), startAzimuthDeg);
  const remedy = 'Take the part before it, another pass, or another antenna.';
  if (startAzimuthDeg === null || turning < NOTICEABLE_TURN_MS) {
    return {
      fromMs: leaveMs,
      toMs: guardFromMs,
      code: 'taken',
      word: booking.mine ? 'yours' : 'taken',
      say: () => ({
        sentence: `The set-up for ${whose(booking)} begins at ${timeText(guardFromMs, pass.aosMs)}, and ${lengthText(teardownMs)} of teardown come before it.`,
        remedy,
      }),
    };
  }
  return {
    fromMs: leaveMs,
    toMs: guardFromMs,
    code: 'turn',
    word: 'turn',
    say: () => ({
      sentence: `The dish must turn away before the pass ends. The set-up for ${whose(booking)} begins at ${timeText(guardFromMs, pass.aosMs)} facing ${degreesText(startAzimuthDeg)}; ${lengthText(teardownMs)} of teardown, and ${turnWords(antenna, azimuthAt(leaveMs), startAzimuthDeg)}, take ${lengthText(turning + teardownMs)}.`,
      remedy,
    }),
  };
}
