import { type Rose, sectorPath } from '../common/rose.js';
import type { AzimuthMinutes } from './mask-editor-types.js';

const FROM_RIM_PX = 36;
const LONGEST_PX = 34;
const GAP_DEG = 1.4;
const WIDTH_DEG = 10;
/** A loss of a few seconds still has to be seen. */
const LEAST_DIFFERENCE_PX = 3;

interface MinuteBarsProps {
  readonly rose: Rose;
  readonly minutes: readonly AzimuthMinutes[];
  readonly lostId: string;
}

/** Bars outside the rim: minutes of passes in each 10 degrees. What the new mask takes away is drawn on top in red. */
export function MinuteBars({ rose, minutes, lostId }: MinuteBarsProps) {
  const most = Math.max(1e-6, ...minutes.map((bar) => Math.max(bar.minutesBefore, bar.minutesNow)));
  const innerPx = rose.radiusPx + FROM_RIM_PX;
  return minutes.map((bar) => {
    const [from, to] = [bar.fromAzimuthDeg + GAP_DEG / 2, bar.fromAzimuthDeg + WIDTH_DEG - GAP_DEG / 2];
    const nowPx = (bar.minutesNow / most) * LONGEST_PX;
    const change = ((bar.minutesBefore - bar.minutesNow) / most) * LONGEST_PX;
    const lostPx = change > 0 ? Math.max(LEAST_DIFFERENCE_PX, change) : 0;
    const gainedPx = change < 0 ? Math.min(nowPx, Math.max(LEAST_DIFFERENCE_PX, -change)) : 0;
    const lost = sectorPath(rose, from, to, innerPx + nowPx, innerPx + nowPx + lostPx);
    return (
      <g key={bar.fromAzimuthDeg}>
        {nowPx > 0 && (
          <path d={sectorPath(rose, from, to, innerPx, innerPx + nowPx)} fill="var(--sk-deep)" fillOpacity="0.82" />
        )}
        {lostPx > 0 && (
          <>
            <path d={lost} fill="var(--sk-buoy-wash)" />
            <path d={lost} fill={`url(#${lostId})`} stroke="var(--sk-buoy)" strokeWidth="1" />
          </>
        )}
        {gainedPx > 0 && (
          <path
            d={sectorPath(rose, from, to, innerPx + nowPx - gainedPx, innerPx + nowPx)}
            fill="var(--sk-kelp-wash)"
            stroke="var(--sk-kelp)"
            strokeWidth="1.2"
          />
        )}
      </g>
    );
  });
}
