import type { ReactNode } from 'react';
import classes from './blocks.module.css';

/** Props of `EmptyState`. */
export interface EmptyStateProps {
  /** What isn't there: `No spacecraft yet`. */
  readonly title: string;
  /** How to begin, in a sentence. */
  readonly children?: ReactNode;
  /** The button or link that begins it. */
  readonly action?: ReactNode;
  readonly level?: 2 | 3;
}

/** An empty page or table: calm water, what is missing and how to begin. */
export function EmptyState({ title, children, action, level = 2 }: EmptyStateProps) {
  const Title = `h${level}` as const;
  return (
    <div className={classes.empty}>
      <svg width="120" height="44" viewBox="0 0 120 44" aria-hidden="true" focusable="false">
        <path
          d="M38 24 C50 24 50 6 60 6 S70 24 82 24"
          fill="none"
          stroke="var(--sk-ink3)"
          strokeWidth="1.7"
          strokeDasharray="0.1 4"
          strokeLinecap="round"
        />
        <path d="M6 24.5 H114" stroke="var(--sk-ink)" strokeWidth="1.6" />
        <path d="M30 33 h26 M66 33 h14 M46 40 h18" stroke="var(--sk-brass)" strokeWidth="2" strokeLinecap="round" />
      </svg>
      <Title>{title}</Title>
      {children && <div className={classes.emptyText}>{children}</div>}
      {action}
    </div>
  );
}
