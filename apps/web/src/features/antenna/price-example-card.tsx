import { Group, NumberInput, Paper, Select, TextInput } from '@mantine/core';
import { useDebouncedValue } from '@mantine/hooks';
import { PriceCardInput } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { availabilityQueries, type ExampleInput } from '../../lib/availability-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { formatMoney } from '../../ui/format.js';
import classes from './antenna.module.css';
import { DAYS, minuteOf } from './hours-words.js';
import type { PriceValues } from './price-values.js';

interface PriceExampleProps {
  readonly antennaId: string;
  readonly card: PriceValues;
}

type Contact = ExampleInput['contact'];
const BEGIN: Contact = { lengthS: 480, day: 2, startLocal: '18:10', boughtHoursBefore: 24 };
/** Typing settles before the server is asked. */
const SETTLE_MS = 300;

/** One contact, worked out by the server from the card as it is typed. */
export function PriceExample({ antennaId, card }: PriceExampleProps) {
  const [contact, setContact] = useState(BEGIN);
  const [time, setTime] = useState(BEGIN.startLocal);
  const set = (part: Partial<Contact>) => setContact({ ...contact, ...part });
  const setNumber = (name: 'lengthS' | 'boughtHoursBefore', perUnit: number) => (value: number | string) => {
    const given = Number(value);
    if (value !== '' && Number.isFinite(given)) set({ [name]: given * perUnit });
  };
  return (
    <Paper component="section" withBorder className={classes.card} aria-labelledby="example-title">
      <h2 id="example-title" className={classes.cardTitle}>
        An example
      </h2>
      <Group gap={8} grow preventGrowOverflow={false}>
        <NumberInput
          label="Length"
          suffix=" min"
          min={1}
          max={1_440}
          value={contact.lengthS / 60}
          onChange={setNumber('lengthS', 60)}
          miw={80}
        />
        <Select
          label="Day"
          data={DAYS.map((label, index) => ({ value: String(index + 1), label }))}
          value={String(contact.day)}
          allowDeselect={false}
          onChange={(day) => set({ day: Number(day) })}
          miw={84}
        />
        <TextInput
          label="AOS there"
          value={time}
          error={Number.isNaN(minuteOf(time)) && 'Such as 18:10'}
          onChange={(event) => {
            const typed = event.currentTarget.value;
            setTime(typed);
            if (!Number.isNaN(minuteOf(typed))) set({ startLocal: typed });
          }}
          miw={72}
        />
        <NumberInput
          label="Bought before"
          suffix=" h"
          min={0}
          max={8_760}
          value={contact.boughtHoursBefore}
          onChange={setNumber('boughtHoursBefore', 1)}
          miw={84}
        />
      </Group>
      <Sum antennaId={antennaId} card={card} contact={contact} />
    </Paper>
  );
}

function Sum({ antennaId, card, contact }: PriceExampleProps & { readonly contact: Contact }) {
  const typed = PriceCardInput.safeParse(card);
  const [asked] = useDebouncedValue(typed.success ? { price: typed.data, contact } : null, SETTLE_MS);
  const example = useQuery({
    ...availabilityQueries.priceExample(antennaId, asked ?? { price: EMPTY_CARD, contact }),
    enabled: asked !== null,
  });
  if (!typed.success) return <p className={classes.quiet}>The sum stands here once the card is filled in.</p>;
  if (example.error)
    return (
      <p className={classes.fieldError} role="alert">
        {sentenceOf(example.error)}
      </p>
    );
  if (!example.data) return <p className={classes.quiet}>Working it out ...</p>;
  const { currency, lines, totalMinor } = example.data;
  return (
    <table className={classes.sum} style={{ marginTop: 12 }}>
      <tbody aria-live="polite">
        {lines.map((line) => (
          <tr key={`${line.label} ${line.detail}`}>
            <td>
              {line.label}
              <small>{line.detail}</small>
            </td>
            <td>{formatMoney({ amountMinor: line.amountMinor, currency })}</td>
          </tr>
        ))}
        <tr data-total>
          <td>Before VAT</td>
          <td>{formatMoney({ amountMinor: totalMinor, currency })}</td>
        </tr>
      </tbody>
    </table>
  );
}

/** Only names the query while it waits. */
const EMPTY_CARD: ExampleInput['price'] = { perMinuteMinor: 0, setupMinor: 0, minimumMinor: 0, ladder: [] };
