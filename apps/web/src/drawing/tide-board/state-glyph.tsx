import type { JSX } from 'react';

/** Signs of the legend. */
export type Glyph = 'forSale' | 'held' | 'asked' | 'berth' | 'others' | 'notForSale' | 'blackout' | 'night' | 'land';

const WATER = 'M2 16 C9 15 10 4 15 4 S21 15 28 16';
const INK = 'var(--sk-ink)';
const DEEP = 'var(--sk-deep)';

const DRAWINGS: Readonly<Record<Glyph, JSX.Element>> = {
  forSale: <path d={WATER} fill="var(--sk-shoal-wash)" stroke={DEEP} strokeWidth="1.7" />,
  held: (
    <path
      d={`${WATER} Z`}
      fill="var(--sk-brass-wash)"
      stroke="var(--sk-brass-ink)"
      strokeWidth="1.7"
      strokeDasharray="4 2.6"
    />
  ),
  asked: (
    <>
      <path d="M7.5 14 V16 M11.5 8 V16 M15 4 V16 M18.5 8 V16 M22.5 14 V16" stroke={DEEP} strokeWidth="1.2" />
      <path d={`${WATER} Z`} fill="none" stroke={DEEP} strokeWidth="1.7" />
      <path d="M2 19.4 H28" stroke={INK} strokeWidth="2.6" strokeDasharray="6 3.4" />
    </>
  ),
  berth: (
    <>
      <path d={`${WATER} Z`} fill={DEEP} />
      <path d="M2 19.2 H28 M3.2 14.6 V20.6 M26.8 14.6 V20.6" stroke={INK} strokeWidth="2.8" />
    </>
  ),
  others: (
    <>
      <rect x="2" y="8" width="26" height="9" fill="none" stroke="var(--sk-ink3)" />
      <path d="M3 16 L10 9 M9 16 L16 9 M15 16 L22 9 M21 16 L27.6 9.4" stroke="var(--sk-slant)" strokeWidth="1.1" />
    </>
  ),
  notForSale: (
    <path
      d={WATER}
      fill="none"
      stroke="var(--sk-ink3)"
      strokeWidth="1.8"
      strokeDasharray="0.1 3.4"
      strokeLinecap="round"
    />
  ),
  blackout: (
    <>
      <rect x="2" y="3" width="26" height="14" fill="none" stroke="var(--sk-weave)" />
      <path
        d="M2 5.5 H8 M2 8.5 H8 M10 4 V10 M13 4 V10 M15 5.5 H21 M15 8.5 H21 M23 4 V10 M26 4 V10 M4 11 V16 M7 11 V16 M9 12.5 H15 M9 15 H15 M17 11 V16 M20 11 V16 M22 12.5 H27 M22 15 H27"
        stroke="var(--sk-weave)"
        strokeWidth="1.2"
      />
    </>
  ),
  night: <rect x="2" y="3" width="26" height="14" fill="var(--sk-night)" stroke="var(--sk-line)" />,
  land: <path d="M3 17 C4 10 8 11 12 11 S17 8 19 10 S26 10 27 17 Z" fill="var(--sk-land)" />,
};

/** One sign, decoration beside its word. */
export function StateGlyph({ glyph }: { readonly glyph: Glyph }) {
  return (
    <svg width="30" height="21" viewBox="0 0 30 21" aria-hidden="true" focusable="false">
      {DRAWINGS[glyph]}
    </svg>
  );
}
