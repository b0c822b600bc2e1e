/** What the mask editor is fed with. It changes nothing itself: every act calls `onChange` with the whole new list. */
import type { MaskPoint } from '../sky-plot/sky-plot-types.js';

/** An editable point: `id` stays with it while it moves, so that table and rose agree on the picked one. */
export interface EditableMaskPoint extends MaskPoint {
  readonly id: string;
}

/** Minutes of passes in 10 degrees of azimuth, under the old and the new mask. */
export interface AzimuthMinutes {
  readonly fromAzimuthDeg: number;
  readonly minutesBefore: number;
  readonly minutesNow: number;
}

/** A named thing on the horizon, such as a water tower. */
export interface MaskNote extends MaskPoint {
  readonly text: string;
}

/** Props of `MaskEditor`. */
export interface MaskEditorProps {
  readonly label: string;
  /** In ascending azimuth. */
  readonly points: readonly EditableMaskPoint[];
  /** The mask in force, drawn dashed; handles that differ from it are brass. */
  readonly before?: readonly EditableMaskPoint[];
  readonly pickedId?: string | null;
  readonly onPick: (id: string | null) => void;
  /** `settled` is false while dragging and true when let go: compute costly effects then. */
  readonly onChange: (points: readonly EditableMaskPoint[], settled: boolean) => void;
  /** 36 bars outside the rim; left out when not given. */
  readonly minutes?: readonly AzimuthMinutes[];
  readonly notes?: readonly MaskNote[];
  /** Shows without handles. Default false. */
  readonly readOnly?: boolean;
}
