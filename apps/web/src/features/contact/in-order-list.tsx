import type { Booking, ContactEvent, PassDetail } from '@skyberth/shared';
import { useNow } from '../../lib/use-now.js';
import { DayTime } from '../../ui/day-time.js';
import { formatDay } from '../../ui/format.js';
import classes from './contact.module.css';
import { inOrder, type OrderEntry } from './in-order.js';

const KIND_WORDS: Readonly<Record<OrderEntry['kind'], string>> = {
  predicted: 'predicted',
  happened: 'happened',
  now: 'at this moment',
};

interface InOrderListProps {
  readonly booking: Booking;
  readonly detail: PassDetail | undefined;
  readonly live: readonly ContactEvent[];
}

/** Predicted, reported and now on one line of time; what is to come is dashed. */
export function InOrderList({ booking, detail, live }: InOrderListProps) {
  const entries = inOrder(booking, detail, useNow(), live);
  return (
    <section aria-labelledby="in-order-title">
      <h2 id="in-order-title" className={classes.heading}>
        In order
      </h2>
      <ol className={classes.order}>
        {entries.map((entry, index) => (
          <li key={entry.id} data-kind={entry.kind} data-to-come={entry.isToCome || undefined}>
            <span className={classes.orderTime}>
              <DayTime atMs={entry.atMs} show="time" />
              {dayOf(entry) !== dayOf(entries[index - 1]) && <DayTime atMs={entry.atMs} show="day" />}
            </span>
            <OrderSign kind={entry.kind} />
            <span>
              <strong>{entry.title}</strong>
              <span className="sk-hidden"> ({KIND_WORDS[entry.kind]})</span>
              {entry.detail && <small>{entry.detail}</small>}
            </span>
          </li>
        ))}
      </ol>
    </section>
  );
}

const dayOf = (entry: OrderEntry | undefined): string => (entry ? formatDay(entry.atMs) : '');

function OrderSign({ kind }: { readonly kind: OrderEntry['kind'] }) {
  return (
    <svg className={classes.orderSign} width="14" height="14" viewBox="0 0 14 14" aria-hidden="true" focusable="false">
      {kind === 'predicted' && <circle cx="7" cy="7" r="4.4" />}
      {kind === 'happened' && <rect x="2.5" y="2.5" width="9" height="9" />}
      {kind === 'now' && <path d="M7 .8 L13.2 7 L7 13.2 L.8 7 Z" />}
    </svg>
  );
}
