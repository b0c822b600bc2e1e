import { describe, expect, it } from 'vitest';
import {
  axisStep,
  clampView,
  DAY_MS,
  LARGEST_SPAN_MS,
  LEAST_SPAN_MS,
  multiplesInView,
  panView,
  spanText,
  timeToX,
  xToTime,
  zoomView,
} from './view.js';

const T0 = Date.UTC(2026, 11, 1, 14);
const THREE_HOURS = { fromMs: T0, toMs: T0 + 3 * 3_600_000 };

describe('the view of the board', () => {
  it('goes from time to pixels and back', () => {
    expect(timeToX(THREE_HOURS, 900, T0 + 3_600_000)).toBe(300);
    expect(xToTime(THREE_HOURS, 900, 300)).toBe(T0 + 3_600_000);
  });

  it('keeps the instant under the pointer while zooming', () => {
    const anchor = T0 + 2_000_000;
    const near = zoomView(THREE_HOURS, 0.37, anchor);
    expect(timeToX(near, 900, anchor)).toBeCloseTo(timeToX(THREE_HOURS, 900, anchor), 6);
  });

  it('stops at two minutes and at fourteen days', () => {
    const close = zoomView(THREE_HOURS, 1e-9, T0);
    expect(close.toMs - close.fromMs).toBe(LEAST_SPAN_MS);
    const wide = zoomView(THREE_HOURS, 1e9, T0);
    expect(wide.toMs - wide.fromMs).toBe(LARGEST_SPAN_MS);
  });

  it('does not leave its limits, and keeps its width at their edge', () => {
    const limits = { fromMs: T0, toMs: T0 + DAY_MS };
    const moved = panView(THREE_HOURS, -5 * DAY_MS, limits);
    expect(moved).toEqual(THREE_HOURS);
    const end = panView(THREE_HOURS, 5 * DAY_MS, limits);
    expect(end.toMs).toBe(limits.toMs);
    expect(end.toMs - end.fromMs).toBe(3 * 3_600_000);
    const all = clampView({ fromMs: T0 - DAY_MS, toMs: T0 + 9 * DAY_MS }, limits);
    expect(all).toEqual(limits);
  });

  it('keeps labels apart at every zoom', () => {
    for (let span = LEAST_SPAN_MS; span <= LARGEST_SPAN_MS; span *= 1.31) {
      for (const widthPx of [340, 860, 1600]) {
        const step = axisStep({ fromMs: T0, toMs: T0 + span }, widthPx);
        expect((step.labelMs / span) * widthPx).toBeGreaterThanOrEqual(96);
        expect(step.labelMs % step.barMs).toBe(0);
      }
    }
  });

  it('starts its marks at or before the left edge', () => {
    const marks = multiplesInView({ fromMs: T0 + 1, toMs: T0 + 3_600_000 }, 1_800_000);
    expect(marks[0]).toBe(T0);
    expect(marks.at(-1)).toBeGreaterThan(T0 + 3_600_000);
  });

  it('says how much is in view', () => {
    expect(spanText(THREE_HOURS).replace('\u00a0', ' ')).toBe('3 h in view');
    expect(spanText({ fromMs: T0, toMs: T0 + LARGEST_SPAN_MS }).replace('\u00a0', ' ')).toBe('14 d in view');
  });
});
