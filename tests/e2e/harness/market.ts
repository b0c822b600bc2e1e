/** A market that is open already, made through the API, for tests whose matter begins at the board. */
import { type Antenna, type BodyInput, routes, type Station } from '@skyberth/shared';
import { must } from '../../api/harness/client.js';
import { antennaOnSale } from '../../api/harness/stations.js';
import { aMinuteAgo, elementSetOf } from './element-sets.js';
import type { Harbour, Signed } from './harbour.js';

type RadioBody = NonNullable<BodyInput<typeof routes.createSpacecraft>['radios']>[number];

const RADIO: RadioBody = {
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

export interface Market {
  readonly owner: Signed;
  readonly station: Station;
  readonly antenna: Antenna;
}

/** An owner with an approved station and one antenna on sale, which confirms at once. */
export async function openMarket(harbour: Harbour): Promise<Market> {
  const owner = await harbour.people.manager('owner', 'Tern Rock Stations');
  return { owner, ...(await antennaOnSale(harbour, owner)) };
}

export interface Buyer extends Signed {
  readonly spacecraftId: string;
  readonly spacecraftName: string;
}

/** An operator with one spacecraft that has elements of now and a radio. */
export async function buyerWithSpacecraft(
  harbour: Harbour,
  organisation: string,
  catalogNumber: number,
): Promise<Buyer> {
  const { call } = harbour;
  const operator = await harbour.people.manager('operator', organisation);
  const name = `Pipit ${catalogNumber}`;
  const body = { name, shortName: `P${catalogNumber % 1000}`, catalogNumber, radios: [RADIO] };
  const { id } = await must(call(routes.createSpacecraft, { body, as: operator }));
  const text = elementSetOf({ name: name.toUpperCase(), catalogNumber, epochMs: aMinuteAgo() });
  await must(call(routes.saveElements, { body: { text, spacecraftId: id }, as: operator }));
  return { ...operator, spacecraftId: id, spacecraftName: name };
}
