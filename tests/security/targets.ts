/** Things of two organisations that nobody else may reach: made through the API, a sold contact straight in the database. */
import { randomUUID } from 'node:crypto';
import { routes } from '@skyberth/shared';
import { addDispute } from '../api/harness/dispute.js';
import { addGroupAndPlace } from '../api/harness/line.js';
import { RADIO } from '../api/harness/shop.js';
import { addSoldContact } from '../api/harness/sold-contact.js';
import { antennaOnSale } from '../api/harness/stations.js';
import { tleText } from '../api/harness/tle.js';
import { must, type Person, type Skyberth } from '../api/harness.js';
import type { Targets } from './wishes.js';

export async function makeTargets(skyberth: Skyberth): Promise<Targets> {
  const { call, people, clock } = skyberth;
  const [operator, owner] = [await people.operator(), await people.owner()];
  const { station, antenna } = await antennaOnSale(skyberth, owner);
  const text = tleText({ name: 'WHIMBREL 4', catalogNumber: 90_004, epochMs: clock.nowMs() - 3_600_000 });
  const saved = await must(call(routes.saveElements, { body: { text }, as: operator }));
  const spacecraft = saved.spacecraft[0]?.id ?? '';
  const fromUtc = new Date(clock.nowMs() + 86_400_000).toISOString();
  const toUtc = new Date(clock.nowMs() + 90_000_000).toISOString();
  const body = { fromUtc, toUtc, reason: 'weather' } as const;
  const { blackout } = await must(call(routes.addBlackout, { params: { id: antenna.id }, body, as: owner }));
  const { booking, invoice } = addSoldContact(skyberth, {
    id: randomUUID(),
    operator,
    owner,
    antennaId: antenna.id,
    spacecraftId: spacecraft,
    aosMs: clock.nowMs() + 100_000_000,
  });
  const visit = await must(call(routes.enterDish, { params: { id: antenna.id }, body: { name: 'Sam' }, as: owner }));
  const paper = { query: { name: 'licence.pdf' }, body: Buffer.from('%PDF-1.7 paper'), as: operator };
  const file = await must(call(routes.uploadFile, paper));
  const dispute = addDispute(skyberth, { operator, owner, antennaId: antenna.id, spacecraftId: spacecraft });
  const need = {
    name: 'A day',
    firstDay: new Date(clock.nowMs() + 2 * 86_400_000).toISOString().slice(0, 10),
    days: 1,
    craft: [{ spacecraftId: spacecraft, contactsPerDay: 1 }],
    currency: { kind: 'one' as const, currency: 'EUR' },
  };
  const plan = await must(call(routes.createPlan, { body: need, as: operator }));
  const line = addGroupAndPlace(skyberth, { operator, antennaId: antenna.id, spacecraftId: spacecraft });
  const keyBody = { name: 'Console', scopes: ['bookings.read' as const] };
  const { apiKey } = await must(call(routes.makeApiKey, { body: keyBody, as: operator }));
  const { feed } = await must(call(routes.makeCalendarFeed, { body: {}, as: operator }));
  return {
    ...line,
    apiKey: apiKey.id,
    feed: feed.id,
    dispute,
    plan: plan.id,
    spacecraft,
    station: station.id,
    antenna: antenna.id,
    blackout: blackout.id,
    booking,
    invoice,
    visit: visit.id,
    file: file.id,
    clearance: await askForClearance(skyberth, {
      operator,
      spacecraftId: spacecraft,
      stationId: station.id,
      fileId: file.id,
    }),
    member: operator.personId,
    organisation: operator.organisationId,
  };
}

/** A request for leave to transmit to a spacecraft that gets the uplink radio it takes. */
async function askForClearance(
  { call, clock }: Skyberth,
  ask: { operator: Person; spacecraftId: string; stationId: string; fileId: string },
): Promise<string> {
  const { operator, spacecraftId, stationId, fileId } = ask;
  const uplink = { ...RADIO, direction: 'uplink' as const, centreFrequencyMhz: 2_067, eirpDbw: null };
  const radios = [{ ...uplink, requiredEbN0Db: null, requiredEirpDbw: 40 }];
  const params = { id: spacecraftId };
  const { name, shortName, catalogNumber } = await must(call(routes.getSpacecraft, { params, as: operator }));
  const body = { name, shortName, catalogNumber, radios };
  await must(call(routes.updateSpacecraft, { params, body, as: operator }));
  const [validFromUtc, validToUtc] = [0, 30].map((days) => new Date(clock.nowMs() + days * 86_400_000).toISOString());
  const wish = {
    spacecraftId,
    stationId,
    band: 'S' as const,
    validFromUtc: validFromUtc ?? '',
    validToUtc: validToUtc ?? '',
  };
  const asked = { ...wish, purpose: 'Commands.', fileIds: [fileId] };
  return (await must(call(routes.requestClearance, { body: asked, as: operator }))).id;
}
