/** Leave to transmit: asked for on the first day, used for uplinks, and some of it in every other state. */
import { type Clearance, type Need, routes } from '@skyberth/shared';
import { paperOf } from '../cast/paper.js';
import type { Actor } from './client.js';
import { type Season, utc } from './days.js';
import type { Company, PlayOperator } from './settle-in.js';
import type { Stage } from './stage.js';

const DAY_MS = 86_400_000;
const BAND = 'S';

interface Ask {
  /** Place in the operator's fleet. */
  readonly craft: number;
  readonly station: string;
  readonly fromMs: number;
  readonly days: number;
}

/** An uplink that was bought and will have to be reported. */
export interface BoughtUplink {
  readonly bookingId: string;
  readonly owner: Actor;
}

/** The first day: three spacecraft may be commanded, and one paper was good for a day only. */
export async function clearFleet(stage: Stage, company: Company): Promise<void> {
  const fromMs = stage.nowMs();
  for (const [craft, station] of [
    [0, 'Hollenvik'],
    [1, 'Hollenvik'],
    [0, 'Kestle Bay'],
  ] as const) {
    await putInForce(stage, company, { craft, station, fromMs, days: 540 });
  }
  await putInForce(stage, company, { craft: 2, station: 'Tarnwick', fromMs, days: 1 });
}

/** Buys up to `count` passes with commanding and telemetry in a period. */
export async function buyUplinks(
  stage: Stage,
  company: Company,
  season: Season,
  wish: { fromMs: number; toMs: number; count: number },
): Promise<BoughtUplink[]> {
  const operator = commander(company);
  const need: Need = 'both';
  const spacecraftIds = operator.spacecraft.slice(0, 2).map(({ id }) => id);
  const period = { fromUtc: utc(wish.fromMs), toUtc: utc(wish.toMs) };
  const { passes } = await stage.call(operator.manager, routes.searchPasses, {
    body: { spacecraftIds, need, bands: [BAND], ...period, lowestElevationDeg: 12, shortestS: 180 },
  });
  const bought: BoughtUplink[] = [];
  for (const pass of passes) {
    const [part] = pass.parts;
    if (!part || bought.length === wish.count) continue;
    const { antennaId, spacecraftId } = pass;
    const berth = { antennaId, spacecraftId, need, bands: [BAND], aosUtc: part.aosUtc, losUtc: part.losUtc };
    const { quote } = await stage.call(operator.manager, routes.passDetail, { body: berth });
    const owner = company.ownerOf.get(antennaId);
    if (!quote || !owner) continue;
    const body = { ...berth, expectedToPayMinor: quote.toPayMinor };
    const { id } = await stage.call(operator.manager, routes.holdBerth, { body });
    await season.pay(operator, id);
    await stage.settle();
    const booking = await stage.call(owner, routes.getBooking, { params: { id } });
    if (booking.state === 'awaiting owner') await stage.call(owner, routes.acceptBooking, { params: { id } });
    bought.push({ bookingId: id, owner });
  }
  return bought;
}

/** The stations say how the commanding went. */
export async function reportUplinks(stage: Stage, bought: readonly BoughtUplink[]): Promise<void> {
  for (const { bookingId, owner } of bought) {
    const params = { id: bookingId };
    const booking = await stage.call(owner, routes.getBooking, { params });
    if (booking.state !== 'reporting') continue;
    const body = {
      outcome: 'good' as const,
      cause: 'none' as const,
      acquiredUtc: utc(Date.parse(booking.aosUtc) + 4_000),
      lostUtc: utc(Date.parse(booking.losUtc) - 2_000),
      receivedBytes: 41_000_000,
      ebN0Db: 11.4,
      note: 'Command load taken; carrier dropped at 10 degrees.',
    };
    await stage.call(owner, routes.reportContact, { params, body });
  }
}

/** The present: one in each other state, and one that ends within the week. */
export async function leaveClearancesOpen(stage: Stage, company: Company): Promise<void> {
  const fromMs = stage.nowMs();
  await ask(stage, company, { craft: 3, station: 'Tarnwick', fromMs, days: 365 });
  const granted = await ask(stage, company, { craft: 4, station: 'Hollenvik', fromMs, days: 365 });
  await grant(stage, company, granted);
  const refused = await ask(stage, company, { craft: 5, station: 'Kestle Bay', fromMs, days: 365 });
  await stage.call(ownerOf(company, refused.stationName), routes.answerClearance, {
    params: { id: refused.id },
    body: { answer: 'refuse', reason: 'The coordination letter names another site. Send the one for Kestle Bay.' },
  });
  await putInForce(stage, company, { craft: 1, station: 'Tarnwick', fromMs, days: 6 });
  const { id } = await putInForce(stage, company, { craft: 2, station: 'Hollenvik', fromMs, days: 200 });
  await stage.call(commander(company).manager, routes.withdrawClearance, {
    params: { id },
    body: { reason: 'The command receiver was retuned; new papers follow.' },
  });
  await stage.settle();
}

/** The first operator flies spacecraft that can be commanded. */
function commander(company: Company): PlayOperator {
  const [operator] = company.operators;
  if (!operator) throw new Error('Nobody flies anything.');
  return operator;
}

function ownerOf(company: Company, station: string): Actor {
  const owner = company.owners.find(({ cast }) => cast.stations.some(({ name }) => name === station));
  if (!owner) throw new Error(`Nobody owns ${station}.`);
  return owner.manager;
}

async function putInForce(stage: Stage, company: Company, wish: Ask): Promise<Clearance> {
  const asked = await ask(stage, company, wish);
  await grant(stage, company, asked);
  const params = { id: asked.id };
  return await stage.call(company.admin, routes.checkClearance, { params, body: { answer: 'put in force' } });
}

async function grant(stage: Stage, company: Company, { id, stationName }: Clearance): Promise<void> {
  const conditions = 'At most 46 dBW, never below 10 degrees, and no carrier while the fence gate is open.';
  const body = { answer: 'grant' as const, conditions };
  await stage.call(ownerOf(company, stationName), routes.answerClearance, { params: { id }, body });
}

async function ask(stage: Stage, company: Company, { craft, station, fromMs, days }: Ask): Promise<Clearance> {
  const { manager, cast, spacecraft } = commander(company);
  const own = spacecraft[craft];
  const { stations } = await stage.call(manager, routes.clearanceChoices, {});
  const place = stations.find(({ name }) => name === station);
  if (!own || !place) throw new Error(`Nothing can be asked of ${station}.`);
  const paper = paperOf([
    'RADIO LICENCE AND COORDINATION (invented for the demo)',
    `Holder: ${cast.name}`,
    `Space station: ${own.cast.name}`,
    `Earth station: ${station}`,
    'Earth to space: 2067.0 MHz, 500 kHz, at most 46 dBW',
    `Valid ${utc(fromMs).slice(0, 10)} to ${utc(fromMs + days * DAY_MS).slice(0, 10)}`,
  ]);
  const file = await stage.call(manager, routes.uploadFile, {
    query: { name: `licence-${own.cast.shortName.toLowerCase()}-${station}.pdf` },
    body: paper,
  });
  return await stage.call(manager, routes.requestClearance, {
    body: {
      spacecraftId: own.id,
      stationId: place.id,
      band: BAND,
      validFromUtc: utc(fromMs),
      validToUtc: utc(fromMs + days * DAY_MS),
      purpose: 'Command loads, time updates and ranging tones, 500 kHz at 2067 MHz.',
      fileIds: [file.id],
    },
  });
}
