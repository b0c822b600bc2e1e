/** Invented passes for looking at the drawings: simple circular orbits over invented antennas. Never part of the product. */
import type { MaskPoint, TrackPoint } from '../drawing/sky-plot/sky-plot-types.js';
import type {
  BoardHump,
  BoardStation,
  HumpProfile,
  HumpState,
  OthersBlock,
} from '../drawing/tide-board/tide-board-types.js';

const EARTH_KM = 6371;
const ALTITUDE_KM = 560;
const RATE_RAD_PER_S = 0.00108;
const DEG = Math.PI / 180;

export const NOW = Date.UTC(2026, 11, 1, 14, 5, 9);
export const at = (hour: number, minute: number, second = 0) => Date.UTC(2026, 11, 1, hour, minute, second);

/** Seen from the ground: highest elevation and the azimuth at which that happens fix the whole pass. */
export interface InventedPass {
  readonly highestMs: number;
  readonly highestDeg: number;
  readonly azimuthAtHighestDeg: number;
  readonly northbound?: boolean;
}

/** Elevation and azimuth of an invented pass at an instant. */
export function look(pass: InventedPass, atMs: number): { elevationDeg: number; azimuthDeg: number } {
  const ratio = EARTH_KM / (EARTH_KM + ALTITUDE_KM);
  const nearest = Math.acos(ratio * Math.cos(pass.highestDeg * DEG)) - pass.highestDeg * DEG;
  const along = ((atMs - pass.highestMs) / 1000) * RATE_RAD_PER_S;
  const central = Math.acos(Math.cos(nearest) * Math.cos(along));
  const elevationDeg = Math.atan2(Math.cos(central) - ratio, Math.sin(central)) / DEG;
  const turn = Math.atan2(Math.tan(along), Math.sin(nearest)) / DEG;
  const azimuthDeg = (pass.azimuthAtHighestDeg + (pass.northbound ? -turn : turn) + 720) % 360;
  return { elevationDeg, azimuthDeg };
}

/** Mask elevation at an azimuth, straight between points. */
export function maskAt(mask: readonly MaskPoint[], azimuthDeg: number): number {
  const sorted = [...mask].sort((a, b) => a.azimuthDeg - b.azimuthDeg);
  const first = sorted[0] as MaskPoint;
  const last = sorted.at(-1) as MaskPoint;
  const ring = [
    { ...last, azimuthDeg: last.azimuthDeg - 360 },
    ...sorted,
    { ...first, azimuthDeg: first.azimuthDeg + 360 },
  ];
  for (let index = 1; index < ring.length; index += 1) {
    const a = ring[index - 1] as MaskPoint;
    const b = ring[index] as MaskPoint;
    if (azimuthDeg > b.azimuthDeg) continue;
    const share = (azimuthDeg - a.azimuthDeg) / Math.max(1e-9, b.azimuthDeg - a.azimuthDeg);
    return a.elevationDeg + share * (b.elevationDeg - a.elevationDeg);
  }
  return first.elevationDeg;
}

export const TARNWICK_MASK: readonly MaskPoint[] = [
  [0, 6.4],
  [18, 7],
  [38, 8.4],
  [58, 6.5],
  [72, 9],
  [84, 13],
  [90, 14],
  [98, 13.6],
  [112, 6],
  [134, 5],
  [150, 4.6],
  [172, 7.4],
  [194, 11.2],
  [212, 14],
  [230, 11.5],
  [248, 7],
  [272, 4.4],
  [300, 3.4],
  [324, 4.8],
  [342, 6.1],
].map(([azimuthDeg = 0, elevationDeg = 0]) => ({ azimuthDeg, elevationDeg }));

export const FLAT_MASK: readonly MaskPoint[] = [
  [0, 5],
  [60, 7],
  [120, 5],
  [180, 9],
  [240, 12],
  [300, 6],
].map(([azimuthDeg = 0, elevationDeg = 0]) => ({ azimuthDeg, elevationDeg }));

/** Samples every 10 s over the time above the horizon, and AOS and LOS over the mask. */
export function fly(
  pass: InventedPass,
  mask: readonly MaskPoint[],
): { profile: HumpProfile; aosMs: number; losMs: number } {
  const stepMs = 10_000;
  const half = 75;
  const elevation: number[] = [];
  const land: number[] = [];
  let aosMs = 0;
  let losMs = 0;
  let fromMs = 0;
  for (let index = -half; index <= half; index += 1) {
    const atMs = pass.highestMs + index * stepMs;
    const seen = look(pass, atMs);
    if (seen.elevationDeg < 0) continue;
    fromMs ||= atMs;
    const horizon = maskAt(mask, seen.azimuthDeg);
    elevation.push(seen.elevationDeg);
    land.push(horizon);
    if (seen.elevationDeg < horizon) continue;
    aosMs ||= atMs;
    losMs = atMs;
  }
  const profile = {
    fromMs,
    toMs: fromMs + stepMs * (elevation.length - 1),
    elevationDeg: Float32Array.from(elevation),
    maskDeg: Float32Array.from(land),
    dopplerHz: Float32Array.from(elevation.map((_, index) => 50_000 * Math.tanh((elevation.length / 2 - index) / 12))),
  };
  return { profile, aosMs: aosMs || pass.highestMs - 60_000, losMs: losMs || pass.highestMs + 60_000 };
}

/** Points of the track each 5 s. */
export function trackOf(pass: InventedPass, aosMs: number, losMs: number): TrackPoint[] {
  const points: TrackPoint[] = [];
  for (let atMs = aosMs; atMs <= losMs; atMs += 5000) points.push({ atMs, ...look(pass, atMs) });
  return points;
}

let count = 0;

/** One invented hump. */
export function hump(
  rowId: string,
  short: string,
  pass: InventedPass,
  mask: readonly MaskPoint[],
  state: HumpState,
  extra: Partial<BoardHump> = {},
): BoardHump {
  count += 1;
  const { profile, aosMs, losMs } = fly(pass, mask);
  return {
    id: `pass-${count}`,
    rowId,
    spacecraftShort: short,
    spacecraftName: short.replace('W', 'Whimbrel '),
    aosMs,
    losMs,
    highestMs: pass.highestMs,
    highestDeg: pass.highestDeg,
    profile,
    state,
    ...extra,
  };
}

const NIGHT = [{ fromMs: at(12, 0), toMs: at(31, 0) }];

export const STATIONS: readonly BoardStation[] = [
  {
    id: 'hollenvik',
    name: 'Hollenvik',
    timeZone: 'Europe/Oslo',
    nights: NIGHT,
    rows: [
      { id: 'h1', name: 'Hollenvik 1', detail: ['7.3 m, S and X', 'from €6.40 a min'] },
      { id: 'h2', name: 'Hollenvik 2', detail: ['3.7 m, S', 'from €3.90 a min'] },
    ],
  },
  {
    id: 'tarnwick',
    name: 'Tarnwick',
    timeZone: 'Europe/London',
    nights: [{ fromMs: at(15, 51), toMs: at(32, 0) }],
    rows: [
      { id: 'te', name: 'Tarnwick East', detail: ['5.4 m, S and X', 'from €5.60 a min'] },
      { id: 'tw', name: 'Tarnwick West', detail: ['5.4 m, S and X', 'from €5.60 a min'] },
    ],
  },
  {
    id: 'pico',
    name: 'Pico Verdal',
    timeZone: 'Atlantic/Azores',
    nights: [],
    rows: [{ id: 'pv', name: 'Pico Verdal', detail: ['6.1 m, S and X', 'from €7.20 a min'] }],
  },
  {
    id: 'droevlei',
    name: 'Droëvlei',
    timeZone: 'Africa/Johannesburg',
    nights: [],
    rows: [{ id: 'dn', name: 'Droëvlei North', detail: ['9.0 m, S and X', 'from €4.80 a min'] }],
  },
  {
    id: 'punta',
    name: 'Punta Cormorán',
    timeZone: 'America/Argentina/Ushuaia',
    nights: [],
    rows: [
      { id: 'p1', name: 'Punta Cormorán 1', detail: ['5.0 m, S and X', 'from €5.30 a min'] },
      { id: 'p2', name: 'Punta Cormorán 2', detail: ['3.7 m, S', 'from €3.40 a min'] },
    ],
  },
];

const p = (hour: number, minute: number, highestDeg: number, azimuthAtHighestDeg = 95): InventedPass => ({
  highestMs: at(hour, minute),
  highestDeg,
  azimuthAtHighestDeg,
});
const M = TARNWICK_MASK;
const why = (word: string, sentence: string, refused = false) => ({ reason: { word, sentence, refused } });
const forSale = (euro: number) => ({ priceLabel: `€${euro}`, priceText: `€${euro}.40` });

export const PICKED = hump('h1', 'W4', p(15, 4, 84.9), FLAT_MASK, 'forSale', {
  priceLabel: '€82',
  priceText: '€81.88',
});
export const REFUSED = hump(
  'p1',
  'W5',
  p(16, 12, 34, 250),
  M,
  'notForSale',
  why('no time to turn', 'The dish cannot turn in time.', true),
);

export const HUMPS: readonly BoardHump[] = [
  PICKED,
  REFUSED,
  hump('h1', 'W1', p(14, 2, 46), M, 'notForSale', why('past', 'It is over.')),
  hump('h1', 'W2', p(14, 30, 24, 260), M, 'notForSale', why('notice', 'Hollenvik wants an hour of notice.')),
  hump('h1', 'W5', p(15, 36, 28, 250), M, 'forSale', forSale(74)),
  hump('h1', 'W1', p(16, 4, 16, 80), FLAT_MASK, 'forSale', forSale(55)),
  hump('h1', 'W4', p(16, 39, 40), M, 'berth'),
  hump('h2', 'W1', p(14, 2, 50), M, 'notForSale', why('past', 'It is over.')),
  hump('h2', 'W2', p(14, 31, 22), M, 'notForSale', why('blackout', 'Feed change.')),
  hump('h2', 'W4', p(15, 4, 80), M, 'notForSale', why('blackout', 'Feed change.')),
  hump('h2', 'W4', p(16, 39, 38), M, 'forSale', forSale(43)),
  hump('te', 'W5', p(14, 6, 66, 80), M, 'underWay'),
  hump('te', 'W1', p(14, 36, 18, 265), M, 'forSale', forSale(55)),
  hump('te', 'W4', p(15, 9, 38), M, 'taken', why('taken', 'Someone else has it.')),
  hump('te', 'W5', p(15, 40, 14, 90), M, 'notForSale', why('short', 'It lasts 2 min 10 s above the mask.')),
  hump('te', 'W4', p(16, 43, 27, 85), M, 'asked', { priceText: '€52.60' }),
  hump('tw', 'W5', p(14, 6, 58, 80), M, 'notForSale', why('past', 'It is over.')),
  hump('tw', 'W1', p(14, 36, 23, 265), M, 'berth'),
  hump('tw', 'W4', p(15, 8, 40, 80), M, 'forSale', forSale(68)),
  hump('tw', 'W5', p(15, 41, 16, 250), FLAT_MASK, 'berth'),
  hump('tw', 'W4', p(16, 43, 26, 85), M, 'forSale', forSale(57)),
  hump('pv', 'W3', p(14, 11, 20), FLAT_MASK, 'notForSale', why('too late', 'It rises in a minute.')),
  hump('pv', 'W1', p(14, 41, 62), FLAT_MASK, 'held', { holdEndsMs: NOW + 462_000, priceText: '€87.92' }),
  hump('pv', 'W5', p(15, 46, 32, 260), M, 'forSale', forSale(85)),
  hump('pv', 'W4', p(16, 52, 70), M, 'forSale', forSale(90)),
  hump('dn', 'W4', p(13, 57, 26), FLAT_MASK, 'done'),
  hump('p1', 'W3', p(14, 8, 34), M, 'taken', why('taken', 'Someone else has it.')),
  hump('p1', 'W1', p(15, 6, 13), FLAT_MASK, 'forSale', forSale(45)),
  hump('p1', 'W1', p(16, 40, 66), FLAT_MASK, 'forSale', forSale(59)),
  hump('p2', 'W2', p(14, 8, 28), M, 'notForSale', why('too late', 'It has risen.')),
  hump('p2', 'W1', p(15, 6, 12), FLAT_MASK, 'forSale', forSale(27)),
  hump('p2', 'W5', p(16, 12, 30, 250), M, 'forSale', forSale(36)),
  hump('p2', 'W1', p(16, 40, 64), FLAT_MASK, 'forSale', forSale(37)),
];

export const OTHERS: readonly OthersBlock[] = [
  ['h1', 14, 12, 24],
  ['te', 15, 2, 17],
  ['pv', 15, 8, 22],
  ['dn', 14, 21, 33],
  ['dn', 14, 52, 65],
  ['p1', 14, 0, 15],
  ['p1', 15, 53, 67],
  ['p2', 15, 24, 38],
].map(([rowId, hour, from, to], index) => ({
  id: `other-${index}`,
  rowId: String(rowId),
  fromMs: at(Number(hour), Number(from)),
  toMs: at(Number(hour), Number(to)),
}));

export const BLACKOUTS = [{ id: 'b1', rowId: 'h2', fromMs: at(14, 20), toMs: at(16, 20), reason: 'Feed change' }];

/** 200 rows with 100 passes each over 14 days, for looking at how it moves. */
export function crowd(): { stations: BoardStation[]; humps: BoardHump[] } {
  const stations: BoardStation[] = [];
  const humps: BoardHump[] = [];
  const states: HumpState[] = ['forSale', 'forSale', 'forSale', 'notForSale', 'berth', 'taken', 'asked', 'held'];
  for (let s = 0; s < 50; s += 1) {
    const rows = [0, 1, 2, 3].map((r) => ({
      id: `r${s}-${r}`,
      name: `Antenna ${s + 1}.${r + 1}`,
      detail: ['5.4 m, S and X', 'from €5.60 a min'],
    }));
    stations.push({
      id: `s${s}`,
      name: `Station ${s + 1}`,
      timeZone: 'UTC',
      rows,
      nights: Array.from({ length: 14 }, (_, day) => ({
        fromMs: NOW + day * 86_400_000 + s * 1_000_000,
        toMs: NOW + day * 86_400_000 + s * 1_000_000 + 40_000_000,
      })),
    });
    rows.forEach((row, r) => {
      for (let index = 0; index < 100; index += 1) {
        const highestMs = NOW + index * 12_096_000 + ((s * 7919 + r * 104_729 + index * 15_485) % 9000) * 1000;
        const highestDeg = 8 + ((s * 31 + r * 17 + index * 13) % 80);
        const state = states[(s + r * 3 + index) % states.length] as HumpState;
        humps.push(
          hump(
            row.id,
            `W${(index % 5) + 1}`,
            { highestMs, highestDeg, azimuthAtHighestDeg: (index * 37) % 360 },
            index % 2 ? M : FLAT_MASK,
            state,
            state === 'forSale'
              ? forSale(30 + (index % 60))
              : state === 'held'
                ? { holdEndsMs: NOW + 600_000 }
                : why('notice', 'Too late.'),
          ),
        );
      }
    });
  }
  return { stations, humps };
}
