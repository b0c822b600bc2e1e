/** Everything that is needed to buy a contact: a server with its payment service, a station with time on sale, a spacecraft. */
import { type BodyInput, type Booking, type FoundPass, routes, type Spacecraft } from '@skyberth/shared';
import { type Options, type Skyberth, startSkyberth } from '../harness.js';
import { must } from './client.js';
import { type Payments, startPayments } from './payments.js';
import type { Person } from './people.js';
import { antennaOnSale, type SaleOptions } from './stations.js';

export interface Shop {
  readonly skyberth: Skyberth;
  readonly payments: Payments;
  readonly owner: Person;
  readonly operator: Person;
  readonly antennaId: string;
  readonly spacecraftId: string;
  /** Passes for sale as a whole, soonest first. */
  readonly passes: readonly FoundPass[];
  /** Moves both clocks, the server's and the payment service's, and keeps owner and operator signed in. */
  advance(byMs: number): Promise<void>;
  /** Moves both clocks to this instant, which must be in the future. */
  advanceTo(timeMs: number): Promise<void>;
  /** Outbox and events, until neither has anything left. */
  settle(): Promise<void>;
  booking(id: string, as?: Person): Promise<Booking>;
  hold(pass: FoundPass, as?: Person): Promise<Booking>;
  /** Opens the payment page of a hold; answers its address. */
  openPage(bookingId: string, options?: { saveCard?: boolean; as?: Person }): Promise<string>;
  /** From a pass to a booking that is paid for. */
  buy(pass: FoundPass): Promise<Booking>;
  stop(): Promise<void>;
}

export type HoldWish = BodyInput<typeof routes.holdBerth>;

const DAY_MS = 86_400_000;
export const RADIO: NonNullable<BodyInput<typeof routes.createSpacecraft>['radios']>[number] = {
  name: 'S telemetry',
  direction: 'downlink',
  band: 'S',
  centreFrequencyMhz: 2_245,
  bandwidthKhz: 2_000,
  polarisation: 'right',
  modulation: 'OQPSK',
  coding: 'CCSDS convolutional 1/2',
  dataRateBps: 1_000_000,
  eirpDbw: 0,
  requiredEbN0Db: 4.8,
  requiredEirpDbw: null,
};

/** An element set of an invented polar orbit, with its epoch at `epochMs`, as CCSDS OMM in JSON. */
export const elementsAt = (epochMs: number, catalogNumber: number, meanAnomalyDeg = 0): string =>
  JSON.stringify([
    {
      CCSDS_OMM_VERS: '2.0',
      CREATION_DATE: new Date(epochMs).toISOString().replace('Z', ''),
      ORIGINATOR: 'TEST',
      OBJECT_NAME: `PIPIT ${catalogNumber}`,
      OBJECT_ID: `2026-${String(catalogNumber % 900).padStart(3, '0')}A`,
      CENTER_NAME: 'EARTH',
      REF_FRAME: 'TEME',
      TIME_SYSTEM: 'UTC',
      MEAN_ELEMENT_THEORY: 'SGP4',
      EPOCH: new Date(epochMs).toISOString().replace('Z', ''),
      MEAN_MOTION: 15.05,
      ECCENTRICITY: 0.0008,
      INCLINATION: 97.6,
      RA_OF_ASC_NODE: 120.5,
      ARG_OF_PERICENTER: 90,
      MEAN_ANOMALY: meanAnomalyDeg,
      EPHEMERIS_TYPE: 0,
      CLASSIFICATION_TYPE: 'U',
      NORAD_CAT_ID: catalogNumber,
      ELEMENT_SET_NO: 999,
      REV_AT_EPOCH: 1,
      BSTAR: 0.00002,
      MEAN_MOTION_DOT: 0,
      MEAN_MOTION_DDOT: 0,
    },
  ]);

/** A spacecraft with a radio and elements of now. */
export async function spacecraftWithElements(
  skyberth: Skyberth,
  as: Person,
  catalogNumber: number,
): Promise<Spacecraft> {
  const { call } = skyberth;
  const body = {
    name: `Pipit ${catalogNumber}`,
    shortName: `P${catalogNumber % 1000}`,
    catalogNumber,
    radios: [RADIO],
  };
  const spacecraft = await must(call(routes.createSpacecraft, { body, as }));
  const text = elementsAt(skyberth.clock.nowMs(), catalogNumber, catalogNumber % 360);
  await must(call(routes.saveElements, { body: { text, spacecraftId: spacecraft.id }, as }));
  return spacecraft;
}

/** Whole passes for sale between now and `days` from now. */
export async function passesForSale(
  skyberth: Skyberth,
  wish: { as: Person; spacecraftId: string; days: number },
): Promise<FoundPass[]> {
  const nowMs = skyberth.clock.nowMs();
  const body = {
    spacecraftIds: [wish.spacecraftId],
    fromUtc: new Date(nowMs).toISOString(),
    toUtc: new Date(nowMs + wish.days * DAY_MS).toISOString(),
  };
  const found = await must(skyberth.call(routes.searchPasses, { body, as: wish.as }));
  return found.passes.filter((pass) => pass.state === 'for sale' && pass.parts.length === 1);
}

export interface ShopOptions extends SaleOptions {
  /** How far ahead passes are looked for; six days unless told otherwise. */
  readonly days?: number;
  readonly server?: Options;
  readonly buyer?: { country?: string; vatNumber?: string | null };
}

/** Starts it all; the antenna sells at once and needs half an hour of notice, unless told otherwise. */
export async function openShop(options: ShopOptions = {}): Promise<Shop> {
  const payments = await startPayments();
  const environment = { ...payments.environment, PASS_WORKERS: '0', ...options.server?.environment };
  const skyberth = await startSkyberth({ ...options.server, environment });
  payments.connect(skyberth);
  const owner = await skyberth.people.owner({ country: 'NO' });
  const operator = await skyberth.people.operator(options.buyer ?? {});
  const { antenna } = await antennaOnSale(skyberth, owner, options);
  const spacecraft = await spacecraftWithElements(skyberth, operator, 70_001);
  const passes = await passesForSale(skyberth, { as: operator, spacecraftId: spacecraft.id, days: options.days ?? 6 });
  const settle = async () => {
    for (let round = 0; round < 3; round += 1) {
      await skyberth.drain();
      await payments.settled();
    }
  };
  const advance = async (byMs: number) => {
    skyberth.clock.advance(byMs);
    await payments.hook('clock', { advanceMs: Math.ceil(byMs) });
    // Access ends after a quarter of an hour; a browser would ask for more by itself.
    for (const as of [owner, operator]) await must(skyberth.call(routes.refresh, { as }));
  };
  const hold = async (pass: FoundPass, as = operator) =>
    must(skyberth.call(routes.holdBerth, { body: await wishFor(skyberth, pass, as), as }));
  const booking = (id: string, as = operator) => must(skyberth.call(routes.getBooking, { params: { id }, as }));
  const openPage: Shop['openPage'] = async (id, { saveCard = false, as = operator } = {}) => {
    const body = { savedCardId: null, saveCard };
    const result = await must(skyberth.call(routes.checkout, { params: { id }, body, as }));
    if (result.kind !== 'redirect') throw new Error('The payment page did not open.');
    return result.url;
  };
  return {
    skyberth,
    payments,
    owner,
    operator,
    antennaId: antenna.id,
    spacecraftId: spacecraft.id,
    passes,
    advance,
    advanceTo: (timeMs) => advance(timeMs - skyberth.clock.nowMs()),
    settle,
    booking,
    hold,
    openPage,
    buy: async (pass) => {
      const { id } = await hold(pass);
      await payments.payOnPage(await openPage(id), 'pm_card_visa');
      await settle();
      return booking(id);
    },
    stop: async () => {
      await skyberth.stop();
      await payments.stop();
    },
  };
}

/** The wish that the page would send for the whole pass, with the price that it shows. */
export async function wishFor(skyberth: Skyberth, pass: FoundPass, as: Person): Promise<HoldWish> {
  const [part] = pass.parts;
  if (!part) throw new Error('The pass has nothing for sale.');
  const { antennaId, spacecraftId } = pass;
  const stretch = { antennaId, spacecraftId, need: 'downlink', aosUtc: part.aosUtc, losUtc: part.losUtc } as const;
  const { quote } = await must(skyberth.call(routes.passDetail, { body: stretch, as }));
  if (!quote) throw new Error('The pass has no price.');
  return { ...stretch, expectedToPayMinor: quote.toPayMinor, oldElementsAcknowledged: true };
}
