/** Blocks out time, once or again and again, on one antenna or several; shows before what it would do. */
import { Button, Group, MultiSelect, Select, Stack, TextInput } from '@mantine/core';
import { DateTimePicker } from '@mantine/dates';
import { useForm } from '@mantine/form';
import { BLACKOUT_REASONS, BlackoutEntry } from '@skyberth/shared';
import { formRules } from '../../lib/form-rules.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { instantOfText, wallText } from '../../lib/zone-time.js';
import { ChangeEffect } from '../../ui/change-effect.js';
import { formatDayTime } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { asRrule, type Repeats, RepeatsField } from '../../ui/repeats-field.js';
import classes from './availability.module.css';
import { useAddBlackouts } from './use-add-blackouts.js';

export interface WallSpan {
  readonly fromWallMs: number;
  readonly toWallMs: number;
}

/** Antennas of one station, as a select takes them. */
export interface AntennaGroup {
  readonly group: string;
  readonly items: { readonly value: string; readonly label: string }[];
}

interface BlackoutFormProps {
  readonly antennaId: string;
  readonly antennas: AntennaGroup[];
  readonly timeZone: string;
  readonly initial: WallSpan;
  readonly onDone: () => void;
}

interface Values {
  antennaIds: string[];
  from: string;
  to: string;
  repeats: Repeats;
  reason: BlackoutEntry['reason'];
  note: string;
}

const check = formRules(BlackoutEntry);
const MINUTE_MS = 60_000;

/** Its length is that between the two instants, so a night of a clock change is as long as it really is. */
const entryOf = ({ from, to, repeats, reason, note }: Values, timeZone: string) => ({
  startLocal: from.slice(0, 16).replace(' ', 'T'),
  durationMin: Math.round((instantOfText(to, timeZone) - instantOfText(from, timeZone)) / MINUTE_MS),
  endLocal: null,
  timeZone,
  rrule: asRrule(repeats),
  reason,
  note,
});

export function BlackoutForm({ antennaId, antennas, timeZone, initial, onDone }: BlackoutFormProps) {
  const form = useForm<Values>({
    initialValues: {
      antennaIds: [antennaId],
      from: wallText(initial.fromWallMs),
      to: wallText(initial.toWallMs),
      repeats: { kind: 'once', text: '' },
      reason: 'maintenance',
      note: '',
    },
    validate: (values) => ({
      ...namedErrors(check(entryOf(values, timeZone))),
      ...(values.antennaIds.length === 0 ? { antennaIds: 'Choose at least one antenna.' } : {}),
    }),
  });
  const save = useAddBlackouts(onDone);
  const submit = form.onSubmit(async (values) => {
    const entries = [BlackoutEntry.parse(entryOf(values, timeZone))];
    try {
      await save.mutateAsync({ antennaIds: values.antennaIds, entries });
    } catch (error) {
      form.setErrors(namedErrors(fieldErrors(error)));
    }
  });
  const [fromMs, toMs] = [instantOfText(form.values.from, timeZone), instantOfText(form.values.to, timeZone)];
  const tried = BlackoutEntry.safeParse(entryOf(form.values, timeZone));
  const [first] = form.values.antennaIds;
  return (
    <form onSubmit={submit} noValidate>
      <Stack>
        {save.error && <ProblemNotice title="The time stays open">{sentenceOf(save.error)}</ProblemNotice>}
        <MultiSelect label="Antennas" data={antennas} searchable {...form.getInputProps('antennaIds')} />
        <Group grow align="start">
          <DateTimePicker
            label="From, on the station's clock"
            valueFormat="ddd D MMM YYYY HH:mm"
            {...form.getInputProps('from')}
          />
          <DateTimePicker label="To" valueFormat="ddd D MMM YYYY HH:mm" {...form.getInputProps('to')} />
        </Group>
        {fromMs < toMs && (
          <p className={classes.quiet}>
            In UTC: {formatDayTime(fromMs)} to {formatDayTime(toMs)}.
          </p>
        )}
        <RepeatsField
          value={form.values.repeats}
          onChange={(repeats) => form.setFieldValue('repeats', repeats)}
          error={form.errors['repeats']}
        />
        <Select label="Reason" data={[...BLACKOUT_REASONS]} allowDeselect={false} {...form.getInputProps('reason')} />
        <TextInput
          label="Note"
          description="Only your own people read it."
          maxLength={120}
          {...form.getInputProps('note')}
        />
        {first !== undefined && (
          <ChangeEffect antennaId={first} change={tried.success ? { addBlackouts: [tried.data] } : null} />
        )}
        {form.values.antennaIds.length > 1 && (
          <p className={classes.quiet}>That is for the first antenna; sold contacts on the others stay sold too.</p>
        )}
        <Group>
          <Button type="submit" loading={save.isPending}>
            Block out this time
          </Button>
          <Button variant="default" onClick={onDone}>
            Cancel
          </Button>
        </Group>
      </Stack>
    </form>
  );
}

/** The API names the fields of an entry; the form has its own. */
function namedErrors(errors: Record<string, string>): Record<string, string> {
  const named: Record<string, string> = {};
  for (const [path, message] of Object.entries(errors)) {
    const field = path.replace(/^entries\.0\./, '');
    if (field === 'startLocal') named['from'] = message;
    else if (field === 'durationMin') named['to'] = message.startsWith('Invalid') ? 'Choose when it ends.' : message;
    else if (field === 'rrule') named['repeats'] = message;
    else named[field] = message;
  }
  return named;
}
