/** The dashed outline of a hold, as a small sign. */
export function HoldOutline({
  widthPx = 34,
  colour = 'var(--sk-brass-ink)',
}: {
  readonly widthPx?: number;
  readonly colour?: string;
}) {
  return (
    <svg
      width={widthPx}
      height={widthPx * 0.62}
      viewBox="0 0 34 21"
      aria-hidden="true"
      focusable="false"
      style={{ flex: 'none' }}
    >
      <path
        d="M2 18.5 C10 17 12 2.5 17 2.5 S24 17 32 18.5 Z"
        fill="none"
        stroke={colour}
        strokeWidth="1.8"
        strokeDasharray="4.5 3"
        strokeLinejoin="round"
      />
    </svg>
  );
}
