import classes from './blocks.module.css';
import { Sign, type SignShape } from './signs.js';

/** What a badge means; each tone also has an edge or a shape of its own. */
export type BadgeTone = 'active' | 'good' | 'look' | 'bad' | 'waiting' | 'quiet';

const TONE_SIGNS: Record<BadgeTone, SignShape> = {
  active: 'up',
  good: 'check',
  look: 'diamond',
  bad: 'square',
  waiting: 'dashed',
  quiet: 'half',
};

/** Booking states in the words of the product, with their tone. Source: the booking states of product.md. */
export const BOOKING_STATE_BADGES: Readonly<Record<string, { readonly tone: BadgeTone; readonly text: string }>> = {
  held: { tone: 'waiting', text: 'Held' },
  awaiting_owner: { tone: 'waiting', text: 'Owner asked' },
  confirmed: { tone: 'good', text: 'Confirmed' },
  under_way: { tone: 'active', text: 'Under way' },
  reporting: { tone: 'look', text: 'Report due' },
  settled: { tone: 'quiet', text: 'Settled' },
  lapsed: { tone: 'quiet', text: 'Lapsed' },
  declined: { tone: 'bad', text: 'Declined' },
  cancelled: { tone: 'quiet', text: 'Cancelled' },
  failed: { tone: 'bad', text: 'Failed' },
  in_dispute: { tone: 'look', text: 'In dispute' },
};

/** A word with a shape: `Under way`, `Owner asked`. */
export function StateBadge({
  tone,
  children,
  sign,
}: {
  readonly tone: BadgeTone;
  readonly children: React.ReactNode;
  readonly sign?: SignShape;
}) {
  return (
    <span className={classes.badge} data-tone={tone}>
      <Sign shape={sign ?? TONE_SIGNS[tone]} sizePx={12} />
      {children}
    </span>
  );
}
