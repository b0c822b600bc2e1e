/** How often something comes: the common ways by name, everything else as an RFC 5545 rule. */
import { Select, Stack, TextInput } from '@mantine/core';
import type { ReactNode } from 'react';

const RULES = {
  once: null,
  daily: 'FREQ=DAILY',
  weekdays: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
  weekly: 'FREQ=WEEKLY',
  'every second week': 'FREQ=WEEKLY;INTERVAL=2',
  monthly: 'FREQ=MONTHLY',
} as const;
type Named = keyof typeof RULES;

const LABELS: Readonly<Record<Named | 'rule', string>> = {
  once: 'Once',
  daily: 'Every day',
  weekdays: 'Monday to Friday',
  weekly: 'Every week',
  'every second week': 'Every second week',
  monthly: 'Every month, on that day',
  rule: 'By a rule',
};

export interface Repeats {
  readonly kind: Named | 'rule';
  /** The rule's text, for `rule`. */
  readonly text: string;
}

/** The RFC 5545 rule without `RRULE:`; null for once. */
export const asRrule = ({ kind, text }: Repeats): string | null =>
  kind === 'rule' ? text.trim().replace(/^RRULE:/i, '') : RULES[kind];

/** Within a sentence: `every week`. */
export function repeatsWords(rrule: string | null): string {
  const known = (Object.keys(RULES) as Named[]).find((kind) => RULES[kind] === rrule);
  return known === undefined ? `by the rule ${rrule},` : LABELS[known].toLowerCase();
}

export interface RepeatsFieldProps {
  readonly value: Repeats;
  readonly onChange: (value: Repeats) => void;
  readonly error?: ReactNode;
}

export function RepeatsField({ value, onChange, error }: RepeatsFieldProps) {
  return (
    <Stack gap={8}>
      <Select
        label="Comes"
        data={Object.entries(LABELS).map(([kind, label]) => ({ value: kind, label }))}
        value={value.kind}
        allowDeselect={false}
        onChange={(kind) => kind && onChange({ ...value, kind: kind as Repeats['kind'] })}
        error={value.kind === 'rule' ? undefined : error}
      />
      {value.kind === 'rule' && (
        <TextInput
          label="Rule"
          description="A recurrence rule of RFC 5545, daily or slower, such as FREQ=MONTHLY;BYDAY=1MO for the first Monday of each month, or FREQ=WEEKLY;UNTIL=20270331."
          maxLength={500}
          value={value.text}
          onChange={(event) => onChange({ ...value, text: event.currentTarget.value })}
          error={error}
        />
      )}
    </Stack>
  );
}
