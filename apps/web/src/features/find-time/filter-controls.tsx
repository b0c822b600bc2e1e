/** The controls behind the underlined parts of the sentence. */
import { Button, Checkbox, Group, NumberInput, Radio, ScrollArea, Stack, TextInput } from '@mantine/core';
import { DateTimePicker } from '@mantine/dates';
import { BANDS, type Need } from '@skyberth/shared';
import { type FormEvent, useState } from 'react';
import { readWallText, wallText } from '../../lib/zone-time.js';
import { hoursWords } from './filter-words.js';
import type { Period, SearchFilter } from './search-filter.js';

export interface ChoiceItem {
  readonly id: string;
  readonly name: string;
  readonly note?: string;
}

interface ManyProps {
  readonly label: string;
  readonly allLabel: string;
  readonly items: readonly ChoiceItem[];
  readonly chosen: readonly string[];
  readonly onChange: (ids: string[]) => void;
}

const MANY_ITEMS = 8;

/** Several of a list; none ticked means all of them. */
export function ManyControl({ label, allLabel, items, chosen, onChange }: ManyProps) {
  const [text, setText] = useState('');
  const shown = items.filter((one) => one.name.toLowerCase().includes(text.trim().toLowerCase()));
  return (
    <Stack gap="xs">
      {items.length > MANY_ITEMS && (
        <TextInput
          aria-label={`Find in ${label}`}
          placeholder="Type to find"
          value={text}
          onChange={(event) => setText(event.currentTarget.value)}
        />
      )}
      <Checkbox label={allLabel} checked={chosen.length === 0} onChange={() => onChange([])} />
      <ScrollArea.Autosize mah={280} type="auto">
        <Checkbox.Group aria-label={label} value={[...chosen]} onChange={onChange}>
          <Stack gap="xs">
            {shown.map((one) => (
              <Checkbox key={one.id} value={one.id} label={one.name} description={one.note} />
            ))}
          </Stack>
        </Checkbox.Group>
      </ScrollArea.Autosize>
    </Stack>
  );
}

const NEEDS: readonly { value: Need; label: string }[] = [
  { value: 'downlink', label: 'Downlink: receive only' },
  { value: 'uplink', label: 'Uplink: needs a clearance' },
  { value: 'both', label: 'Both in one contact' },
];

export function NeedControl({
  filter,
  onChange,
}: {
  filter: SearchFilter;
  onChange: (part: Partial<SearchFilter>) => void;
}) {
  return (
    <Stack gap="sm">
      <Radio.Group label="Direction" value={filter.need} onChange={(need) => onChange({ need: need as Need })}>
        <Stack gap="xs" mt={4}>
          {NEEDS.map((one) => (
            <Radio key={one.value} value={one.value} label={one.label} />
          ))}
        </Stack>
      </Radio.Group>
      <Checkbox.Group
        label="Bands"
        description="None ticked: any band that spacecraft and antenna share."
        value={[...filter.bands]}
        onChange={(bands) => onChange({ bands })}
      >
        <Group gap="sm" mt={4}>
          {BANDS.map((band) => (
            <Checkbox key={band} value={band} label={band} />
          ))}
        </Group>
      </Checkbox.Group>
    </Stack>
  );
}

const PERIODS_H = [3, 6, 12, 24, 72, 168, 336] as const;

/** A rolling length of time, or two instants; the picker knows no zones, and its clock here is UTC. */
export function PeriodControl({ period, onChange }: { period: Period; onChange: (period: Period) => void }) {
  const [from, setFrom] = useState<string | null>(period.kind === 'fixed' ? wallText(period.fromMs) : null);
  const [to, setTo] = useState<string | null>(period.kind === 'fixed' ? wallText(period.toMs) : null);
  const [fromMs, toMs] = [readWallText(from ?? ''), readWallText(to ?? '')];
  const fault =
    from && to && !(toMs > fromMs)
      ? 'The period must end after it begins.'
      : toMs - fromMs > 31 * 86_400_000
        ? 'Search at most 31 days at once.'
        : null;
  return (
    <Stack gap="sm">
      <Radio.Group
        label="From now on"
        value={period.kind === 'hours' ? String(period.hours) : ''}
        onChange={(hours) => onChange({ kind: 'hours', hours: Number(hours) })}
      >
        <Group gap="sm" mt={4}>
          {PERIODS_H.map((hours) => (
            <Radio key={hours} value={String(hours)} label={hoursWords(hours)} />
          ))}
        </Group>
      </Radio.Group>
      <DateTimePicker label="Or from, UTC" value={from} onChange={setFrom} popoverProps={{ withinPortal: false }} />
      <DateTimePicker
        label="To, UTC"
        value={to}
        onChange={setTo}
        error={fault}
        popoverProps={{ withinPortal: false }}
      />
      <Button
        variant="default"
        disabled={fault !== null || !from || !to}
        onClick={() => onChange({ kind: 'fixed', fromMs, toMs })}
      >
        Search these days
      </Button>
    </Stack>
  );
}

interface NumberControlProps {
  readonly label: string;
  readonly unit: string;
  readonly value: number | null;
  readonly presets: readonly { readonly value: number | null; readonly label: string }[];
  readonly most: number;
  readonly decimals?: number;
  readonly onChange: (value: number | null) => void;
}

/** One figure: the usual ones at a click, any other by typing. */
export function NumberControl({ label, unit, value, presets, most, decimals = 0, onChange }: NumberControlProps) {
  const [typed, setTyped] = useState<string | number>(value ?? '');
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onChange(typed === '' ? null : Math.min(most, Math.max(0, Number(typed))));
  };
  return (
    <form onSubmit={submit}>
      <Group gap="xs" mb="sm">
        {presets.map((one) => (
          <Button
            key={one.label}
            variant={one.value === value ? 'light' : 'default'}
            aria-pressed={one.value === value}
            size="compact-sm"
            onClick={() => onChange(one.value)}
          >
            {one.label}
          </Button>
        ))}
      </Group>
      <Group gap="xs" align="end" wrap="nowrap">
        <NumberInput
          label={`${label}, ${unit}`}
          value={typed}
          min={0}
          max={most}
          decimalScale={decimals}
          onChange={setTyped}
        />
        <Button type="submit" variant="default">
          Set
        </Button>
      </Group>
    </form>
  );
}
