/** Signs that differ by shape: they stand beside words, never alone. */
export type SignShape = 'check' | 'diamond' | 'square' | 'circle' | 'half' | 'bars' | 'up' | 'down' | 'dashed';

const SHAPES: Record<SignShape, React.ReactNode> = {
  check: <path d="M2.5 7.4 L5.6 10.6 L11.6 3.4" fill="none" stroke="currentColor" strokeWidth="2.3" />,
  diamond: (
    <path d="M7 1.2 L12.8 7 L7 12.8 L1.2 7 Z M7 4.4 V7.6 M7 9 v1" fill="none" stroke="currentColor" strokeWidth="1.6" />
  ),
  square: <rect x="2.4" y="2.4" width="9.2" height="9.2" fill="currentColor" />,
  circle: <circle cx="7" cy="7" r="5" fill="currentColor" />,
  half: (
    <>
      <circle cx="7" cy="7" r="5" fill="none" stroke="currentColor" strokeWidth="1.6" />
      <path d="M7 2 A5 5 0 0 1 7 12 Z" fill="currentColor" />
    </>
  ),
  bars: <path d="M4.6 2.6 V11.4 M9.4 2.6 V11.4" stroke="currentColor" strokeWidth="2.4" fill="none" />,
  up: <path d="M7 12.4 V2.4 M2.8 6.4 L7 2.2 L11.2 6.4" stroke="currentColor" strokeWidth="2" fill="none" />,
  down: <path d="M7 1.6 V11.6 M2.8 7.6 L7 11.8 L11.2 7.6" stroke="currentColor" strokeWidth="2" fill="none" />,
  dashed: <circle cx="7" cy="7" r="5" fill="none" stroke="currentColor" strokeWidth="1.6" strokeDasharray="2.6 2" />,
};

/** A sign in the colour of the text around it. */
export function Sign({ shape, sizePx = 14 }: { readonly shape: SignShape; readonly sizePx?: number }) {
  return (
    <svg
      width={sizePx}
      height={sizePx}
      viewBox="0 0 14 14"
      aria-hidden="true"
      focusable="false"
      style={{ flex: 'none' }}
    >
      {SHAPES[shape]}
    </svg>
  );
}

/** The red barred ring of a refusal. */
export function RefusedSign({ sizePx = 18 }: { readonly sizePx?: number }) {
  return (
    <svg
      width={sizePx}
      height={sizePx}
      viewBox="0 0 18 18"
      aria-hidden="true"
      focusable="false"
      style={{ flex: 'none' }}
    >
      <circle cx="9" cy="9" r="7" fill="none" stroke="var(--sk-buoy)" strokeWidth="1.9" />
      <path d="M4.2 13.8 L13.8 4.2" stroke="var(--sk-buoy)" strokeWidth="1.9" />
    </svg>
  );
}
