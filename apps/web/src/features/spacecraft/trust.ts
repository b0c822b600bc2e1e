/** How far elements can be trusted as they age: the curve that is drawn, and the instants at which it crosses a limit. Pure. */
import { elementAgeErrorS } from '@skyberth/orbit';
import { FRESHNESS_FROM_S } from '@skyberth/shared';

const DAY_H = 24;
const LONGEST_H = 400 * DAY_H;
const SHORTEST_SHOWN_H = 7 * DAY_H;
/** Beyond the present and the last limit, so that the curve is seen to go on. */
const MARGIN = 1.15;
const POINTS = 80;
/** Halvings until the age is known to well under a second. */
const HALVINGS = 40;

export interface TrustPoint {
  readonly ageH: number;
  readonly errorS: number;
}

export interface TrustCurve {
  readonly points: readonly TrustPoint[];
  /** Age at which the elements are ageing and stale; null where that is more than 400 days. */
  readonly ageingH: number | null;
  readonly staleH: number | null;
  /** Right end of the drawing, hours after the epoch; the left end is the epoch. */
  readonly endH: number;
}

/** Age in hours at which the estimated error reaches `limitS`, or null where that is more than 400 days away. */
export function ageAtError(limitS: number, meanMotionRevPerDay: number): number | null {
  const errorS = (ageH: number) => elementAgeErrorS({ ageH, meanMotionRevPerDay });
  if (errorS(0) >= limitS) return 0;
  if (errorS(LONGEST_H) < limitS) return null;
  let [below, above] = [0, LONGEST_H];
  for (let halving = 0; halving < HALVINGS; halving += 1) {
    const middle = (below + above) / 2;
    if (errorS(middle) < limitS) below = middle;
    else above = middle;
  }
  return above;
}

/** The curve from the epoch to some time after both now and the day on which the set is stale. */
export function trustCurve(meanMotionRevPerDay: number, ageH: number): TrustCurve {
  const ageingH = ageAtError(FRESHNESS_FROM_S.ageing, meanMotionRevPerDay);
  const staleH = ageAtError(FRESHNESS_FROM_S.stale, meanMotionRevPerDay);
  const lastH = Math.max(SHORTEST_SHOWN_H, Math.abs(ageH), staleH ?? ageingH ?? 0);
  const endH = lastH * MARGIN;
  const points = Array.from({ length: POINTS + 1 }, (_, index) => {
    const at = (index / POINTS) * endH;
    return { ageH: at, errorS: elementAgeErrorS({ ageH: at, meanMotionRevPerDay }) };
  });
  return { points, ageingH, staleH, endH };
}

/** Whole days between marks of the axis, so that at most `most` stand on it. */
export function dayStep(endH: number, most: number): number {
  const days = endH / DAY_H;
  return [1, 2, 5, 10, 20, 50, 100].find((step) => days / step <= most) ?? 200;
}
