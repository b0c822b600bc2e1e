/** Seen from far away a pass is a tick whose height is its elevation; its state is in the tick's make. */
import { elevationShare } from '../../common/elevation-scale.js';
import { baseLinePx, type PlacedRow } from '../rows.js';
import type { BoardHump } from '../tide-board-types.js';
import type { Brush } from './brush.js';

/** A hump narrower than this is drawn as a tick. */
export const TICK_BELOW_PX = 9;

/** Draws one tick. */
export function paintTick(brush: Brush, row: PlacedRow, hump: BoardHump, isPicked: boolean): void {
  const { ctx, palette, layout } = brush;
  const baseY = baseLinePx(row, layout.measures);
  const x = (brush.x(hump.aosMs) + brush.x(hump.losMs)) / 2;
  const top = baseY - Math.max(4, elevationShare(hump.highestDeg) * layout.measures.humpPx);
  const solid = (colour: string, widthPx: number) => {
    ctx.fillStyle = colour;
    ctx.fillRect(x - widthPx / 2, top, widthPx, baseY - top);
  };
  if (isPicked) {
    ctx.fillStyle = palette.brassWash;
    ctx.fillRect(x - 5, row.topPx + 2, 10, layout.measures.rowPx - 3);
    ctx.fillStyle = palette.ink;
    ctx.fillRect(x - 5.5, row.topPx + 2, 1.5, layout.measures.rowPx - 3);
    ctx.fillRect(x + 4, row.topPx + 2, 1.5, layout.measures.rowPx - 3);
  }
  if (hump.state === 'forSale') solid(palette.deep, 1.7);
  else if (hump.state === 'berth' || hump.state === 'underWay') {
    solid(palette.deep, 4.5);
    ctx.fillStyle = palette.ink;
    ctx.fillRect(x - 4, baseY + 1.8, 8, 3.4);
  } else if (hump.state === 'done') {
    solid(palette.slate, 4.5);
    ctx.fillStyle = palette.ink;
    ctx.fillRect(x - 4, baseY + 2.7, 8, 1.6);
  } else if (hump.state === 'asked') {
    ctx.strokeStyle = palette.deep;
    ctx.lineWidth = 1.2;
    ctx.strokeRect(x - 2.4, top, 4.8, baseY - top);
    ctx.fillStyle = palette.ink;
    ctx.fillRect(x - 4.5, baseY + 1.8, 3.5, 3.4);
    ctx.fillRect(x + 1, baseY + 1.8, 3.5, 3.4);
  } else dashed(brush, x, top, baseY, hump.state === 'held');
}

function dashed(brush: Brush, x: number, top: number, baseY: number, isHeld: boolean): void {
  const { ctx, palette } = brush;
  ctx.setLineDash(isHeld ? [4.5, 3] : [1.2, 3]);
  ctx.strokeStyle = isHeld ? palette.brassInk : palette.ink3;
  ctx.lineWidth = isHeld ? 2.6 : 1.2;
  ctx.beginPath();
  ctx.moveTo(x, baseY);
  ctx.lineTo(x, top);
  ctx.stroke();
  ctx.setLineDash([]);
}
