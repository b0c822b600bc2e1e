import { Group, NumberInput, Paper, Select, TextInput } from '@mantine/core';
import { useState } from 'react';
import { formatMoney } from '../../ui/format.js';
import classes from './antenna.module.css';
import { DAYS, minuteOf } from './hours-words.js';
import { type ExampleCard, type ExampleContact, exampleLines } from './price-example.js';

interface PriceExampleProps {
  readonly card: ExampleCard;
  readonly currency: string;
}

const BEGIN: ExampleContact = { lengthS: 480, day: 2, startLocal: '18:10', boughtHoursBefore: 24 };

/** One contact, worked out by the card as it is typed. */
export function PriceExample({ card, currency }: PriceExampleProps) {
  const [contact, setContact] = useState(BEGIN);
  const [time, setTime] = useState(BEGIN.startLocal);
  const lines = exampleLines(card, contact);
  const totalMinor = lines.reduce((sum, line) => sum + line.amountMinor, 0);
  const set = (part: Partial<ExampleContact>) => setContact({ ...contact, ...part });
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
          value={contact.boughtHoursBefore}
          onChange={setNumber('boughtHoursBefore', 1)}
          miw={84}
        />
      </Group>
      <table className={classes.sum} style={{ marginTop: 12 }}>
        <tbody aria-live="polite">
          {lines.map((line) => (
            <tr key={`${line.label} ${line.detail}`}>
              <td>
                {line.label}
                {line.detail && <small>{line.detail}</small>}
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
    </Paper>
  );
}
