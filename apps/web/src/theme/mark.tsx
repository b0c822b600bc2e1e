/** Props of `Mark`. */
export interface MarkProps {
  /** Width in px; below 20 the strokes of water are dropped. Default 34. */
  readonly widthPx?: number;
  /** Read aloud in place of the drawing; without it the mark is decoration beside the name. */
  readonly label?: string;
}

const LEAST_WIDTH_WITH_WATER_PX = 20;

/** The sign of Skyberth: a hump of deep water on the horizon, two strokes of brass below. */
export function Mark({ widthPx = 34, label }: MarkProps) {
  const hasWater = widthPx >= LEAST_WIDTH_WITH_WATER_PX;
  return (
    <svg
      width={widthPx}
      height={(widthPx * 24) / 34}
      viewBox="0 0 34 24"
      role={label ? 'img' : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
      focusable="false"
    >
      <path d="M8 16 C12 16 11 3.2 17 3.2 S22 16 26 16 Z" fill="var(--sk-deep)" />
      <path d="M0.5 16.2 H33.5" stroke="var(--sk-ink)" strokeWidth="2.4" />
      {hasWater && (
        <path
          d="M7 21.4 h11 M21 21.4 h5.5"
          stroke="var(--sk-brass)"
          strokeWidth="2.4"
          strokeLinecap="round"
          fill="none"
        />
      )}
    </svg>
  );
}
