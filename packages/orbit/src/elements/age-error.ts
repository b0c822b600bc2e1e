/**
 * How far a spacecraft may be from where old mean elements put it. Nobody publishes a covariance with such elements, so
 * this is common practice and no source: about a kilometre along the track at the epoch, a few more each day in low orbit,
 * faster the lower it flies because the drag to come is not known. It is an estimate of one sigma, never a bound.
 */

/** Earth's gravity, WGS-72, as SGP4 uses it. */
const GRAVITY_KM3_PER_S2 = 398_600.8;
const DAY_S = 86_400;
const EPOCH_ERROR_KM = 1;

interface GrowthClass {
  /** Rev/day from which the class holds. */
  readonly fromMeanMotion: number;
  readonly kmPerDay: number;
  readonly kmPerDay2: number;
}

/** The lowest orbits first. Common practice, no source. */
const GROWTH: readonly GrowthClass[] = [
  { fromMeanMotion: 15.5, kmPerDay: 2, kmPerDay2: 0.6 },
  { fromMeanMotion: 11.25, kmPerDay: 1.5, kmPerDay2: 0.2 },
  { fromMeanMotion: 0, kmPerDay: 0.3, kmPerDay2: 0 },
];

export interface ElementAge {
  /** Hours between the epoch and the instant asked for, either way round. */
  readonly ageH: number;
  readonly meanMotionRevPerDay: number;
}

/**
 * Estimated one-sigma error of AOS and LOS in seconds: the error along the track divided by the mean speed on it.
 * Grows with age in both directions.
 */
export function elementAgeErrorS({ ageH, meanMotionRevPerDay }: ElementAge): number {
  const days = Math.abs(ageH) / 24;
  const { kmPerDay, kmPerDay2 } = growthOf(meanMotionRevPerDay);
  const alongTrackKm = EPOCH_ERROR_KM + kmPerDay * days + kmPerDay2 * days * days;
  const meanMotionRadPerS = (meanMotionRevPerDay * 2 * Math.PI) / DAY_S;
  const speedKmPerS = Math.cbrt(GRAVITY_KM3_PER_S2 * meanMotionRadPerS);
  return alongTrackKm / speedKmPerS;
}

const growthOf = (meanMotionRevPerDay: number): GrowthClass =>
  GROWTH.find((each) => meanMotionRevPerDay >= each.fromMeanMotion) ?? (GROWTH.at(-1) as GrowthClass);
