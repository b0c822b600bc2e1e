import type { ReactNode } from 'react';
import classes from './blocks.module.css';

/** Props of `Caution`. */
export interface CautionProps {
  /** A few words: `You may transmit until 14:08`. */
  readonly title: string;
  /** Short sentences that defer to the licence, local rules and the interlock. */
  readonly children: ReactNode;
}

/** A buoy: the caution that stands where a dangerous or unlawful act could happen. */
export function Caution({ title, children }: CautionProps) {
  return (
    <section className={classes.caution} role="note" aria-label={`Caution: ${title}`}>
      <CautionSign />
      <div>
        <strong className={classes.cautionTitle}>{title}</strong>
        <div className={classes.cautionText}>{children}</div>
      </div>
    </section>
  );
}

/** The triangle alone. */
export function CautionSign({ sizePx = 26 }: { readonly sizePx?: number }) {
  return (
    <svg width={sizePx} height={sizePx} viewBox="0 0 26 26" aria-hidden="true" focusable="false">
      <path
        d="M13 3 L24.4 22.6 H1.6 Z"
        fill="none"
        stroke="var(--sk-buoy-ink)"
        strokeWidth="2"
        strokeLinejoin="round"
      />
      <path d="M13 9.6 V16" stroke="var(--sk-buoy-ink)" strokeWidth="2.3" strokeLinecap="round" />
      <circle cx="13" cy="19.3" r="1.4" fill="var(--sk-buoy-ink)" />
    </svg>
  );
}
