import { formatDegrees } from '../../ui/format.js';
import { type Rose, toPoint } from '../common/rose.js';
import type { EditableMaskPoint } from './mask-editor-types.js';

const PLATE = { width: 122, height: 44, gap: 20, lean: 22 } as const;
const SAME_DEG = 0.05;

interface PointPlateProps {
  readonly rose: Rose;
  readonly point: EditableMaskPoint;
  /** The mask in force at the same azimuth; null without one. */
  readonly wasDeg: number | null;
}

/** Azimuth, elevation and the old value of the picked point, on a plate towards the middle of the rose. */
export function PointPlate({ rose, point, wasDeg }: PointPlateProps) {
  const { x, y } = toPoint(rose, point.azimuthDeg, point.elevationDeg);
  const isLow = y > rose.centreY;
  const hasWas = wasDeg !== null && Math.abs(wasDeg - point.elevationDeg) > SAME_DEG;
  const height = hasWas ? PLATE.height : 27;
  const left = x < rose.centreX ? x - PLATE.lean : x + PLATE.lean - PLATE.width;
  const top = isLow ? y - PLATE.gap - height : y + PLATE.gap;
  const edgeY = isLow ? top + height : top;
  const tipX = Math.max(left + 12, Math.min(x, left + PLATE.width - 12));
  return (
    <g pointerEvents="none">
      <rect
        x={left}
        y={top}
        width={PLATE.width}
        height={height}
        rx="3"
        fill="var(--sk-sheet)"
        stroke="var(--sk-ink)"
        strokeWidth="1.5"
      />
      <path
        d={`M${tipX - 7} ${edgeY} L${tipX} ${edgeY + (isLow ? 8 : -8)} L${tipX + 7} ${edgeY}`}
        fill="var(--sk-sheet)"
        stroke="var(--sk-ink)"
        strokeWidth="1.5"
      />
      <text x={left + 10} y={top + 17} fontSize="13" fontWeight="800" fill="var(--sk-ink)">
        {formatDegrees(point.azimuthDeg)} at {formatDegrees(point.elevationDeg)}
      </text>
      {hasWas && (
        <text x={left + 10} y={top + 34} fontSize="12" fill="var(--sk-ink2)">
          was {formatDegrees(wasDeg)}
        </text>
      )}
    </g>
  );
}
