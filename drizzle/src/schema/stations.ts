/** Stations, antennas and all that bounds what an antenna can sell. */
import { sql } from 'drizzle-orm';
import { check, index, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { flag, id, json, minor, ms } from './columns.js';

export const stations = sqliteTable(
  'stations',
  {
    id: id(),
    organisationId: text('organisation_id')
      .notNull()
      .references(() => organisations.id),
    name: text('name').notNull(),
    latitudeDeg: real('latitude_deg').notNull(),
    longitudeDeg: real('longitude_deg').notNull(),
    altitudeM: real('altitude_m').notNull(),
    country: text('country').notNull(),
    timeZone: text('time_zone').notNull(),
    currency: text('currency').notNull(),
    description: text('description').notNull(),
    contactName: text('contact_name').notNull(),
    contactPhone: text('contact_phone').notNull(),
    state: text('state').$type<'draft' | 'waiting' | 'approved' | 'refused' | 'suspended'>().notNull(),
    stateNote: text('state_note').notNull(),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    index('stations_organisation').on(t.organisationId),
    uniqueIndex('stations_name').on(t.organisationId, sql`lower(${t.name})`),
    check('stations_state', sql`${t.state} IN ('draft','waiting','approved','refused','suspended')`),
    check('stations_place', sql`${t.latitudeDeg} BETWEEN -90 AND 90 AND ${t.longitudeDeg} BETWEEN -180 AND 180`),
  ],
);

export const antennas = sqliteTable(
  'antennas',
  {
    id: id(),
    stationId: text('station_id')
      .notNull()
      .references(() => stations.id),
    name: text('name').notNull(),
    diameterM: real('diameter_m').notNull(),
    mount: text('mount').$type<'az-el' | 'x-y' | 'tilted az-el'>().notNull(),
    tiltDeg: real('tilt_deg').notNull(),
    slewAzimuthDegPerS: real('slew_azimuth_deg_per_s').notNull(),
    slewElevationDegPerS: real('slew_elevation_deg_per_s').notNull(),
    lowestReceiveDeg: real('lowest_receive_deg').notNull(),
    lowestTransmitDeg: real('lowest_transmit_deg').notNull(),
    setupS: ms('setup_s').notNull(),
    teardownS: ms('teardown_s').notNull(),
    beams: ms('beams').notNull(),
    minNoticeMin: ms('min_notice_min').notNull(),
    horizonDays: ms('horizon_days').notNull(),
    minContactS: ms('min_contact_s').notNull(),
    maxContactS: ms('max_contact_s').notNull(),
    partsAllowed: flag('parts_allowed').notNull(),
    acceptance: text('acceptance').$type<'instant' | 'owner'>().notNull(),
    answerWithinMin: ms('answer_within_min').notNull(),
    state: text('state').$type<'draft' | 'on sale' | 'paused'>().notNull(),
    version: ms('version').notNull(),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    uniqueIndex('antennas_name').on(t.stationId, sql`lower(${t.name})`),
    check('antennas_state', sql`${t.state} IN ('draft','on sale','paused')`),
    check('antennas_acceptance', sql`${t.acceptance} IN ('instant','owner')`),
    check(
      'antennas_times',
      sql`${t.setupS} >= 0 AND ${t.teardownS} >= 0 AND ${t.beams} BETWEEN 1 AND 8 AND ${t.minContactS} <= ${t.maxContactS}`,
    ),
  ],
);

export const antennaBands = sqliteTable(
  'antenna_bands',
  {
    id: id(),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id, { onDelete: 'cascade' }),
    direction: text('direction').$type<'receive' | 'transmit'>().notNull(),
    band: text('band').notNull(),
    fromMhz: real('from_mhz').notNull(),
    toMhz: real('to_mhz').notNull(),
    polarisations: json<string[]>('polarisations').notNull(),
    gOverTDbK: real('g_over_t_db_k'),
    eirpDbw: real('eirp_dbw'),
    lowestElevationDeg: real('lowest_elevation_deg'),
  },
  (t) => [
    index('antenna_bands_antenna').on(t.antennaId),
    check('antenna_bands_range', sql`${t.toMhz} > ${t.fromMhz} AND ${t.fromMhz} > 0`),
    check(
      'antenna_bands_figure',
      sql`(${t.direction} = 'receive' AND ${t.gOverTDbK} IS NOT NULL) OR (${t.direction} = 'transmit' AND ${t.eirpDbw} IS NOT NULL)`,
    ),
  ],
);

/** Published masks; the highest version is in force, the others are history. */
export const antennaMasks = sqliteTable(
  'antenna_masks',
  {
    id: id(),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id),
    version: ms('version').notNull(),
    points: json<[number, number][]>('points').notNull(),
    reason: text('reason').notNull(),
    publishedBy: text('published_by').references(() => people.id),
    publishedMs: ms('published_ms').notNull(),
  },
  (t) => [uniqueIndex('antenna_masks_version').on(t.antennaId, t.version)],
);

/** Weekly opening hours in the station's zone, one row a rule. */
export const availabilityRules = sqliteTable(
  'availability_rules',
  {
    id: id(),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id, { onDelete: 'cascade' }),
    days: json<number[]>('days').notNull(),
    fromLocal: text('from_local').notNull(),
    toLocal: text('to_local').notNull(),
  },
  (t) => [index('availability_rules_antenna').on(t.antennaId)],
);

export const blackouts = sqliteTable(
  'blackouts',
  {
    id: id(),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id),
    fromMs: ms('from_ms').notNull(),
    toMs: ms('to_ms').notNull(),
    reason: text('reason').notNull(),
    note: text('note').notNull(),
    createdBy: text('created_by').references(() => people.id),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [index('blackouts_antenna').on(t.antennaId, t.fromMs), check('blackouts_order', sql`${t.toMs} > ${t.fromMs}`)],
);

export interface PriceTerms {
  busyHours: { days: number[]; fromLocal: string; toLocal: string; percent: number }[];
  shortNotice: { underHours: number; percent: number } | null;
  volume: { overMinutesInMonth: number; percent: number }[];
  ladder: { hoursBeforeAos: number; refundPercent: number }[];
}

/** Price cards never change; a new one is valid from its own instant. */
export const priceCards = sqliteTable(
  'price_cards',
  {
    id: id(),
    antennaId: text('antenna_id')
      .notNull()
      .references(() => antennas.id),
    currency: text('currency').notNull(),
    perMinuteMinor: minor('per_minute_minor').notNull(),
    setupMinor: minor('setup_minor').notNull(),
    minimumMinor: minor('minimum_minor').notNull(),
    terms: json<PriceTerms>('terms').notNull(),
    validFromMs: ms('valid_from_ms').notNull(),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    index('price_cards_antenna').on(t.antennaId, t.validFromMs),
    check('price_cards_positive', sql`${t.perMinuteMinor} >= 0 AND ${t.setupMinor} >= 0 AND ${t.minimumMinor} >= 0`),
  ],
);
