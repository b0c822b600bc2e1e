/** The invented operators and the spacecraft they fly. */
import type { CastAddress, CastPerson } from './owners.js';

export interface CastSpacecraft {
  readonly name: string;
  readonly shortName: string;
  readonly catalogNumber: number;
  readonly orbit: {
    readonly altitudeKm: number;
    readonly inclinationDeg: number;
    readonly raanDeg: number;
    readonly argPerigeeDeg: number;
    readonly meanAnomalyDeg: number;
    readonly eccentricity: number;
  };
  readonly radios: readonly ('S' | 'X' | 'UHF' | 'S up')[];
}

export interface CastOperator {
  readonly name: string;
  readonly address: CastAddress;
  readonly people: readonly CastPerson[];
  readonly spacecraft: readonly CastSpacecraft[];
  /** About so many contacts bought a day, in the three months before today. */
  readonly contactsPerDay: number;
}

/** Several alike, spread in node and anomaly. */
function series(
  name: string,
  short: string,
  count: number,
  firstNumber: number,
  base: { altitudeKm: number; inclinationDeg: number; raanDeg: number },
  radios: CastSpacecraft['radios'],
): CastSpacecraft[] {
  return Array.from({ length: count }, (_unused, index) => ({
    name: `${name} ${index + 1}`,
    shortName: `${short}${index + 1}`,
    catalogNumber: firstNumber + index,
    orbit: {
      altitudeKm: base.altitudeKm + index * 3,
      inclinationDeg: base.inclinationDeg,
      raanDeg: (base.raanDeg + index * 37) % 360,
      argPerigeeDeg: (40 + index * 61) % 360,
      meanAnomalyDeg: (15 + index * 83) % 360,
      eccentricity: 0.0008 + index * 0.0002,
    },
    radios,
  }));
}

export const OPERATORS: readonly CastOperator[] = [
  {
    name: 'Saltmarsh Observation',
    address: { line1: 'Deichstraat 12', postalCode: '8911', city: 'Saltmarsh', country: 'NL' },
    people: [
      { name: 'Mirela Kovač', email: 'mirela@saltmarsh.example', role: 'manager' },
      { name: 'Joost Terpstra', email: 'joost@saltmarsh.example', role: 'member' },
      { name: 'Hana Okada', email: 'hana@saltmarsh.example', role: 'viewer' },
    ],
    spacecraft: series('Whimbrel', 'W', 8, 82001, { altitudeKm: 512, inclinationDeg: 97.45, raanDeg: 20 }, [
      'S',
      'X',
      'S up',
    ]),
    contactsPerDay: 0.9,
  },
  {
    name: 'Dunnage Weather',
    address: { line1: 'Kvernbakken 3', postalCode: '2100', city: 'Dunnage', country: 'DK' },
    people: [
      { name: 'Asger Lund', email: 'asger@dunnage.example', role: 'manager' },
      { name: 'Tilde Brandt', email: 'tilde@dunnage.example', role: 'member' },
    ],
    spacecraft: series('Corriedale', 'C', 7, 82101, { altitudeKm: 815, inclinationDeg: 98.7, raanDeg: 130 }, [
      'S',
      'X',
    ]),
    contactsPerDay: 0.6,
  },
  {
    name: 'Lanternfish Institute',
    address: { line1: 'Calle del Puerto 40', postalCode: '11500', city: 'Lanternfish', country: 'ES' },
    people: [
      { name: 'Nerea Solís', email: 'nerea@lanternfish.example', role: 'manager' },
      { name: 'Iker Abad', email: 'iker@lanternfish.example', role: 'member' },
    ],
    spacecraft: series('Lanternfish', 'L', 6, 82201, { altitudeKm: 560, inclinationDeg: 63.4, raanDeg: 210 }, [
      'S',
      'UHF',
    ]),
    contactsPerDay: 0.35,
  },
  {
    name: 'Groyne Maritime Signals',
    address: { line1: 'Harbour Row 5', postalCode: '6011', city: 'Groyne', country: 'NZ' },
    people: [
      { name: 'Wiremu Pope', email: 'wiremu@groyne.example', role: 'manager' },
      { name: 'Sina Faleolo', email: 'sina@groyne.example', role: 'member' },
    ],
    spacecraft: series('Groyne', 'G', 4, 82301, { altitudeKm: 600, inclinationDeg: 51.6, raanDeg: 300 }, ['S', 'UHF']),
    contactsPerDay: 0.25,
  },
];
