/** Things of two organisations that nobody else may reach: made through the API, a sold contact straight in the database. */
import { randomUUID } from 'node:crypto';
import { routes } from '@skyberth/shared';
import { addDispute } from '../api/harness/dispute.js';
import { addSoldContact } from '../api/harness/sold-contact.js';
import { antennaOnSale } from '../api/harness/stations.js';
import { tleText } from '../api/harness/tle.js';
import { must, type Skyberth } from '../api/harness.js';
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
  return {
    dispute,
    spacecraft,
    station: station.id,
    antenna: antenna.id,
    blackout: blackout.id,
    booking,
    invoice,
    visit: visit.id,
    file: file.id,
    member: operator.personId,
    organisation: operator.organisationId,
  };
}
