/** Scales of a panel: round spans and grid lines, and reading a value off equally spaced samples. */

/** Span and grid of a panel. */
export interface PanelScale {
  readonly min: number;
  readonly max: number;
  readonly ticks: readonly number[];
}

const MOST_STEPS = 5;
const ROUND_STEPS = [1, 2, 2.5, 5, 10];

/** Smallest round step with which a span needs at most a few grid lines. */
export function roundStep(span: number, mostSteps = MOST_STEPS): number {
  const raw = span / mostSteps;
  const power = 10 ** Math.floor(Math.log10(raw));
  return (ROUND_STEPS.find((step) => step * power >= raw * (1 - 1e-9)) ?? 10) * power;
}

/** Grid for a span that may be fixed on either side; without any value it runs from 0 to 1. */
export function panelScale(
  values: Float32Array,
  fixed: { min?: number | undefined; max?: number | undefined; mostSteps?: number } = {},
): PanelScale {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  if (low > high) [low, high] = [0, 1];
  low = fixed.min ?? low;
  high = fixed.max ?? high;
  if (high - low < 1e-9) high = low + 1;
  const step = roundStep(high - low, fixed.mostSteps);
  const min = fixed.min ?? Math.floor(low / step) * step;
  const max = fixed.max ?? Math.ceil(high / step) * step;
  const ticks: number[] = [];
  for (let tick = Math.ceil(min / step - 1e-9) * step; tick <= max + step * 1e-6; tick += step) {
    ticks.push(Math.abs(tick) < step * 1e-6 ? 0 : tick);
  }
  return { min, max, ticks };
}

/** Value at a share (0 to 1) of equally spaced samples, straight between them; NaN where either neighbour is. */
export function valueAtShare(values: Float32Array, share: number): number {
  const place = Math.max(0, Math.min(1, share)) * (values.length - 1);
  const low = Math.floor(place);
  const from = values[low] ?? Number.NaN;
  if (place === low) return from;
  return from + (place - low) * ((values[low + 1] ?? Number.NaN) - from);
}
