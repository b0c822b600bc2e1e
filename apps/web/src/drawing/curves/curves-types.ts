/** What the stacked curves of a contact are fed with. */

/** One panel: a quantity against the shared time axis. */
export interface CurvePanel {
  readonly id: string;
  /** `Elevation` */
  readonly title: string;
  /** `degrees, over the antenna's own horizon` */
  readonly note?: string;
  /** The present value in words, at the right: `39.5° now, 65.8° at 14:06:30`. */
  readonly reading?: string;
  /** Unit after a value in the text alternative and the pointer's read-out. */
  readonly unit: string;
  /** Decimals in the pointer's read-out. Default 1. */
  readonly decimals?: number;
  /** Equal steps from `fromMs` to `toMs` of the chart; NaN where there is no value. */
  readonly values: Float32Array;
  /** Land below the curve (the mask), same steps. */
  readonly land?: Float32Array;
  /** Fixed span; by default the panel fits its values with round steps. */
  readonly minValue?: number;
  readonly maxValue?: number;
  /** Water between curve and land for the time already flown. Default false. */
  readonly filled?: boolean;
  /** Below this the panel is hatched, with a sentence. */
  readonly floor?: { readonly value: number; readonly text: string };
  /** Height of the plot in px. Default 100. */
  readonly heightPx?: number;
}

/** A named stretch on the bar above the panels. */
export interface CurvePhase {
  readonly fromMs: number;
  readonly toMs: number;
  readonly label: string;
  /** `contact` is filled; `guard` (set-up, tear-down) is outlined. */
  readonly kind: 'contact' | 'guard';
}

/** Props of `ContactCurves`. */
export interface ContactCurvesProps {
  readonly label: string;
  readonly fromMs: number;
  readonly toMs: number;
  readonly aosMs: number;
  readonly losMs: number;
  readonly nowMs?: number;
  readonly phases?: readonly CurvePhase[];
  readonly panels: readonly CurvePanel[];
}

/** One step of a cancellation ladder, in order of time. */
export interface RefundStep {
  readonly percent: number;
  /** `till 24 h`, `till 14:30:05`, `after that` */
  readonly untilText: string;
  /** The step that holds at this moment. */
  readonly isNow?: boolean;
}
