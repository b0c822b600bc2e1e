import type { BookingState } from '@skyberth/shared';
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

/** Every booking state in the words of the page, with its tone. */
export const BOOKING_STATE_BADGES: Readonly<Record<BookingState, { readonly tone: BadgeTone; readonly text: string }>> =
  {
    held: { tone: 'waiting', text: 'Held' },
    'awaiting owner': { tone: 'waiting', text: 'Owner asked' },
    confirmed: { tone: 'good', text: 'Confirmed' },
    'under way': { tone: 'active', text: 'Under way' },
    reporting: { tone: 'look', text: 'Report due' },
    settled: { tone: 'quiet', text: 'Settled' },
    lapsed: { tone: 'quiet', text: 'Lapsed' },
    declined: { tone: 'bad', text: 'Declined' },
    cancelled: { tone: 'quiet', text: 'Cancelled' },
    failed: { tone: 'bad', text: 'Failed' },
    'in dispute': { tone: 'look', text: 'In dispute' },
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
