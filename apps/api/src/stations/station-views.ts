/** What the wire shows of stations and antennas, and what an antenna still lacks. */
import type { Antenna, AntennaBand, Blackout, PriceCard, Station, WeeklyRule } from '@skyberth/shared';
import type { BandRow, BlackoutRow, PriceCardRow, WholeAntenna } from './antennas.repository.js';
import type { OwnedStation } from './stations.repository.js';

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

/** Sentences; empty when the antenna can be sold. */
export function missingOf({ station, bands, mask, rules, price }: WholeAntenna): string[] {
  return [
    ...(bands.length === 0 ? ['Add at least one band.'] : []),
    ...(mask === null ? ['Publish the horizon mask of this antenna; a flat one is fine where the horizon is.'] : []),
    ...(rules.length === 0 ? ['Say when the antenna is open.'] : []),
    ...(price === null ? [`Set a price in ${station.currency}.`] : []),
    ...(station.state === 'approved' ? [] : [APPROVAL[station.state]]),
  ];
}

const APPROVAL: Readonly<Record<Exclude<OwnedStation['state'], 'approved'>, string>> = {
  draft: 'Ask for approval of the station.',
  waiting: 'The station waits for approval.',
  refused: 'The station was refused; read why, mend it, and ask again.',
  suspended: 'The station is suspended.',
};

/** The mask in force; without one, the lowest elevation all round, which an antenna on sale never relies on. */
export const maskPointsOf = ({ mask, antenna }: WholeAntenna): [number, number][] =>
  mask?.points ?? [[0, antenna.lowestReceiveDeg]];

export const bandView = ({ antennaId: _antennaId, ...band }: BandRow): AntennaBand => ({
  ...band,
  band: band.band as AntennaBand['band'],
  polarisations: band.polarisations as AntennaBand['polarisations'],
});

export const ruleView = ({ days, fromLocal, toLocal }: WeeklyRule): WeeklyRule => ({ days, fromLocal, toLocal });

export const blackoutView = (row: BlackoutRow): Blackout => ({
  id: row.id,
  antennaId: row.antennaId,
  fromUtc: utc(row.fromMs),
  toUtc: utc(row.toMs),
  reason: row.reason,
  note: row.note,
});

export const priceView = (card: PriceCardRow): PriceCard => ({
  id: card.id,
  currency: card.currency,
  perMinuteMinor: card.perMinuteMinor,
  setupMinor: card.setupMinor,
  minimumMinor: card.minimumMinor,
  ...card.terms,
  validFromUtc: utc(card.validFromMs),
});

export function antennaView(whole: WholeAntenna): Antenna {
  const { createdMs: _createdMs, ...antenna } = whole.antenna;
  return {
    ...antenna,
    stationName: whole.station.name,
    mask: maskPointsOf(whole),
    maskReason: whole.mask?.reason ?? '',
    bands: whole.bands.map(bandView),
    availability: whole.rules.map(ruleView),
    blackouts: whole.blackouts.map(blackoutView),
    price: whole.price && priceView(whole.price),
    missing: missingOf(whole),
  };
}

export function stationView(station: OwnedStation, antennas: readonly WholeAntenna[]): Station {
  const { organisationId: _organisationId, createdMs: _createdMs, ...rest } = station;
  return {
    ...rest,
    antennas: antennas.map((whole) => ({
      id: whole.antenna.id,
      name: whole.antenna.name,
      state: whole.antenna.state,
      diameterM: whole.antenna.diameterM,
      bands: [...new Set(whole.bands.map((band) => band.band))],
      missing: missingOf(whole),
    })),
  };
}
