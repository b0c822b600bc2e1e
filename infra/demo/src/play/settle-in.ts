/** The first day: staff take their seats, owners describe their stations, operators bring their spacecraft. */
import { routes } from '@skyberth/shared';
import { type CastOperator, type CastSpacecraft, OPERATORS } from '../cast/operators.js';
import {
  bandsOf,
  type CastAntenna,
  type CastOwner,
  type CastPerson,
  type CastStation,
  maskOf,
  OWNERS,
} from '../cast/owners.js';
import { type Actor, actor, PASSWORD } from './client.js';
import { STAFF, type Stage } from './stage.js';

export interface PlayOwner {
  readonly cast: CastOwner;
  readonly manager: Actor;
}
export interface PlaySpacecraft {
  readonly cast: CastSpacecraft;
  readonly id: string;
}
export interface PlayOperator {
  readonly cast: CastOperator;
  readonly manager: Actor;
  readonly spacecraft: readonly PlaySpacecraft[];
}
export interface Company {
  readonly admin: Actor;
  readonly finance: Actor;
  readonly owners: readonly PlayOwner[];
  readonly operators: readonly PlayOperator[];
  /** Owner's manager by antenna id. */
  readonly ownerOf: ReadonlyMap<string, Actor>;
}

/** Everybody signs up; afterwards the market is open. */
export async function settleIn(stage: Stage, say: (text: string) => void): Promise<Company> {
  await stage.settle();
  const admin = await comeByInvitation(stage, 'Ruth Okello', STAFF.admin);
  const finance = await comeByInvitation(stage, 'Ansel Brook', STAFF.finance);
  const ownerOf = new Map<string, Actor>();
  const owners: PlayOwner[] = [];
  for (const cast of OWNERS) {
    say(`${cast.name} lists its antennas`);
    const manager = await signUp(stage, cast, 'owner');
    for (const station of cast.stations) {
      for (const antennaId of await listStation(stage, manager, admin, station)) ownerOf.set(antennaId, manager);
    }
    owners.push({ cast, manager });
  }
  const operators: PlayOperator[] = [];
  for (const cast of OPERATORS) {
    say(`${cast.name} brings ${cast.spacecraft.length} spacecraft`);
    const manager = await signUp(stage, cast, 'operator');
    const spacecraft: PlaySpacecraft[] = [];
    for (const one of cast.spacecraft) spacecraft.push({ cast: one, id: await addSpacecraft(stage, manager, one) });
    operators.push({ cast, manager, spacecraft });
  }
  return { admin, finance, owners, operators, ownerOf };
}

export async function comeByInvitation(stage: Stage, name: string, email: string): Promise<Actor> {
  const person = actor(name, email);
  await stage.call(null, routes.setPassword, { body: { token: await stage.mailedToken(email), password: PASSWORD } });
  await stage.call(person, routes.signIn, { body: { email, password: PASSWORD } });
  return person;
}

type Organisation = Pick<CastOwner, 'name' | 'address' | 'people'>;

async function signUp(stage: Stage, cast: Organisation, kind: 'operator' | 'owner'): Promise<Actor> {
  const [first, ...others] = cast.people as readonly [CastPerson, ...CastPerson[]];
  const manager = actor(first.name, first.email);
  await stage.call(manager, routes.signUp, {
    body: {
      name: first.name,
      email: first.email,
      password: PASSWORD,
      organisation: { name: cast.name, kind, address: { ...cast.address, line2: '' }, vatNumber: null },
    },
  });
  await stage.call(null, routes.verifyEmail, { body: { token: await stage.mailedToken(first.email) } });
  for (const { name, email, role } of others) {
    await stage.call(manager, routes.inviteMember, { body: { name, email, role } });
    await comeByInvitation(stage, name, email);
  }
  return manager;
}

async function listStation(stage: Stage, manager: Actor, admin: Actor, cast: CastStation): Promise<string[]> {
  const { antennas, approval, ...place } = cast;
  const contact = { contactName: manager.name, contactPhone: '' };
  const station = await stage.call(manager, routes.createStation, { body: { ...place, ...contact } });
  const ids: string[] = [];
  for (const antenna of antennas) ids.push(await listAntenna(stage, manager, station.id, antenna));
  const params = { id: station.id };
  if (approval !== 'draft') await stage.call(manager, routes.submitStation, { params });
  if (approval === 'approved') {
    await stage.call(admin, routes.decideStation, {
      params,
      body: { decision: 'approve', note: 'Licence papers seen; position checked against the survey.' },
    });
  }
  if (approval === 'refused') {
    await stage.call(admin, routes.decideStation, {
      params,
      body: { decision: 'refuse', note: 'The earth station licence for the island is missing. Send it and ask again.' },
    });
  }
  for (const id of ids)
    if (approval === 'approved')
      await stage.call(manager, routes.putOnSale, { params: { id }, body: { onSale: true } });
  return ids;
}

async function listAntenna(stage: Stage, manager: Actor, stationId: string, cast: CastAntenna): Promise<string> {
  const antenna = await stage.call(manager, routes.createAntenna, {
    params: { id: stationId },
    body: {
      name: cast.name,
      diameterM: cast.diameterM,
      mount: 'az-el',
      slewAzimuthDegPerS: cast.slewDegPerS,
      slewElevationDegPerS: cast.slewDegPerS,
      lowestReceiveDeg: 5,
      lowestTransmitDeg: 10,
      setupS: cast.diameterM > 6 ? 120 : 60,
      teardownS: 30,
      beams: 1,
      minNoticeMin: cast.acceptance === 'owner' ? 120 : 20,
      horizonDays: 21,
      minContactS: 120,
      maxContactS: 3_600,
      partsAllowed: true,
      acceptance: cast.acceptance,
      answerWithinMin: 720,
    },
  });
  const params = { id: antenna.id };
  await stage.call(manager, routes.setBands, { params, body: { bands: bandsOf(cast) } });
  await stage.call(manager, routes.setMask, { params, body: { points: maskOf(cast), reason: 'first survey' } });
  const always = [{ days: [1, 2, 3, 4, 5, 6, 7], fromLocal: '00:00', toLocal: '24:00' }];
  const rules = (cast.hours ?? always).map((rule) => ({ ...rule, days: [...rule.days] }));
  await stage.call(manager, routes.setAvailability, { params, body: { rules } });
  await stage.call(manager, routes.setPrice, {
    params,
    body: {
      perMinuteMinor: cast.perMinuteMinor,
      setupMinor: cast.setupMinor,
      minimumMinor: cast.minimumMinor,
      busyHours:
        cast.diameterM > 5 ? [{ days: [1, 2, 3, 4, 5], fromLocal: '17:00', toLocal: '21:00', percent: 20 }] : [],
      shortNotice: { underHours: 2, percent: 10 },
      volume: [{ overMinutesInMonth: 300, percent: 12 }],
      ladder: [
        { hoursBeforeAos: 24, refundPercent: 100 },
        { hoursBeforeAos: 4, refundPercent: 60 },
        { hoursBeforeAos: 1, refundPercent: 25 },
        { hoursBeforeAos: 0, refundPercent: 0 },
      ],
    },
  });
  return antenna.id;
}

const RADIOS = {
  S: {
    name: 'Telemetry',
    direction: 'downlink',
    band: 'S',
    centreFrequencyMhz: 2214,
    bandwidthKhz: 2_000,
    polarisation: 'right',
    modulation: 'OQPSK',
    coding: 'CCSDS convolutional 1/2',
    dataRateBps: 1_000_000,
    eirpDbw: 0,
    requiredEbN0Db: 4.5,
    requiredEirpDbw: null,
    pointingLossDb: 1,
  },
  X: {
    name: 'Payload',
    direction: 'downlink',
    band: 'X',
    centreFrequencyMhz: 8212.5,
    bandwidthKhz: 150_000,
    polarisation: 'right',
    modulation: 'OQPSK',
    coding: 'CCSDS LDPC 7/8',
    dataRateBps: 225_000_000,
    eirpDbw: 15,
    requiredEbN0Db: 4.2,
    requiredEirpDbw: null,
    pointingLossDb: 0.5,
  },
  UHF: {
    name: 'Beacon',
    direction: 'downlink',
    band: 'UHF',
    centreFrequencyMhz: 401.2,
    bandwidthKhz: 25,
    polarisation: 'right',
    modulation: 'GMSK',
    coding: 'none',
    dataRateBps: 9_600,
    eirpDbw: 1,
    requiredEbN0Db: 9.6,
    requiredEirpDbw: null,
    pointingLossDb: 2,
  },
  'S up': {
    name: 'Command',
    direction: 'uplink',
    band: 'S',
    centreFrequencyMhz: 2067,
    bandwidthKhz: 500,
    polarisation: 'right',
    modulation: 'BPSK',
    coding: 'BCH',
    dataRateBps: 16_000,
    eirpDbw: null,
    requiredEbN0Db: null,
    requiredEirpDbw: 38,
    pointingLossDb: 1,
  },
} as const;

async function addSpacecraft(stage: Stage, manager: Actor, cast: CastSpacecraft): Promise<string> {
  const { name, shortName, catalogNumber } = cast;
  const added = await stage.call(manager, routes.createSpacecraft, {
    body: {
      name,
      shortName,
      catalogNumber,
      internationalDesignator: '2026-001A',
      radios: cast.radios.map((radio) => RADIOS[radio]),
    },
  });
  return added.id;
}
