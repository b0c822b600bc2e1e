/** Stations and antennas of a test, made through the API as their owner would. */
import { type Antenna, type BodyInput, routes, type Station } from '@skyberth/shared';
import type { Skyberth } from '../harness.js';
import { must } from './client.js';
import type { Person } from './people.js';

type StationBody = BodyInput<typeof routes.createStation>;
type AntennaBody = BodyInput<typeof routes.createAntenna>;

/** An invented place on a plateau in the north. */
export const STATION: StationBody = {
  name: 'Tern Rock',
  latitudeDeg: 69.66,
  longitudeDeg: 18.94,
  altitudeM: 120,
  country: 'NO',
  timeZone: 'Europe/Oslo',
  currency: 'EUR',
};

/** Receives at S and X band, sends at S band, sells parts at once. */
export const ANTENNA: AntennaBody = {
  name: 'North dish',
  diameterM: 7.3,
  mount: 'az-el',
  slewAzimuthDegPerS: 10,
  slewElevationDegPerS: 5,
  lowestReceiveDeg: 5,
  lowestTransmitDeg: 10,
  setupS: 120,
  teardownS: 60,
  beams: 1,
  minNoticeMin: 30,
  horizonDays: 30,
  minContactS: 120,
  maxContactS: 1_800,
  partsAllowed: true,
  acceptance: 'instant',
  answerWithinMin: 720,
};

export const BANDS: BodyInput<typeof routes.setBands>['bands'] = [
  {
    direction: 'receive',
    band: 'S',
    fromMhz: 2_200,
    toMhz: 2_300,
    polarisations: ['right', 'left'],
    gOverTDbK: 18.5,
    eirpDbw: null,
  },
  {
    direction: 'receive',
    band: 'X',
    fromMhz: 8_025,
    toMhz: 8_400,
    polarisations: ['right'],
    gOverTDbK: 31,
    eirpDbw: null,
  },
  {
    direction: 'transmit',
    band: 'S',
    fromMhz: 2_025,
    toMhz: 2_110,
    polarisations: ['right'],
    gOverTDbK: null,
    eirpDbw: 55,
  },
];

export const ALWAYS: BodyInput<typeof routes.setAvailability>['rules'] = [
  { days: [1, 2, 3, 4, 5, 6, 7], fromLocal: '00:00', toLocal: '24:00' },
];

export const PRICE: BodyInput<typeof routes.setPrice> = {
  perMinuteMinor: 560,
  setupMinor: 1_200,
  minimumMinor: 2_500,
  ladder: [
    { hoursBeforeAos: 72, refundPercent: 100 },
    { hoursBeforeAos: 24, refundPercent: 50 },
    { hoursBeforeAos: 2, refundPercent: 0 },
  ],
};

/** A mask with a hill in the south, as an owner would survey it. */
export const MASK: [number, number][] = [
  [0, 5],
  [90, 5],
  [150, 12],
  [210, 12],
  [270, 5],
];

export interface SaleOptions {
  readonly station?: Partial<StationBody>;
  readonly antenna?: Partial<AntennaBody>;
  readonly bands?: BodyInput<typeof routes.setBands>['bands'];
  readonly mask?: [number, number][];
  readonly rules?: BodyInput<typeof routes.setAvailability>['rules'];
  readonly price?: Partial<BodyInput<typeof routes.setPrice>>;
}

/** As much of a running server as it takes to put an antenna on sale. */
type Marketplace = Pick<Skyberth, 'call'> & {
  readonly people: { staff(role: 'admin'): Promise<Pick<Person, 'jar'>> };
};

/** An approved station with one antenna on sale. */
export async function antennaOnSale(
  skyberth: Marketplace,
  owner: Pick<Person, 'jar'>,
  options: SaleOptions = {},
): Promise<{ station: Station; antenna: Antenna }> {
  const { call } = skyberth;
  const station = await must(call(routes.createStation, { body: { ...STATION, ...options.station }, as: owner }));
  const ofStation = { id: station.id };
  await must(call(routes.submitStation, { params: ofStation, as: owner }));
  const admin = await skyberth.people.staff('admin');
  const decision = { decision: 'approve', note: 'Papers seen.' } as const;
  const approved = await must(call(routes.decideStation, { params: ofStation, body: decision, as: admin }));
  const body = { ...ANTENNA, ...options.antenna };
  const { id } = await must(call(routes.createAntenna, { params: ofStation, body, as: owner }));
  const params = { id };
  await must(call(routes.setBands, { params, body: { bands: options.bands ?? BANDS }, as: owner }));
  await must(call(routes.setMask, { params, body: { points: options.mask ?? MASK }, as: owner }));
  await must(call(routes.setAvailability, { params, body: { rules: options.rules ?? ALWAYS }, as: owner }));
  await must(call(routes.setPrice, { params, body: { ...PRICE, ...options.price }, as: owner }));
  return {
    station: approved,
    antenna: await must(call(routes.putOnSale, { params, body: { onSale: true }, as: owner })),
  };
}
