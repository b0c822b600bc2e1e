import { type ReactNode, useEffect, useState } from 'react';
import { HoldOutline } from '../drawing/curves/hold-outline.js';
import { formatCountdown } from './format.js';
import classes from './hold-tray.module.css';

/** Props of `HoldTray`. */
export interface HoldTrayProps {
  /** `Whimbrel 1 over Pico Verdal` */
  readonly title: string;
  /** `14:36:20 to 14:45:40, 9 min 20 s` */
  readonly detail: string;
  readonly endsMs: number;
  readonly clock: () => number;
  /** `€87.92` */
  readonly price: string;
  /** `price frozen, not yet charged` */
  readonly priceNote: string;
  /** Buttons; give them `classNames` of this tray by `TrayButton`. */
  readonly children: ReactNode;
}

const SAY_AT_MS = 60_000;

/** The dark tray at the foot of the page while something is held. The last minute is said aloud once. */
export function HoldTray({ title, detail, endsMs, clock, price, priceNote, children }: HoldTrayProps) {
  const [nowMs, setNowMs] = useState(clock);
  const [isOpen, setOpen] = useState(false);
  useEffect(() => {
    const timer = window.setInterval(() => setNowMs(clock()), 1000);
    return () => window.clearInterval(timer);
  }, [clock]);
  const leftMs = endsMs - nowMs;
  const isLastMinute = leftMs <= SAY_AT_MS && leftMs > 0;
  return (
    <section className={classes.tray} aria-label="Held by you" data-open={isOpen || undefined}>
      <HoldOutline widthPx={38} colour="var(--sk-tray-brass)" />
      <div className={classes.words}>
        <strong>{title}</strong>
        <div className={classes.second}>{detail}</div>
      </div>
      <div
        className={classes.left}
        role="timer"
        aria-live="off"
        aria-label={`${formatCountdown(leftMs)} left on your hold`}
      >
        {formatCountdown(leftMs)}
      </div>
      <div className={classes.note}>left on your hold, then it goes back on sale</div>
      <div className="sk-hidden" role="status">
        {isLastMinute ? `One minute left on your hold of ${title}` : ''}
      </div>
      <div className={classes.price}>
        <strong>{price}</strong>
        <div className={classes.second}>{priceNote}</div>
      </div>
      <div className={classes.acts}>{children}</div>
      <button
        type="button"
        className={classes.unfold}
        aria-expanded={isOpen}
        aria-label={isOpen ? 'Fold the tray' : 'Show the whole hold'}
        onClick={() => setOpen(!isOpen)}
      >
        <svg width="16" height="10" viewBox="0 0 16 10" aria-hidden="true" focusable="false">
          <path
            d={isOpen ? 'M2 2 L8 8 L14 2' : 'M2 8 L8 2 L14 8'}
            fill="none"
            stroke="currentColor"
            strokeWidth="2.2"
          />
        </svg>
      </button>
    </section>
  );
}

/** A button on the tray: `main` is brass, the other outlined. */
export function TrayButton({ main, ...rest }: React.ComponentProps<'button'> & { readonly main?: boolean }) {
  return <button type="button" {...rest} className={classes.button} data-main={main || undefined} />;
}
