/** The invented station owners: who they are, where their antennas stand, and what stands on their horizons. */
import type { AntennaBand } from '@skyberth/shared';

export interface CastPerson {
  readonly name: string;
  readonly email: string;
  readonly role: 'manager' | 'member' | 'viewer';
}

export interface CastAddress {
  readonly line1: string;
  readonly postalCode: string;
  readonly city: string;
  readonly country: string;
}

/** A hill, mast or building: from one azimuth to another, so high. */
export interface Obstacle {
  readonly fromDeg: number;
  readonly toDeg: number;
  readonly heightDeg: number;
}

export interface CastAntenna {
  readonly name: string;
  readonly diameterM: number;
  readonly bands: readonly ('S' | 'X' | 'UHF' | 'S transmit')[];
  readonly slewDegPerS: number;
  readonly perMinuteMinor: number;
  readonly setupMinor: number;
  readonly minimumMinor: number;
  readonly acceptance: 'instant' | 'owner';
  readonly groundDeg: number;
  readonly obstacles: readonly Obstacle[];
  /** Station local hours, every day; empty means round the clock. */
  readonly hours?: readonly {
    readonly days: readonly number[];
    readonly fromLocal: string;
    readonly toLocal: string;
  }[];
}

export interface CastStation {
  readonly name: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly altitudeM: number;
  readonly country: string;
  readonly timeZone: string;
  readonly currency: string;
  readonly description: string;
  /** How far it has come: the last ones wait or were refused, so that approvals have something to show. */
  readonly approval: 'approved' | 'waiting' | 'refused' | 'draft';
  readonly antennas: readonly CastAntenna[];
}

export interface CastOwner {
  readonly name: string;
  readonly address: CastAddress;
  readonly people: readonly CastPerson[];
  readonly stations: readonly CastStation[];
}

type BandInput = Omit<AntennaBand, 'id'>;

/** G/T by common practice for the size: gain at 60 % efficiency less a system temperature of 130 K (S), 160 K (X). */
export function bandsOf(antenna: CastAntenna): BandInput[] {
  const gainDbi = (mhz: number) =>
    20 * Math.log10((Math.PI * antenna.diameterM * mhz * 1e6) / 299_792_458) + 10 * Math.log10(0.6);
  const round = (value: number) => Math.round(value * 10) / 10;
  const receive = (band: 'S' | 'X' | 'UHF', fromMhz: number, toMhz: number, noiseK: number): BandInput => ({
    direction: 'receive',
    band,
    fromMhz,
    toMhz,
    polarisations: ['right', 'left'],
    gOverTDbK: round(gainDbi((fromMhz + toMhz) / 2) - 10 * Math.log10(noiseK)),
    eirpDbw: null,
    lowestElevationDeg: null,
  });
  return antenna.bands.map((name) => {
    if (name === 'S') return receive('S', 2200, 2290, 130);
    if (name === 'X') return receive('X', 8025, 8400, 160);
    if (name === 'UHF') return receive('UHF', 400, 450, 350);
    return {
      direction: 'transmit',
      band: 'S',
      fromMhz: 2025,
      toMhz: 2110,
      polarisations: ['right', 'left'],
      gOverTDbK: null,
      eirpDbw: round(gainDbi(2067) + 13),
      lowestElevationDeg: 10,
    };
  });
}

/** The mask every ten degrees: low ground that rolls a little, and the obstacles standing on it. */
export function maskOf(antenna: CastAntenna): [number, number][] {
  const points: [number, number][] = [];
  for (let azimuthDeg = 0; azimuthDeg < 360; azimuthDeg += 10) {
    const roll = 1.2 * Math.sin((azimuthDeg * Math.PI) / 60) + 0.8 * Math.cos((azimuthDeg * Math.PI) / 45);
    const blocked = antenna.obstacles
      .filter((one) => azimuthDeg >= one.fromDeg && azimuthDeg <= one.toDeg)
      .map((one) => one.heightDeg);
    points.push([azimuthDeg, Math.round(Math.max(0, antenna.groundDeg + roll, ...blocked) * 10) / 10]);
  }
  return points;
}

const hill = (fromDeg: number, toDeg: number, heightDeg: number): Obstacle => ({ fromDeg, toDeg, heightDeg });

export const OWNERS: readonly CastOwner[] = [
  {
    name: 'Brattholm Radio',
    address: { line1: 'Kaiveien 4', postalCode: '9140', city: 'Hollenvik', country: 'NO' },
    people: [
      { name: 'Ragna Solbakk', email: 'ragna@brattholm.example', role: 'manager' },
      { name: 'Eilif Nordhus', email: 'eilif@brattholm.example', role: 'member' },
    ],
    stations: [
      {
        name: 'Hollenvik',
        latitudeDeg: 69.412,
        longitudeDeg: 18.634,
        altitudeM: 42,
        country: 'NO',
        timeZone: 'Europe/Oslo',
        currency: 'EUR',
        description: 'On a headland north of the fjord. Road open all year; watch on site by day, on call by night.',
        approval: 'approved',
        antennas: [
          {
            name: 'Hollenvik 1',
            diameterM: 7.3,
            bands: ['S', 'X', 'S transmit'],
            slewDegPerS: 3,
            perMinuteMinor: 640,
            setupMinor: 1500,
            minimumMinor: 3500,
            acceptance: 'instant',
            groundDeg: 4,
            obstacles: [hill(150, 190, 9), hill(200, 230, 12)],
          },
          {
            name: 'Hollenvik 2',
            diameterM: 3.7,
            bands: ['S'],
            slewDegPerS: 6,
            perMinuteMinor: 390,
            setupMinor: 800,
            minimumMinor: 2000,
            acceptance: 'instant',
            groundDeg: 5,
            obstacles: [hill(150, 200, 11)],
          },
        ],
      },
      {
        name: 'Skarvodden',
        latitudeDeg: 78.157,
        longitudeDeg: 16.031,
        altitudeM: 310,
        country: 'NO',
        timeZone: 'Arctic/Longyearbyen',
        currency: 'EUR',
        description:
          'High latitude: polar orbits pass here nearly every revolution. Unmanned from November to February.',
        approval: 'approved',
        antennas: [
          {
            name: 'Skarvodden A',
            diameterM: 5,
            bands: ['S', 'X'],
            slewDegPerS: 5,
            perMinuteMinor: 720,
            setupMinor: 1500,
            minimumMinor: 4000,
            acceptance: 'instant',
            groundDeg: 3,
            obstacles: [hill(90, 130, 8)],
          },
          {
            name: 'Skarvodden B',
            diameterM: 5,
            bands: ['S', 'X'],
            slewDegPerS: 5,
            perMinuteMinor: 720,
            setupMinor: 1500,
            minimumMinor: 4000,
            acceptance: 'instant',
            groundDeg: 3,
            obstacles: [hill(80, 120, 10)],
          },
        ],
      },
    ],
  },
  {
    name: 'Fellside Earth Stations',
    address: { line1: 'Garth Lane 2', postalCode: 'LA24 9ZZ', city: 'Tarnwick', country: 'GB' },
    people: [
      { name: 'Owen Thwaite', email: 'owen@fellside.example', role: 'manager' },
      { name: 'Jess Birkett', email: 'jess@fellside.example', role: 'member' },
    ],
    stations: [
      {
        name: 'Tarnwick',
        latitudeDeg: 54.47,
        longitudeDeg: -2.61,
        altitudeM: 318,
        country: 'GB',
        timeZone: 'Europe/London',
        currency: 'EUR',
        description: 'Two dishes in a fold of the fells; the south-west stands high.',
        approval: 'approved',
        antennas: [
          {
            name: 'Tarnwick East',
            diameterM: 5.4,
            bands: ['S', 'X', 'S transmit'],
            slewDegPerS: 3,
            perMinuteMinor: 560,
            setupMinor: 1200,
            minimumMinor: 3200,
            acceptance: 'owner',
            groundDeg: 5,
            obstacles: [hill(190, 250, 18), hill(60, 80, 10)],
          },
          {
            name: 'Tarnwick West',
            diameterM: 5.4,
            bands: ['S', 'X', 'S transmit'],
            slewDegPerS: 3,
            perMinuteMinor: 560,
            setupMinor: 1200,
            minimumMinor: 3200,
            acceptance: 'instant',
            groundDeg: 5,
            obstacles: [hill(190, 240, 14), hill(70, 80, 23)],
          },
        ],
      },
      {
        name: 'Sandrigg',
        latitudeDeg: 58.61,
        longitudeDeg: -4.02,
        altitudeM: 85,
        country: 'GB',
        timeZone: 'Europe/London',
        currency: 'EUR',
        description: 'Open moor with the sea to the north. One small dish for low data rates.',
        approval: 'approved',
        antennas: [
          {
            name: 'Sandrigg',
            diameterM: 2.4,
            bands: ['S', 'UHF'],
            slewDegPerS: 8,
            perMinuteMinor: 240,
            setupMinor: 400,
            minimumMinor: 1000,
            acceptance: 'instant',
            groundDeg: 3,
            obstacles: [hill(170, 190, 7)],
          },
        ],
      },
    ],
  },
  {
    name: 'Atlântida Antenas',
    address: { line1: 'Rua do Farol 18', postalCode: '9900-451', city: 'Pico Verdal', country: 'PT' },
    people: [
      { name: 'Inês Furtado', email: 'ines@atlantida.example', role: 'manager' },
      { name: 'Duarte Melo', email: 'duarte@atlantida.example', role: 'member' },
    ],
    stations: [
      {
        name: 'Pico Verdal',
        latitudeDeg: 38.527,
        longitudeDeg: -28.431,
        altitudeM: 640,
        country: 'PT',
        timeZone: 'Atlantic/Azores',
        currency: 'EUR',
        description: 'Mid-ocean: the only antenna between two continents. Clear sea horizon except for the peak.',
        approval: 'approved',
        antennas: [
          {
            name: 'Pico Verdal',
            diameterM: 6.1,
            bands: ['S', 'X'],
            slewDegPerS: 4,
            perMinuteMinor: 720,
            setupMinor: 1500,
            minimumMinor: 4000,
            acceptance: 'instant',
            groundDeg: 2,
            obstacles: [hill(60, 110, 16)],
          },
        ],
      },
      {
        name: 'Serra Baixa',
        latitudeDeg: 38.04,
        longitudeDeg: -7.61,
        altitudeM: 210,
        country: 'PT',
        timeZone: 'Europe/Lisbon',
        currency: 'EUR',
        description: 'Dry plain, little rain. Open on working days.',
        approval: 'approved',
        antennas: [
          {
            name: 'Serra Baixa 1',
            diameterM: 4.5,
            bands: ['S', 'X'],
            slewDegPerS: 5,
            perMinuteMinor: 480,
            setupMinor: 900,
            minimumMinor: 2500,
            acceptance: 'instant',
            groundDeg: 3,
            obstacles: [hill(300, 330, 9)],
            hours: [{ days: [1, 2, 3, 4, 5], fromLocal: '06:00', toLocal: '22:00' }],
          },
          {
            name: 'Serra Baixa 2',
            diameterM: 4.5,
            bands: ['S'],
            slewDegPerS: 5,
            perMinuteMinor: 420,
            setupMinor: 900,
            minimumMinor: 2200,
            acceptance: 'owner',
            groundDeg: 3,
            obstacles: [hill(310, 340, 8)],
            hours: [{ days: [1, 2, 3, 4, 5], fromLocal: '06:00', toLocal: '22:00' }],
          },
        ],
      },
    ],
  },
  {
    name: 'Estrecho Sur',
    address: { line1: 'Costanera 77', postalCode: '6210001', city: 'Punta Cormorán', country: 'CL' },
    people: [
      { name: 'Tomás Quidel', email: 'tomas@estrecho.example', role: 'manager' },
      { name: 'Antonia Vera', email: 'antonia@estrecho.example', role: 'viewer' },
    ],
    stations: [
      {
        name: 'Punta Cormorán',
        latitudeDeg: -53.084,
        longitudeDeg: -70.861,
        altitudeM: 33,
        country: 'CL',
        timeZone: 'America/Punta_Arenas',
        currency: 'EUR',
        description: 'Wind on most days: the larger dish stows at 70 km/h and its owner says so in time.',
        approval: 'approved',
        antennas: [
          {
            name: 'Punta Cormorán 1',
            diameterM: 5,
            bands: ['S', 'X', 'S transmit'],
            slewDegPerS: 1.8,
            perMinuteMinor: 530,
            setupMinor: 1000,
            minimumMinor: 3000,
            acceptance: 'instant',
            groundDeg: 3,
            obstacles: [hill(260, 300, 7)],
          },
          {
            name: 'Punta Cormorán 2',
            diameterM: 3.7,
            bands: ['S'],
            slewDegPerS: 4,
            perMinuteMinor: 340,
            setupMinor: 700,
            minimumMinor: 1800,
            acceptance: 'instant',
            groundDeg: 3,
            obstacles: [hill(250, 300, 8)],
          },
        ],
      },
      {
        name: 'Cerro Lenga',
        latitudeDeg: -45.52,
        longitudeDeg: -71.98,
        altitudeM: 540,
        country: 'CL',
        timeZone: 'America/Santiago',
        currency: 'EUR',
        description: 'In a valley; only high passes, at a low price.',
        approval: 'approved',
        antennas: [
          {
            name: 'Cerro Lenga',
            diameterM: 3,
            bands: ['S', 'UHF'],
            slewDegPerS: 6,
            perMinuteMinor: 210,
            setupMinor: 500,
            minimumMinor: 1200,
            acceptance: 'instant',
            groundDeg: 14,
            obstacles: [hill(60, 140, 24), hill(230, 320, 28)],
          },
        ],
      },
    ],
  },
  {
    name: 'Witkrans Teleport',
    address: { line1: 'Kliprand Road 9', postalCode: '8240', city: 'Droëvlei', country: 'ZA' },
    people: [
      { name: 'Lindiwe Maseko', email: 'lindiwe@witkrans.example', role: 'manager' },
      { name: 'Pieter Roodt', email: 'pieter@witkrans.example', role: 'member' },
    ],
    stations: [
      {
        name: 'Droëvlei',
        latitudeDeg: -31.183,
        longitudeDeg: 19.944,
        altitudeM: 980,
        country: 'ZA',
        timeZone: 'Africa/Johannesburg',
        currency: 'EUR',
        description: 'High, dry and quiet in the radio bands. Three dishes on one ridge.',
        approval: 'approved',
        antennas: [
          {
            name: 'Droëvlei North',
            diameterM: 9,
            bands: ['S', 'X', 'S transmit'],
            slewDegPerS: 2,
            perMinuteMinor: 480,
            setupMinor: 1800,
            minimumMinor: 3800,
            acceptance: 'instant',
            groundDeg: 2,
            obstacles: [hill(10, 40, 8)],
          },
          {
            name: 'Droëvlei South',
            diameterM: 5.4,
            bands: ['S', 'X'],
            slewDegPerS: 4,
            perMinuteMinor: 440,
            setupMinor: 1000,
            minimumMinor: 2800,
            acceptance: 'instant',
            groundDeg: 2,
            obstacles: [hill(0, 30, 11)],
          },
          {
            name: 'Droëvlei Ridge',
            diameterM: 3.7,
            bands: ['S', 'UHF'],
            slewDegPerS: 6,
            perMinuteMinor: 300,
            setupMinor: 600,
            minimumMinor: 1500,
            acceptance: 'instant',
            groundDeg: 1,
            obstacles: [],
          },
        ],
      },
      {
        name: 'Baken Point',
        latitudeDeg: -28.61,
        longitudeDeg: 16.47,
        altitudeM: 60,
        country: 'ZA',
        timeZone: 'Africa/Johannesburg',
        currency: 'EUR',
        description: 'New site on the coast, papers with the marketplace.',
        approval: 'waiting',
        antennas: [
          {
            name: 'Baken Point',
            diameterM: 4.5,
            bands: ['S', 'X'],
            slewDegPerS: 5,
            perMinuteMinor: 430,
            setupMinor: 900,
            minimumMinor: 2500,
            acceptance: 'instant',
            groundDeg: 2,
            obstacles: [hill(80, 120, 12)],
          },
        ],
      },
    ],
  },
  {
    name: 'Kestle Bay Antennas',
    address: { line1: 'Wharf Street 31', postalCode: '9810', city: 'Kestle Bay', country: 'NZ' },
    people: [
      { name: 'Aroha Tane', email: 'aroha@kestlebay.example', role: 'manager' },
      { name: 'Finlay Moore', email: 'finlay@kestlebay.example', role: 'member' },
    ],
    stations: [
      {
        name: 'Kestle Bay',
        latitudeDeg: -46.52,
        longitudeDeg: 168.31,
        altitudeM: 25,
        country: 'NZ',
        timeZone: 'Pacific/Auckland',
        currency: 'NZD',
        description: 'Southern ocean coverage. Prices in New Zealand dollars.',
        approval: 'approved',
        antennas: [
          {
            name: 'Kestle Bay 1',
            diameterM: 7.3,
            bands: ['S', 'X', 'S transmit'],
            slewDegPerS: 3,
            perMinuteMinor: 1090,
            setupMinor: 2500,
            minimumMinor: 6000,
            acceptance: 'instant',
            groundDeg: 3,
            obstacles: [hill(330, 350, 10)],
          },
          {
            name: 'Kestle Bay 2',
            diameterM: 3.7,
            bands: ['S', 'UHF'],
            slewDegPerS: 6,
            perMinuteMinor: 690,
            setupMinor: 1200,
            minimumMinor: 3000,
            acceptance: 'instant',
            groundDeg: 3,
            obstacles: [hill(330, 350, 12)],
          },
        ],
      },
      {
        name: 'Harrow Spit',
        latitudeDeg: -43.95,
        longitudeDeg: -176.56,
        altitudeM: 8,
        country: 'NZ',
        timeZone: 'Pacific/Chatham',
        currency: 'NZD',
        description: 'An island station three quarters of an hour ahead of the mainland. Papers incomplete.',
        approval: 'refused',
        antennas: [
          {
            name: 'Harrow Spit',
            diameterM: 3,
            bands: ['S'],
            slewDegPerS: 6,
            perMinuteMinor: 550,
            setupMinor: 1000,
            minimumMinor: 2500,
            acceptance: 'owner',
            groundDeg: 2,
            obstacles: [],
          },
        ],
      },
    ],
  },
];
