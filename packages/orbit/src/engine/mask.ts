/** What stands around an antenna: its horizon as straight lines between corners, closed across north. */
import { OrbitError } from '../orbit-error.js';
import type { MaskPoint } from '../types.js';

const FULL_TURN = 360;
/** More corners than this no survey has: one each half degree. */
export const MOST_MASK_POINTS = 720;
/** A line that rises is cut so that the horizon in one piece stays nearly straight against the sky's own curves. */
const WIDEST_RISING_DEG = 10;

/** A mask ready for use: corners clockwise from north, each with the line that runs on from it. */
export interface CompiledMask {
  readonly lowestDeg: number;
  readonly highestDeg: number;
  /** One elevation all round. */
  readonly flat: boolean;
  /** Rising, 0 to below 360; two equal ones are a cliff. */
  readonly azimuthDeg: Float64Array;
  /** At the start of the line that runs clockwise from the corner. */
  readonly elevationDeg: Float64Array;
  /** Degrees of elevation for each degree of azimuth along that line. */
  readonly slope: Float64Array;
}

/** What is wrong with a mask, one sentence a problem; empty where nothing is. */
export function validateMask(points: readonly MaskPoint[]): string[] {
  if (points.length === 0) return ['A mask needs at least one point.'];
  if (points.length > MOST_MASK_POINTS)
    return [`A mask has at most ${MOST_MASK_POINTS} points; this one has ${points.length}.`];
  return points.flatMap(([azimuthDeg, elevationDeg], index) => {
    const sentences: string[] = [];
    if (!(azimuthDeg >= 0 && azimuthDeg <= FULL_TURN)) {
      sentences.push(`Mask point ${index + 1}: the azimuth is ${azimuthDeg}; it must lie between 0 and 360 degrees.`);
    }
    if (!(elevationDeg >= -10 && elevationDeg <= 90)) {
      sentences.push(
        `Mask point ${index + 1}: the elevation is ${elevationDeg}; it must lie between -10 and 90 degrees.`,
      );
    }
    return sentences;
  });
}

/**
 * Prepares a mask. The points may begin anywhere as long as they go round clockwise; others are sorted by azimuth. Two points
 * at one azimuth are a cliff, the first belonging to the side before it. Nothing below `minElevationDeg` counts as open sky.
 * @throws OrbitError `bad mask` with the sentences of `validateMask`.
 */
export function compileMask(points: readonly MaskPoint[], minElevationDeg = -90): CompiledMask {
  const sentences = validateMask(points);
  if (sentences.length > 0) throw new OrbitError('bad mask', sentences.join(' '), { sentences });
  const corners = withFloor(clockwise(points), minElevationDeg);
  const elevations = corners.map(([, elevationDeg]) => elevationDeg);
  const [lowestDeg, highestDeg] = [Math.min(...elevations), Math.max(...elevations)];
  if (lowestDeg === highestDeg) {
    const [azimuthDeg, slope] = [Float64Array.of(0), Float64Array.of(0)];
    return { lowestDeg, highestDeg, flat: true, azimuthDeg, elevationDeg: Float64Array.of(lowestDeg), slope };
  }
  return { lowestDeg, highestDeg, flat: false, ...linesBetween(corners) };
}

function clockwise(points: readonly MaskPoint[]): MaskPoint[] {
  const turned = points.map(([azimuthDeg, elevationDeg]): MaskPoint => [azimuthDeg % FULL_TURN, elevationDeg]);
  const falls = turned.flatMap(([azimuthDeg], index) => (azimuthDeg < (turned[index - 1]?.[0] ?? -1) ? [index] : []));
  const [fall, ...others] = falls;
  if (fall === undefined) return startAfterSeam(turned);
  const goesRound = others.length === 0 && (turned.at(-1)?.[0] ?? 0) <= (turned[0]?.[0] ?? 0);
  if (goesRound) return startAfterSeam([...turned.slice(fall), ...turned.slice(0, fall)]);
  return turned.sort((a, b) => a[0] - b[0]);
}

/** A list that ends at the azimuth where it began closes a cliff there: its last point comes before its first. */
function startAfterSeam(points: MaskPoint[]): MaskPoint[] {
  const last = points.at(-1);
  const first = points[0];
  if (points.length < 2 || !last || !first || last[0] !== first[0]) return points;
  // All at one azimuth is no seam but a mask of one corner.
  return points.every(([azimuthDeg]) => azimuthDeg === first[0]) ? points : [last, ...points.slice(0, -1)];
}

/** The same mask where it is higher than the floor, and the floor elsewhere, with a corner where the two meet. */
function withFloor(corners: readonly MaskPoint[], floorDeg: number): MaskPoint[] {
  return corners.flatMap((corner, index): MaskPoint[] => {
    const next = corners[(index + 1) % corners.length] ?? corner;
    const width = widthTo(corner, next, corners.length, index);
    const [from, to] = [corner[1] - floorDeg, next[1] - floorDeg];
    const raised: MaskPoint = [corner[0], Math.max(corner[1], floorDeg)];
    if (from * to >= 0 || width === 0) return [raised];
    return [raised, [(corner[0] + (width * from) / (from - to)) % FULL_TURN, floorDeg]];
  });
}

/** Degrees clockwise to the next corner; the last line runs on across north. */
function widthTo(corner: MaskPoint, next: MaskPoint, count: number, index: number): number {
  const ahead = next[0] - corner[0];
  return index === count - 1 ? ahead + FULL_TURN : ahead;
}

function linesBetween(unsorted: readonly MaskPoint[]) {
  // A corner added by the floor may have come round past north.
  const start = unsorted.findIndex(([azimuthDeg], index) => azimuthDeg < (unsorted[index - 1]?.[0] ?? -1));
  const corners = start > 0 ? [...unsorted.slice(start), ...unsorted.slice(0, start)] : unsorted;
  const azimuths: number[] = [];
  const elevations: number[] = [];
  const slopes: number[] = [];
  corners.forEach((corner, index) => {
    const next = corners[(index + 1) % corners.length] ?? corner;
    const width = widthTo(corner, next, corners.length, index);
    const slope = width === 0 ? 0 : (next[1] - corner[1]) / width;
    const parts = slope === 0 ? 1 : Math.ceil(width / WIDEST_RISING_DEG);
    for (let part = 0; part < parts; part += 1) {
      const along = (width * part) / parts;
      azimuths.push(corner[0] + along);
      elevations.push(corner[1] + slope * along);
      slopes.push(slope);
    }
  });
  const order = azimuths.findIndex((azimuthDeg) => azimuthDeg >= FULL_TURN);
  const turn = (values: number[]) => (order < 0 ? values : [...values.slice(order), ...values.slice(0, order)]);
  return {
    azimuthDeg: Float64Array.from(turn(azimuths), (azimuthDeg) => azimuthDeg % FULL_TURN),
    elevationDeg: Float64Array.from(turn(elevations)),
    slope: Float64Array.from(turn(slopes)),
  };
}

/** The line under an azimuth: the last corner at or before it, counting round. */
export function maskLineAt(mask: CompiledMask, azimuthDeg: number): number {
  const { azimuthDeg: corners } = mask;
  let low = 0;
  let high = corners.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (corners[middle]! <= azimuthDeg) low = middle + 1;
    else high = middle;
  }
  return low === 0 ? corners.length - 1 : low - 1;
}

/** Height of the horizon in an azimuth from 0 to 360; at a cliff that of its clockwise side. */
export function maskElevationDeg(mask: CompiledMask | readonly MaskPoint[], azimuthDeg: number): number {
  const compiled = 'slope' in mask ? mask : compileMask(mask);
  const turned = ((azimuthDeg % FULL_TURN) + FULL_TURN) % FULL_TURN;
  const line = maskLineAt(compiled, turned);
  const along = (turned - compiled.azimuthDeg[line]! + FULL_TURN) % FULL_TURN;
  return compiled.elevationDeg[line]! + compiled.slope[line]! * along;
}
