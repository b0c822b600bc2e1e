/** Small pieces of text that carry a unit, so that no page writes one by hand. */
import type { CSSProperties, ReactNode } from 'react';
import { type Amount, formatDegrees, formatDuration, formatMoney } from './format.js';
import classes from './values.module.css';

/** `9 min 42 s` */
export function Duration({ ms }: { readonly ms: number }) {
  return (
    <time dateTime={`PT${Math.max(0, Math.round(ms / 1000))}S`} className={classes.keep}>
      {formatDuration(ms)}
    </time>
  );
}

/** `€81.88`; `whole` rounds to the unit, `quietZero` greys a nought in tables. */
export function MoneyText({
  amountMinor,
  currency,
  whole,
  quietZero,
}: Amount & { whole?: boolean; quietZero?: boolean }) {
  return (
    <span className={classes.keep} data-quiet={quietZero && amountMinor === 0 ? true : undefined}>
      {formatMoney({ amountMinor, currency }, whole)}
    </span>
  );
}

/** `39.5°` */
export function Degrees({ deg, decimals = 1 }: { readonly deg: number; readonly decimals?: number }) {
  return <span className={classes.keep}>{formatDegrees(deg, decimals)}</span>;
}

/** Props of `Figure`. */
export interface FigureProps {
  readonly label: ReactNode;
  readonly value: ReactNode;
  /** Stands small after the value: `km`. */
  readonly unit?: string;
  /** A few quiet words below. */
  readonly note?: ReactNode;
  /** `effect` is the one large figure of a page, `countdown` the one countdown. Default `plain`. */
  readonly size?: 'plain' | 'large' | 'effect' | 'countdown';
  readonly tone?: 'plain' | 'good' | 'bad';
}

/** A label, a value and its unit, as a term and its description: put several in `Figures`. */
export function Figure({ label, value, unit, note, size = 'plain', tone = 'plain' }: FigureProps) {
  return (
    <div className={classes.figure} data-size={size} data-tone={tone}>
      <dt>{label}</dt>
      <dd>
        <span className={classes.value}>{value}</span>
        {unit && <span className={classes.unit}>&nbsp;{unit}</span>}
        {note && <div className={classes.note}>{note}</div>}
      </dd>
    </div>
  );
}

/** Figures in columns. */
export function Figures({
  children,
  columns = 2,
  ruled,
}: {
  readonly children: ReactNode;
  readonly columns?: number;
  readonly ruled?: boolean;
}) {
  return (
    <dl
      className={classes.figures}
      data-ruled={ruled || undefined}
      data-many={columns > 2 || undefined}
      style={{ '--sk-columns': columns } as CSSProperties}
    >
      {children}
    </dl>
  );
}
