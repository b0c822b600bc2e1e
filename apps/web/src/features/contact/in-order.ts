/** Everything that happened and will happen, in order of time. Pure. */
import type { Booking, ContactEvent, PassDetail } from '@skyberth/shared';
import { formatCountdown, formatDegrees, formatNumber } from '../../ui/format.js';

export interface OrderEntry {
  readonly id: string;
  readonly atMs: number;
  /** Round: predicted. Square: it happened. Diamond: now. */
  readonly kind: 'predicted' | 'happened' | 'now';
  readonly title: string;
  readonly detail: string;
  readonly isToCome: boolean;
}

const ENDED: readonly Booking['state'][] = ['lapsed', 'declined', 'cancelled'];

export function inOrder(
  booking: Booking,
  detail: PassDetail | undefined,
  nowMs: number,
  live: readonly ContactEvent[] = [],
): OrderEntry[] {
  const happened = booking.events.map((event) => ({
    id: event.id,
    atMs: Date.parse(event.atUtc),
    kind: 'happened' as const,
    title: event.sentence,
    detail: event.by,
    isToCome: false,
  }));
  // The diary's own lines among them stand above already.
  const reported = live
    .filter((event) => event.kind !== 'diary')
    .map((event) => ({
      id: `live ${event.seq}`,
      atMs: Date.parse(event.happenedUtc),
      kind: 'happened' as const,
      title: event.sentence,
      detail: `reported live by ${event.by}`,
      isToCome: false,
    }));
  // A contact that was called off has no future to predict.
  const predicted = ENDED.includes(booking.state) ? [] : predictions(booking, detail, nowMs);
  const isOpen = predicted.some((entry) => entry.isToCome);
  const now: OrderEntry[] = isOpen
    ? [{ id: 'now', atMs: nowMs, kind: 'now', title: 'Now', detail: '', isToCome: false }]
    : [];
  return [...happened, ...reported, ...predicted, ...now].toSorted((a, b) => a.atMs - b.atMs);
}

function predictions(booking: Booking, detail: PassDetail | undefined, nowMs: number): OrderEntry[] {
  const entry = (title: string, utc: string, words: string): OrderEntry => {
    const atMs = Date.parse(utc);
    return { id: title, atMs, kind: 'predicted', title, detail: words, isToCome: atMs > nowMs };
  };
  const track = detail?.track ?? [];
  const pointing = (one: (typeof track)[number] | undefined) =>
    one ? `azimuth ${formatDegrees(one.azimuthDeg)}, elevation ${formatDegrees(one.elevationDeg)}` : '';
  const isHighestInside = booking.tcaUtc >= booking.aosUtc && booking.tcaUtc <= booking.losUtc;
  const range = detail ? `, ${formatNumber(Math.min(...track.map((one) => one.rangeKm)))} km away` : '';
  return [
    entry('Set-up begins', booking.setupStartsUtc, `${booking.antennaName} turns to AOS`),
    entry('AOS predicted', booking.aosUtc, pointing(track[0])),
    ...(isHighestInside
      ? [entry('Highest', booking.tcaUtc, `${formatDegrees(booking.maxElevationDeg)}${track.length > 0 ? range : ''}`)]
      : []),
    entry('LOS predicted', booking.losUtc, pointing(track.at(-1))),
    entry('Tear-down ends', booking.teardownEndsUtc, 'then the station reports'),
  ];
}

export interface Countdown {
  readonly label: string;
  readonly text: string;
  readonly spoken: string;
}

/** The one countdown of the page: to the end of a hold, to AOS, to LOS; null once there is nothing to wait for. */
export function countdown(booking: Booking, nowMs: number): Countdown | null {
  if (ENDED.includes(booking.state)) return null;
  const to = (label: string, utc: string): Countdown => {
    const leftMs = Date.parse(utc) - nowMs;
    return { label, text: wait(leftMs), spoken: `${wait(leftMs)} ${label}` };
  };
  if (booking.state === 'held' && booking.holdEndsUtc && nowMs < Date.parse(booking.holdEndsUtc))
    return to('left on the hold', booking.holdEndsUtc);
  if (nowMs < Date.parse(booking.aosUtc)) return to('until AOS', booking.aosUtc);
  if (nowMs < Date.parse(booking.losUtc)) return to('until LOS', booking.losUtc);
  return null;
}

const DAY_MS = 86_400_000;

/** Days are said apart, so that the figure stays readable. */
function wait(leftMs: number): string {
  const days = Math.floor(leftMs / DAY_MS);
  return days > 0 ? `${days} d ${formatCountdown(leftMs - days * DAY_MS)}` : formatCountdown(leftMs);
}
