/** Woven and slanted grounds as repeating tiles, sharp on any screen. */
import type { Tokens } from '../../../theme/tokens.js';

/** Tiles for one palette and one pixel density. */
export interface Patterns {
  readonly weave: CanvasPattern;
  readonly slant: CanvasPattern;
  /** From nothing to land, ending at x = 0: made once, since a gradient for each hump and frame would be waste. */
  readonly landFade: CanvasGradient;
}

const WEAVE_PX = 12;
const SLANT_PX = 7;
/** Length of the land's fade. */
export const LAND_FADE_PX = 13;

/** Draws the tiles. */
export function makePatterns(ctx: CanvasRenderingContext2D, palette: Tokens, density: number): Patterns {
  const landFade = ctx.createLinearGradient(-LAND_FADE_PX, 0, 0, 0);
  landFade.addColorStop(0, `${palette.land}00`);
  landFade.addColorStop(1, palette.land);
  return {
    landFade,
    weave: tile(ctx, WEAVE_PX, density, (t) => {
      t.strokeStyle = palette.weave;
      t.lineWidth = 1.2;
      // Two strands over, two under, turned by a quarter from cell to cell, as in a basket.
      for (const at of [1.5, 4.5]) {
        line(t, 0, at, 6, at);
        line(t, 6 + at, 0, 6 + at, 6);
        line(t, at, 6, at, 12);
        line(t, 6, 6 + at, 12, 6 + at);
      }
    }),
    slant: tile(ctx, SLANT_PX, density, (t) => {
      t.strokeStyle = palette.slant;
      t.lineWidth = 1.1;
      for (const shift of [-SLANT_PX, 0, SLANT_PX]) line(t, shift - 1, SLANT_PX + 1, shift + SLANT_PX + 1, -1);
    }),
  };
}

function tile(
  ctx: CanvasRenderingContext2D,
  sizePx: number,
  density: number,
  draw: (tileCtx: CanvasRenderingContext2D) => void,
): CanvasPattern {
  const canvas = document.createElement('canvas');
  canvas.width = Math.round(sizePx * density);
  canvas.height = canvas.width;
  const tileCtx = canvas.getContext('2d');
  const scale = canvas.width / sizePx;
  if (tileCtx) {
    tileCtx.scale(scale, scale);
    draw(tileCtx);
  }
  const pattern = ctx.createPattern(canvas, 'repeat');
  if (!pattern) throw new Error('This browser cannot repeat a pattern on a canvas.');
  pattern.setTransform(new DOMMatrix().scale(1 / scale));
  return pattern;
}

function line(ctx: CanvasRenderingContext2D, x0: number, y0: number, x1: number, y1: number): void {
  ctx.beginPath();
  ctx.moveTo(x0, y0);
  ctx.lineTo(x1, y1);
  ctx.stroke();
}
