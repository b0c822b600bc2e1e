/**
 * Which part of a pass a mount can follow, and why not the rest: end stops, a cable that has to be unwound, and the
 * keyhole, where an axis would have to turn faster than it can. The gap reckoned is the shortest one that a control unit
 * can manage when it knows the pass beforehand: it may run ahead of the spacecraft and let it pass, then take it up again.
 */
import { type AzEl, axisAngles, axisMoveS, firstAxisTurns, inTravel, type Mount } from './mount.js';

export type MountGapCode = 'keyhole' | 'travel' | 'unwind';

export interface MountGap {
  readonly fromMs: number;
  readonly toMs: number;
  readonly code: MountGapCode;
  readonly sentence: string;
}

export interface MountCoverage {
  /** What can be followed, in rising order, not touching a gap. */
  readonly intervals: readonly { readonly fromMs: number; readonly toMs: number }[];
  readonly gaps: readonly MountGap[];
}

/** Where the spacecraft stands at an instant; look angles are. */
export type TrackPoint = AzEl & { readonly timeMs: number };

/** One sample of the track as the axes see it; `first` runs on through whole turns. */
interface Sample {
  readonly timeMs: number;
  readonly first: number;
  readonly second: number;
}

/** What the axes cannot do between two samples, by index; both ends are still on the spacecraft. */
interface Lost {
  readonly from: number;
  readonly to: number;
  readonly code: MountGapCode;
  readonly sentence: string;
}

/**
 * Judges a track whose samples lie close enough to see the axes' rates: one second is ample, ten are too few near the
 * zenith. Edges of gaps fall on samples.
 */
export function mountCoverage(track: readonly TrackPoint[], mount: Mount): MountCoverage {
  if (track.length < 2) return { intervals: [], gaps: [] };
  const samples = unwrap(track, mount);
  const lost = [...beyondStops(samples, mount), ...unwinding(samples, mount), ...tooFast(samples, mount)];
  const gaps = merge(lost).map(({ from, to, code, sentence }) => ({
    fromMs: samples[from]!.timeMs,
    toMs: samples[to]!.timeMs,
    code,
    sentence,
  }));
  return { intervals: between(gaps, samples[0]!.timeMs, samples.at(-1)!.timeMs), gaps };
}

function unwrap(track: readonly TrackPoint[], mount: Mount): Sample[] {
  let turns = 0;
  let before: number | undefined;
  return track.map((look) => {
    const [first, second] = axisAngles(mount, look);
    if (firstAxisTurns(mount) && before !== undefined) turns += Math.round((before - (first + 360 * turns)) / 360);
    before = first + 360 * turns;
    return { timeMs: look.timeMs, first: before, second };
  });
}

/** Runs of samples outside the stops of the second axis, or of X, that no choice of turn can help. */
function beyondStops(samples: readonly Sample[], mount: Mount): Lost[] {
  const lost: Lost[] = [];
  const name = mount.kind === 'x-y' ? ['X', 'Y'] : ['azimuth', 'elevation'];
  const firstFixed = !firstAxisTurns(mount);
  for (const run of runs(samples, (s) => !inTravel(mount.second, s.second))) {
    lost.push({ ...run, code: 'travel', sentence: stopSentence(name[1]!, mount.second) });
  }
  if (firstFixed) {
    for (const run of runs(samples, (s) => !inTravel(mount.first, s.first))) {
      lost.push({ ...run, code: 'travel', sentence: stopSentence(name[0]!, mount.first) });
    }
  }
  return lost;
}

function stopSentence(axis: string, { minDeg, maxDeg }: { minDeg?: number; maxDeg?: number }): string {
  return `The spacecraft is beyond the ${axis} travel of ${minDeg ?? 'any'} to ${maxDeg ?? 'any'} degrees.`;
}

function runs(samples: readonly Sample[], out: (sample: Sample) => boolean): { from: number; to: number }[] {
  const found: { from: number; to: number }[] = [];
  samples.forEach((sample, index) => {
    if (!out(sample)) return;
    const last = found.at(-1);
    if (last !== undefined && last.to === index - 1) found[found.length - 1] = { from: last.from, to: index };
    else found.push({ from: index, to: index });
  });
  return found;
}

/**
 * Azimuth with end stops: starts on the turn that lasts longest, and unwinds a whole turn each time a stop is reached.
 */
function unwinding(samples: readonly Sample[], mount: Mount): Lost[] {
  const { minDeg, maxDeg } = mount.first;
  if (!firstAxisTurns(mount) || minDeg === undefined || maxDeg === undefined) return [];
  const lost: Lost[] = [];
  let at = 0;
  while (at < samples.length) {
    const { turn, until } = longestTurn(samples, at, minDeg, maxDeg);
    if (until === undefined) return lost;
    const from = Math.max(at, until - 1);
    const to =
      turn === undefined ? nextReachable(samples, until, minDeg, maxDeg) : unwound(samples, mount, from, until);
    const sentence =
      turn === undefined
        ? `The azimuth travel of ${minDeg} to ${maxDeg} degrees does not reach the spacecraft.`
        : `The azimuth reaches its end stop at ${(samples[from]!.first + 360 * turn).toFixed(0)} degrees and has to unwind a whole turn.`;
    lost.push({ from, to, code: turn === undefined ? 'travel' : 'unwind', sentence });
    if (to >= samples.length - 1) return lost;
    at = to;
  }
  return lost;
}

/** Of the turns that fit at a sample, the one whose stop is met last, and the first sample beyond it. */
function longestTurn(
  samples: readonly Sample[],
  at: number,
  minDeg: number,
  maxDeg: number,
): { turn: number | undefined; until: number | undefined } {
  let turn: number | undefined;
  let until: number | undefined = at;
  const start = samples[at]!.first;
  for (let candidate = Math.ceil((minDeg - start) / 360); start + 360 * candidate <= maxDeg; candidate += 1) {
    const out = samples.findIndex(
      (s, i) => i >= at && !(s.first + 360 * candidate >= minDeg && s.first + 360 * candidate <= maxDeg),
    );
    if (out === -1) return { turn: candidate, until: undefined };
    if (turn === undefined || out > until) [turn, until] = [candidate, out];
  }
  return { turn, until };
}

function nextReachable(samples: readonly Sample[], from: number, minDeg: number, maxDeg: number): number {
  const index = samples.findIndex((s, i) => i > from && s.first + 360 * Math.ceil((minDeg - s.first) / 360) <= maxDeg);
  return index === -1 ? samples.length - 1 : index;
}

/** First sample that the dish has caught up with after turning back by 360 degrees. */
function unwound(samples: readonly Sample[], mount: Mount, from: number, until: number): number {
  const direction = Math.sign(samples[until]!.first - samples[from]!.first) || 1;
  for (let to = until; to < samples.length; to += 1) {
    const wayDeg = samples[to]!.first - samples[from]!.first - 360 * direction;
    if (axisMoveS(mount.first, wayDeg) * 1000 <= samples[to]!.timeMs - samples[from]!.timeMs) return to;
  }
  return samples.length - 1;
}

type AxisName = 'first' | 'second';

/** Stretches where a rate or an acceleration is beyond an axis, widened to what the axes can bridge in the time. */
function tooFast(samples: readonly Sample[], mount: Mount): Lost[] {
  const lost: Lost[] = [];
  for (let i = 0; i + 1 < samples.length; i += 1) {
    const limit = beyondAxis(samples, i, mount);
    if (limit === undefined) continue;
    const bridge = shortestBridge(samples, i, i + 1, mount);
    lost.push({ ...bridge, code: 'keyhole', sentence: keyholeSentence(samples, bridge, limit, mount) });
    i = Math.max(i, bridge.to - 1);
  }
  return lost;
}

function keyholeSentence(
  samples: readonly Sample[],
  { from, to }: { from: number; to: number },
  limit: { axis: AxisName; of: 'rate' | 'acceleration' },
  mount: Mount,
): string {
  const { rateDegPerS, accelerationDegPerS2 } = mount[limit.axis];
  const names =
    mount.kind === 'x-y' ? { first: 'X axis', second: 'Y axis' } : { first: 'azimuth', second: 'elevation' };
  const lengthS = ((samples[to]!.timeMs - samples[from]!.timeMs) / 1000).toFixed(0);
  const must =
    limit.of === 'rate'
      ? `turn at ${steepest(samples, from, to, limit.axis).toFixed(1)} degrees/s; the mount turns at ${rateDegPerS}`
      : `change its rate faster than the mount's ${accelerationDegPerS2} degrees/s2`;
  return `The ${names[limit.axis]} would have to ${must}, so the dish loses the spacecraft for ${lengthS} s.`;
}

/** Which limit the step after a sample breaks, the rate before the acceleration; undefined if none. */
function beyondAxis(
  samples: readonly Sample[],
  i: number,
  mount: Mount,
): { axis: AxisName; of: 'rate' | 'acceleration' } | undefined {
  const [before, from, to] = [samples[i - 1], samples[i]!, samples[i + 1]!];
  for (const axis of ['first', 'second'] as const) {
    if (Math.abs(slope(from, to, axis)) > mount[axis].rateDegPerS) return { axis, of: 'rate' };
  }
  if (before === undefined) return undefined;
  const spanS = (to.timeMs - before.timeMs) / 2000;
  return (['first', 'second'] as const)
    .filter((axis) => {
      const change = Math.abs(slope(from, to, axis) - slope(before, from, axis)) / spanS;
      return change > (mount[axis].accelerationDegPerS2 ?? Number.POSITIVE_INFINITY);
    })
    .map((axis) => ({ axis, of: 'acceleration' as const }))[0];
}

function slope(from: Sample, to: Sample, name: AxisName): number {
  return ((to[name] - from[name]) * 1000) / (to.timeMs - from.timeMs);
}

function steepest(samples: readonly Sample[], from: number, to: number, axis: AxisName): number {
  let fastest = 0;
  for (let i = from; i < to; i += 1) fastest = Math.max(fastest, Math.abs(slope(samples[i]!, samples[i + 1]!, axis)));
  return fastest;
}

/**
 * The shortest stretch around `from..to` that the axes cross from rest to rest in the time it lasts. Resting at both ends
 * is more than a running dish needs, so the gap is never told too short. Without one, to the end of the pass.
 */
function shortestBridge(
  samples: readonly Sample[],
  from: number,
  to: number,
  mount: Mount,
): { from: number; to: number } {
  let best: { from: number; to: number } | undefined;
  const lengthMs = (a: number, b: number) => samples[b]!.timeMs - samples[a]!.timeMs;
  for (let a = from; a >= 0; a -= 1) {
    if (best !== undefined && lengthMs(a, to) >= lengthMs(best.from, best.to)) break;
    for (let b = to; b < samples.length; b += 1) {
      if (best !== undefined && lengthMs(a, b) >= lengthMs(best.from, best.to)) break;
      if (bridged(samples[a]!, samples[b]!, mount)) {
        best = { from: a, to: b };
        break;
      }
    }
  }
  return best ?? { from, to: samples.length - 1 };
}

function bridged(from: Sample, to: Sample, mount: Mount): boolean {
  // A mount that goes round may take the shorter way: after a pass through the zenith the azimuth is half a turn off
  // either way.
  const way = to.first - from.first;
  const firstDeg = firstAxisTurns(mount) && mount.first.minDeg === undefined ? way - 360 * Math.round(way / 360) : way;
  const needS = Math.max(axisMoveS(mount.first, firstDeg), axisMoveS(mount.second, to.second - from.second));
  return needS * 1000 <= to.timeMs - from.timeMs;
}

/** Overlapping losses become one, told by the reason that begins first. */
function merge(lost: readonly Lost[]): Lost[] {
  const merged: Lost[] = [];
  for (const next of [...lost].sort((a, b) => a.from - b.from)) {
    const last = merged.at(-1);
    if (last !== undefined && next.from <= last.to)
      merged[merged.length - 1] = { ...last, to: Math.max(last.to, next.to) };
    else merged.push(next);
  }
  return merged;
}

function between(gaps: readonly MountGap[], fromMs: number, toMs: number): { fromMs: number; toMs: number }[] {
  const intervals: { fromMs: number; toMs: number }[] = [];
  let openMs = fromMs;
  for (const gap of gaps) {
    if (gap.fromMs > openMs) intervals.push({ fromMs: openMs, toMs: gap.fromMs });
    openMs = gap.toMs;
  }
  if (toMs > openMs) intervals.push({ fromMs: openMs, toMs });
  return intervals;
}
