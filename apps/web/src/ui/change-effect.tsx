/** What a change of an antenna would do, before it is saved: the coming week before and after, and what is sold already. */
import { Anchor, Skeleton } from '@mantine/core';
import { useDebouncedValue } from '@mantine/hooks';
import type { ChangePreview } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { type AntennaChange, availabilityQueries } from '../lib/availability-queries.js';
import { paths } from '../lib/paths.js';
import { sentenceOf } from '../lib/problem-fields.js';
import classes from './change-effect.module.css';
import { formatDayTime, formatMoney, formatNumber } from './format.js';
import { ProblemNotice } from './problem-notice.js';

/** Typing settles before the server is asked. */
const SETTLE_MS = 500;

export interface ChangeEffectProps {
  readonly antennaId: string;
  /** Null while there is nothing to try. */
  readonly change: AntennaChange | null;
  /** What stands there instead while there is nothing to try. */
  readonly idle?: string;
}

export function ChangeEffect({ antennaId, change, idle }: ChangeEffectProps) {
  const [asked] = useDebouncedValue(change, SETTLE_MS);
  const preview = useQuery({ ...availabilityQueries.preview(antennaId, asked ?? {}), enabled: asked !== null });
  if (change === null || asked === null) return idle ? <p className={classes.quiet}>{idle}</p> : null;
  if (preview.error)
    return <ProblemNotice title="The effect cannot be worked out">{sentenceOf(preview.error)}</ProblemNotice>;
  if (!preview.data) return <Skeleton height={120} />;
  return (
    <div className={classes.effect} aria-live="polite" aria-busy={preview.isFetching}>
      <Sides preview={preview.data} />
      <LastMonth preview={preview.data} />
      <Touched preview={preview.data} />
    </div>
  );
}

type Row = readonly [name: string, before: string, after: string];

function rowsOf({ currency, before, after }: ChangePreview): Row[] {
  if (before === null || after === null) return [];
  const hours = (minutes: number) => `${formatNumber(minutes / 60, 1)}\u00a0h`;
  const min = (minutes: number) => `${formatNumber(minutes)}\u00a0min`;
  const money = (amountMinor: number | null) =>
    amountMinor === null ? 'unknown' : formatMoney({ amountMinor, currency });
  return [
    ['Open', hours(before.openMin), hours(after.openMin)],
    ['Could be sold', min(before.sellableMin), min(after.sellableMin)],
    ['Expected income', money(before.expectedMinor), money(after.expectedMinor)],
  ];
}

function Sides({ preview }: { readonly preview: ChangePreview }) {
  const rows = rowsOf(preview);
  if (rows.length === 0)
    return <p className={classes.quiet}>The antenna has no price yet, so nothing of it is for sale.</p>;
  return (
    <>
      <table className={classes.sides}>
        <thead>
          <tr>
            <th scope="col">The coming week</th>
            <th scope="col">Now</th>
            <th scope="col">Then</th>
          </tr>
        </thead>
        <tbody>
          {rows.map(([name, before, after]) => (
            <tr key={name} data-changed={before !== after || undefined}>
              <th scope="row">{name}</th>
              <td>{before}</td>
              <td>{after}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className={classes.quiet}>{methodWords(preview)}</p>
    </>
  );
}

function methodWords({ spacecraft, before }: ChangePreview): string {
  if (spacecraft === 0) return 'No spacecraft has booked here in 90 days, so there is nothing to reckon sales by.';
  const whose = spacecraft === 1 ? 'the one spacecraft that has' : `the ${spacecraft} spacecraft that have`;
  const income =
    before?.expectedMinor === null
      ? 'No contact was served in the last four weeks, so no income is guessed.'
      : 'The income is a week like the last four, at the price of each side and in proportion to what could be sold.';
  return `Sales are reckoned by ${whose} booked here in 90 days. ${income}`;
}

function LastMonth({ preview: { lastMonth, currency } }: { readonly preview: ChangePreview }) {
  if (lastMonth === null) return null;
  if (lastMonth.contacts === 0) return <p className={classes.quiet}>No contact was served in the last 30 days.</p>;
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency });
  return (
    <p>
      The {lastMonth.contacts === 1 ? 'one contact' : `${lastMonth.contacts} contacts`} of the last 30 days cost{' '}
      <strong>{money(lastMonth.thenMinor)}</strong>, and would have cost <strong>{money(lastMonth.nowMinor)}</strong>.
    </p>
  );
}

function Touched({ preview: { touched, soldMinor, currency } }: { readonly preview: ChangePreview }) {
  if (touched.length === 0)
    return (
      <p className={classes.quiet}>
        No sold contact is touched. {formatMoney({ amountMinor: soldMinor, currency })} sold for the coming week stay.
      </p>
    );
  return (
    <div className={classes.touched} role="status">
      <strong>
        {touched.length === 1
          ? 'One sold contact is touched, and stays sold.'
          : `${touched.length} sold contacts are touched, and stay sold.`}
      </strong>
      <ul>
        {touched.map((contact) => (
          <li key={contact.bookingId}>
            <Anchor component={Link} to={paths.booking(contact.bookingId)}>
              {contact.spacecraftName}, {formatDayTime(Date.parse(contact.aosUtc))}
            </Anchor>{' '}
            for {contact.operatorName}. {contact.why} {contact.buyerGets}
          </li>
        ))}
      </ul>
    </div>
  );
}
