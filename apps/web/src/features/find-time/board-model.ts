/** Turns what the market found into what the board draws. Pure. */
import type { BookingSummary, FoundPass, FoundStation, SearchResult } from '@skyberth/shared';
import type {
  BoardBlackout,
  BoardHump,
  BoardStation,
  HumpProfile,
  HumpReason,
  HumpState,
  Interval,
  OthersBlock,
} from '../../drawing/tide-board/tide-board-types.js';
import { formatMoney } from '../../ui/format.js';

export interface BoardModel {
  readonly stations: readonly BoardStation[];
  readonly humps: readonly BoardHump[];
  readonly blackouts: readonly BoardBlackout[];
  readonly others: readonly OthersBlock[];
}

const STATES: Readonly<Record<FoundPass['state'], HumpState>> = {
  'for sale': 'forSale',
  // Dotted with a barred ring: as a whole it cannot be had; its bubble offers the part that can.
  'part for sale': 'notForSale',
  'not for sale': 'notForSale',
  held: 'held',
  asked: 'asked',
  berth: 'berth',
  'under way': 'underWay',
  done: 'done',
};

/** Bookings of the caller tell when a hold ends and which part of a pass was bought; the search result does not. */
export function boardModel(result: SearchResult, bookings: readonly BookingSummary[]): BoardModel {
  const byId = new Map(bookings.map((one) => [one.id, one]));
  const names = new Map(result.spacecraft.map((one) => [one.id, one]));
  return {
    stations: result.stations.map(boardStation),
    humps: result.passes.map((pass) => boardHump(pass, names.get(pass.spacecraftId), byId.get(pass.bookingId ?? ''))),
    blackouts: result.stations.flatMap((station) =>
      station.antennas.flatMap((antenna) =>
        antenna.blackouts.map((one, index) => ({
          ...interval(one),
          id: `${antenna.id} ${index}`,
          rowId: antenna.id,
          reason: one.reason,
        })),
      ),
    ),
    others: result.stations.flatMap((station) =>
      station.antennas.flatMap((antenna) =>
        antenna.taken.map((one, index) => ({ ...interval(one), id: `${antenna.id} ${index}`, rowId: antenna.id })),
      ),
    ),
  };
}

const interval = (one: { fromUtc: string; toUtc: string }): Interval => ({
  fromMs: Date.parse(one.fromUtc),
  toMs: Date.parse(one.toUtc),
});

function boardStation(station: FoundStation): BoardStation {
  return {
    id: station.id,
    name: station.name,
    timeZone: station.timeZone,
    nights: station.nights.map(interval),
    rows: station.antennas.map((antenna) => ({
      id: antenna.id,
      name: antenna.name,
      detail: [
        `${antenna.diameterM.toFixed(1)} m, ${antenna.bands.join(' and ')}`,
        `from ${formatMoney({ amountMinor: antenna.perMinuteMinor, currency: antenna.currency })} a min`,
      ],
    })),
  };
}

function boardHump(
  pass: FoundPass,
  craft: SearchResult['spacecraft'][number] | undefined,
  booking: BookingSummary | undefined,
): BoardHump {
  const { geometry } = pass;
  const price = wholePrice(pass);
  const reason = humpReason(pass);
  const part = booking && bookedPart(pass, booking);
  return {
    id: pass.key,
    rowId: pass.antennaId,
    spacecraftShort: craft?.shortName ?? '?',
    spacecraftName: craft?.name ?? 'Spacecraft',
    aosMs: Date.parse(geometry.aosUtc),
    losMs: Date.parse(geometry.losUtc),
    highestMs: Date.parse(geometry.tcaUtc),
    highestDeg: geometry.maxElevationDeg,
    profile: humpProfile(pass),
    state: pass.state === 'not for sale' && pass.reasons[0]?.code === 'taken' ? 'taken' : STATES[pass.state],
    ...(price ? { priceLabel: formatMoney(price, true), priceText: formatMoney(price) } : {}),
    ...(booking?.holdEndsUtc ? { holdEndsMs: Date.parse(booking.holdEndsUtc) } : {}),
    ...(part ? { part } : {}),
    ...(reason ? { reason } : {}),
  };
}

/** Equal steps from AOS to LOS; a mask that is one number is the same all along. */
export function humpProfile({ geometry, profile }: Pick<FoundPass, 'geometry' | 'profile'>): HumpProfile {
  const { elevationDeg, maskDeg } = profile;
  return {
    fromMs: Date.parse(geometry.aosUtc),
    toMs: Date.parse(geometry.losUtc),
    elevationDeg: Float32Array.from(elevationDeg),
    maskDeg:
      maskDeg.length === 1 ? new Float32Array(elevationDeg.length).fill(maskDeg[0] ?? 0) : Float32Array.from(maskDeg),
  };
}

/** What the whole pass costs, where it is for sale as a whole. */
function wholePrice(pass: FoundPass): { amountMinor: number; currency: string } | null {
  const [part] = pass.parts;
  if (pass.state !== 'for sale' || !part || !pass.currency) return null;
  return { amountMinor: part.totalMinor, currency: pass.currency };
}

function humpReason(pass: FoundPass): HumpReason | null {
  const [first] = pass.reasons;
  if (!first || pass.state === 'for sale' || pass.bookingId) return null;
  return { word: first.word, sentence: first.sentence, refused: pass.state === 'part for sale' };
}

function bookedPart(pass: FoundPass, booking: BookingSummary): Interval | null {
  const isWhole = booking.aosUtc === pass.geometry.aosUtc && booking.losUtc === pass.geometry.losUtc;
  return isWhole ? null : { fromMs: Date.parse(booking.aosUtc), toMs: Date.parse(booking.losUtc) };
}

const HOUR_MS = 3_600_000;

/**
 * The stretch the board opens with: `spanMs` from shortly before now, or around the first pass for sale where there is
 * none in that stretch, so that a search never opens on an empty board while it has something to offer.
 */
export function firstView(humps: readonly BoardHump[], limits: Interval, spanMs: number): Interval {
  const start = { fromMs: limits.fromMs, toMs: Math.min(limits.toMs, limits.fromMs + spanMs) };
  const offered = humps.filter((one) => one.state === 'forSale').toSorted((a, b) => a.aosMs - b.aosMs)[0];
  if (!offered || offered.losMs <= start.toMs) return start;
  const fromMs = Math.max(limits.fromMs, Math.min(offered.aosMs - HOUR_MS / 2, limits.toMs - spanMs));
  return { fromMs, toMs: Math.min(limits.toMs, fromMs + spanMs) };
}

/** The next few passes for sale, soonest first. */
export function nextForSale(passes: readonly FoundPass[], nowMs: number, count: number): FoundPass[] {
  return passes
    .filter((one) => one.state === 'for sale' && Date.parse(one.geometry.aosUtc) > nowMs)
    .toSorted((a, b) => a.geometry.aosUtc.localeCompare(b.geometry.aosUtc))
    .slice(0, count);
}

/** The one currency of everything offered, or null where there are several or none. */
export function soleCurrency(stations: readonly FoundStation[]): string | null {
  const currencies = new Set(stations.flatMap((station) => station.antennas.map((antenna) => antenna.currency)));
  return currencies.size === 1 ? ([...currencies][0] ?? null) : null;
}
