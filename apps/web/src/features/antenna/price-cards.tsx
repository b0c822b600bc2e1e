/** From when a price holds, and the cards that are in force and to come. */
import { DateTimePicker } from '@mantine/dates';
import { useQuery } from '@tanstack/react-query';
import { availabilityQueries } from '../../lib/availability-queries.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { formatDayTime, formatMoney } from '../../ui/format.js';
import classes from './antenna.module.css';

interface ValidFromProps {
  /** On the station's clock; null for at once. */
  readonly value: string | null;
  readonly onChange: (value: string | null) => void;
  readonly timeZone: string;
}

export function ValidFrom({ value, onChange, timeZone }: ValidFromProps) {
  return (
    <section className={classes.part} aria-label="From when it holds">
      <DateTimePicker
        label="Holds from"
        description={`On the station's clock, ${timeZone.replaceAll('_', ' ')}. Empty for at once. What is bought before keeps its price.`}
        placeholder="At once"
        valueFormat="ddd D MMM YYYY HH:mm"
        clearable
        clearButtonProps={{ 'aria-label': 'At once' }}
        maw={360}
        value={value}
        onChange={onChange}
      />
    </section>
  );
}

/** The card in force and those to come; what has been replaced is history. */
export function PriceCards({ antennaId, currency }: { readonly antennaId: string; readonly currency: string }) {
  const cards = useQuery(availabilityQueries.priceCards(antennaId));
  const nowMs = serverNowMs();
  const items = cards.data?.items ?? [];
  const inForce = items.find((card) => Date.parse(card.validFromUtc) <= nowMs);
  const toCome = items.filter((card) => Date.parse(card.validFromUtc) > nowMs).reverse();
  if (!inForce && toCome.length === 0) return null;
  return (
    <ul className={classes.blackouts} aria-label="Price cards">
      {[...(inForce ? [inForce] : []), ...toCome].map((card) => (
        <li key={card.id}>
          <span>
            {card === inForce ? 'In force since' : 'Holds from'} {formatDayTime(Date.parse(card.validFromUtc))} UTC
          </span>
          <strong>{formatMoney({ amountMinor: card.perMinuteMinor, currency })} a minute</strong>
        </li>
      ))}
    </ul>
  );
}
