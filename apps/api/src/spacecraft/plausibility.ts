/** Whether a set that nobody has looked at can be of the spacecraft whose number it carries. */
import type { ElementSet } from '@skyberth/orbit';

/** No source can know an epoch later than this. */
const FUTURE_MS = 2 * 86_400_000;
/** A spacecraft turns its plane by so little, and changes its period by so little, between two sets of a feed. */
const MOST_INCLINATION_CHANGE_DEG = 0.5;
const MOST_MEAN_MOTION_CHANGE = 0.02;

/** A sentence, or null for a set that can be believed. `before` is the set in force, where there is one. */
export function implausible(set: ElementSet, before: ElementSet | null, nowMs: number): string | null {
  const name = `The set of ${set.catalogNumber}, epoch ${set.epochUtc},`;
  if (set.epochMs > nowMs + FUTURE_MS) return `${name} lies in the future.`;
  if (!before) return null;
  const turnedDeg = Math.abs(set.inclinationDeg - before.inclinationDeg);
  if (turnedDeg > MOST_INCLINATION_CHANGE_DEG) return `${name} turns the orbit by ${turnedDeg.toFixed(2)} degrees.`;
  const change = Math.abs(set.meanMotionRevPerDay / before.meanMotionRevPerDay - 1);
  if (change > MOST_MEAN_MOTION_CHANGE) return `${name} changes the period by ${(change * 100).toFixed(1)} percent.`;
  return null;
}
