/** At close zoom the curve tells its figures: elevation above it and Doppler below, at each label of the axis. */
import { formatDegrees, formatNumber } from '../../../ui/format.js';
import { elevationShare } from '../../common/elevation-scale.js';
import { sampleAt } from '../curve.js';
import { baseLinePx, type PlacedRow } from '../rows.js';
import type { BoardHump } from '../tide-board-types.js';
import { axisStep, multiplesInView } from '../view.js';
import { type Brush, FONT } from './brush.js';

/** A hump wider than this has room for figures. */
export const CLOSE_UP_FROM_PX = 620;

/** Writes the figures along one curve; gives back the boxes that they cover. */
export function paintCloseUp(brush: Brush, row: PlacedRow, hump: BoardHump) {
  const { ctx, palette, view, widthPx, layout } = brush;
  const baseY = baseLinePx(row, layout.measures);
  const covered: { x0: number; y0: number; x1: number; y1: number }[] = [];
  ctx.textAlign = 'center';
  ctx.font = FONT.axis;
  for (const atMs of multiplesInView(view, axisStep(view, widthPx).labelMs)) {
    if (atMs <= hump.aosMs || atMs >= hump.losMs) continue;
    const x = brush.x(atMs);
    if (x < 30 || x > widthPx - 30) continue;
    const elevationDeg = sampleAt(hump.profile, hump.profile.elevationDeg, atMs);
    const y = baseY - elevationShare(elevationDeg) * layout.measures.humpPx;
    ctx.fillStyle = palette.ink;
    ctx.fillRect(x - 2.2, y - 2.2, 4.4, 4.4);
    const above = Math.max(row.topPx + layout.measures.headroomPx + 8, y - 11);
    ctx.fillText(formatDegrees(elevationDeg), x, above);
    covered.push({ x0: x - 24, y0: above - 8, x1: x + 24, y1: above + 8 });
    if (!hump.profile.dopplerHz || y + 13 > baseY - 4) continue;
    const dopplerKhz = sampleAt(hump.profile, hump.profile.dopplerHz, atMs) / 1000;
    ctx.fillStyle = hump.state === 'berth' || hump.state === 'underWay' ? palette.berthInk : palette.ink2;
    ctx.fillText(`${dopplerKhz > 0 ? '+' : ''}${formatNumber(dopplerKhz, 1)} kHz`, x, y + 13);
    covered.push({ x0: x - 34, y0: y + 5, x1: x + 34, y1: y + 21 });
  }
  return covered;
}
