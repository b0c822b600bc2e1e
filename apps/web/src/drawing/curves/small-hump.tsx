/** A pass as a small hump on its land, for lists and tables. */
import { elevationShare } from '../common/elevation-scale.js';
import { pathThrough } from '../common/rose.js';
import { type CurveFrame, curveBetween } from '../tide-board/curve.js';
import type { HumpProfile } from '../tide-board/tide-board-types.js';

/** Props of `SmallHump`. */
export interface SmallHumpProps {
  readonly profile: HumpProfile;
  readonly aosMs: number;
  readonly losMs: number;
  readonly widthPx?: number;
  readonly heightPx?: number;
  /** `berth` is solid, `asked` dashed. Default `plain`. */
  readonly look?: 'plain' | 'berth' | 'asked';
  /** With it, a brass line stands at that instant when it falls into the pass. */
  readonly nowMs?: number;
}

/** Decoration beside the figures, so it has no words of its own. */
export function SmallHump({
  profile,
  aosMs,
  losMs,
  widthPx = 92,
  heightPx = 34,
  look = 'plain',
  nowMs,
}: SmallHumpProps) {
  const span = profile.toMs - profile.fromMs;
  const frame: CurveFrame = {
    x: (atMs) => 2 + ((atMs - profile.fromMs) / span) * (widthPx - 4),
    baseY: heightPx - 3,
    humpPx: (heightPx - 7) / elevationShare(90),
  };
  const { xs, tops, lands } = curveBetween(profile, frame, aosMs, losMs);
  const all = curveBetween(profile, frame, profile.fromMs, profile.toMs);
  const curve = xs.map((x, at) => ({ x, y: Math.min(tops[at] as number, lands[at] as number) }));
  const bed = xs.map((x, at) => ({ x, y: lands[at] as number })).reverse();
  const land = all.xs.map((x, at) => ({ x, y: all.lands[at] as number }));
  const isNow = nowMs !== undefined && nowMs >= aosMs && nowMs <= losMs;
  return (
    <svg width={widthPx} height={heightPx} viewBox={`0 0 ${widthPx} ${heightPx}`} aria-hidden="true" focusable="false">
      <path d={`${pathThrough(land)} L${widthPx - 2} ${frame.baseY} L2 ${frame.baseY} Z`} fill="var(--sk-land)" />
      <path
        d={pathThrough([...curve, ...bed], true)}
        fill={look === 'berth' ? 'var(--sk-deep)' : 'var(--sk-shoal-wash)'}
      />
      <path
        d={pathThrough(curve)}
        fill="none"
        stroke="var(--sk-deep)"
        strokeWidth="1.7"
        strokeDasharray={look === 'asked' ? '4 2.6' : undefined}
      />
      <path d={`M0 ${frame.baseY + 0.7} H${widthPx}`} stroke="var(--sk-ink)" strokeWidth="1.5" />
      {isNow && <path d={`M${frame.x(nowMs)} 0 V${heightPx}`} stroke="var(--sk-brass)" strokeWidth="2.2" />}
    </svg>
  );
}
