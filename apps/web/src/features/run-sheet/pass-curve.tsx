import type { PassDetail } from '@skyberth/shared';
import { useMemo } from 'react';
import { maskElevationAt } from '../../drawing/common/rose.js';
import { SmallHump } from '../../drawing/curves/small-hump.js';

interface PassCurveProps {
  readonly detail: PassDetail;
  readonly nowMs: number;
  readonly widthPx?: number;
  readonly heightPx?: number;
}

/** The pass over its own horizon with the brass line of now; the figures beside it say the same in words. */
export function PassCurve({ detail, nowMs, widthPx = 260, heightPx = 120 }: PassCurveProps) {
  const profile = useMemo(() => profileOf(detail), [detail]);
  const [aosMs, losMs] = [Date.parse(detail.aosUtc), Date.parse(detail.losUtc)];
  return (
    <SmallHump
      profile={profile}
      aosMs={aosMs}
      losMs={losMs}
      nowMs={nowMs}
      widthPx={widthPx}
      heightPx={heightPx}
      look="berth"
    />
  );
}

function profileOf({ track, antenna, aosUtc, losUtc }: PassDetail) {
  const mask = antenna.mask.map(([azimuthDeg, elevationDeg]) => ({ azimuthDeg, elevationDeg }));
  return {
    fromMs: Date.parse(track[0]?.timeUtc ?? aosUtc),
    toMs: Date.parse(track.at(-1)?.timeUtc ?? losUtc),
    elevationDeg: Float32Array.from(track, (one) => one.elevationDeg),
    maskDeg: Float32Array.from(track, (one) => maskElevationAt(mask, one.azimuthDeg)),
  };
}
