/** Spacecraft, radios and every element set ever given. */
import { sql } from 'drizzle-orm';
import { check, index, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { id, ms } from './columns.js';

export const spacecraft = sqliteTable(
  'spacecraft',
  {
    id: id(),
    organisationId: text('organisation_id')
      .notNull()
      .references(() => organisations.id),
    name: text('name').notNull(),
    shortName: text('short_name').notNull(),
    catalogNumber: ms('catalog_number'),
    internationalDesignator: text('international_designator'),
    state: text('state').$type<'active' | 'retired'>().notNull(),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    uniqueIndex('spacecraft_name').on(t.organisationId, sql`lower(${t.name})`),
    uniqueIndex('spacecraft_number').on(t.organisationId, t.catalogNumber),
    check('spacecraft_state', sql`${t.state} IN ('active','retired')`),
    check('spacecraft_number_range', sql`${t.catalogNumber} IS NULL OR ${t.catalogNumber} BETWEEN 1 AND 999999999`),
  ],
);

export const radios = sqliteTable(
  'radios',
  {
    id: id(),
    spacecraftId: text('spacecraft_id')
      .notNull()
      .references(() => spacecraft.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    direction: text('direction').$type<'downlink' | 'uplink'>().notNull(),
    band: text('band').notNull(),
    centreFrequencyMhz: real('centre_frequency_mhz').notNull(),
    bandwidthKhz: real('bandwidth_khz').notNull(),
    polarisation: text('polarisation').notNull(),
    modulation: text('modulation').notNull(),
    coding: text('coding').notNull(),
    dataRateBps: ms('data_rate_bps').notNull(),
    eirpDbw: real('eirp_dbw'),
    requiredEbN0Db: real('required_eb_n0_db'),
    requiredEirpDbw: real('required_eirp_dbw'),
    pointingLossDb: real('pointing_loss_db').notNull(),
  },
  (t) => [
    index('radios_spacecraft').on(t.spacecraftId),
    check('radios_direction', sql`${t.direction} IN ('downlink','uplink')`),
    check('radios_positive', sql`${t.centreFrequencyMhz} > 0 AND ${t.bandwidthKhz} > 0 AND ${t.dataRateBps} > 0`),
  ],
);

export const elementSets = sqliteTable(
  'element_sets',
  {
    id: id(),
    spacecraftId: text('spacecraft_id')
      .notNull()
      .references(() => spacecraft.id),
    /** Exact text of the epoch; epochMs is its rounding for sorting. */
    epochUtc: text('epoch_utc').notNull(),
    epochMs: real('epoch_ms').notNull(),
    format: text('format').$type<'tle' | 'omm-kvn' | 'omm-xml' | 'omm-json' | 'omm-csv'>().notNull(),
    /** The parsed set as canonical JSON, without loss. */
    elements: text('elements').notNull(),
    digest: text('digest').notNull(),
    source: text('source').notNull(),
    addedBy: text('added_by').references(() => people.id),
    addedMs: ms('added_ms').notNull(),
  },
  (t) => [
    uniqueIndex('element_sets_digest').on(t.spacecraftId, t.digest),
    index('element_sets_epoch').on(t.spacecraftId, t.epochMs),
  ],
);
