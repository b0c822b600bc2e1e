/** Lines of a side's own log: the time in UTC on the day of the contact, what it was, and words. */
import { Button, Select, TextInput } from '@mantine/core';
import type { Observation } from '@skyberth/shared';
import { clockOf, utcOfClock } from './clock-text.js';
import classes from './disputes.module.css';

const KINDS = [
  { value: 'heard', label: 'heard' },
  { value: 'stopped', label: 'stopped' },
  { value: 'note', label: 'note' },
];
const MOST = 60;

interface ObservationRowsProps {
  readonly aosUtc: string;
  readonly value: readonly Observation[];
  readonly onChange: (next: readonly Observation[]) => void;
}

export function ObservationRows({ aosUtc, value, onChange }: ObservationRowsProps) {
  const change = (index: number, part: Partial<Observation>) =>
    onChange(value.map((one, at) => (at === index ? { ...one, ...part } : one)));
  return (
    <fieldset style={{ border: 0, margin: 0, padding: 0 }} className={classes.stack}>
      <legend style={{ padding: 0, fontWeight: 600 }}>From your own log (optional)</legend>
      {value.map((one, index) => (
        <div
          // biome-ignore lint/suspicious/noArrayIndexKey: rows have no other name, and are only added at the end.
          key={index}
          className={classes.row}
        >
          <TextInput
            label="UTC"
            placeholder="14:07:12"
            defaultValue={clockOf(one.atUtc)}
            onBlur={(event) => {
              const atUtc = utcOfClock(event.currentTarget.value, aosUtc);
              if (atUtc) change(index, { atUtc });
              else event.currentTarget.value = clockOf(one.atUtc);
            }}
          />
          <Select
            label="What"
            data={KINDS}
            value={one.kind}
            allowDeselect={false}
            onChange={(kind) => change(index, { kind: (kind ?? 'note') as Observation['kind'] })}
          />
          <TextInput
            label="In a few words"
            placeholder="frames stop, counter 121 377"
            maxLength={200}
            value={one.words}
            onChange={(event) => change(index, { words: event.currentTarget.value })}
          />
          <Button
            variant="default"
            aria-label={`Remove line ${index + 1}`}
            onClick={() => onChange(value.filter((_one, at) => at !== index))}
          >
            Remove
          </Button>
        </div>
      ))}
      {value.length < MOST && (
        <div>
          <Button
            variant="default"
            size="xs"
            onClick={() => onChange([...value, { atUtc: value.at(-1)?.atUtc ?? aosUtc, kind: 'heard', words: '' }])}
          >
            Add a line
          </Button>
        </div>
      )}
    </fieldset>
  );
}
