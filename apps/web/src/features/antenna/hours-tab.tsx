/** When the antenna is open: weekly hours on the station's clock, drawn while they are typed, and the blackouts to come. */
import { Anchor, Button, Group, Paper, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { type Blackout, routes, WeeklyRule } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { z } from 'zod';
import { call } from '../../lib/api-client.js';
import type { AntennaChange } from '../../lib/availability-queries.js';
import { formRules } from '../../lib/form-rules.js';
import { paths } from '../../lib/paths.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { stationQueries } from '../../lib/station-queries.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { ChangeEffect } from '../../ui/change-effect.js';
import { DayTime } from '../../ui/day-time.js';
import { formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './antenna.module.css';
import { CalendarRules } from './calendar-rules.js';
import { openHoursAWeek } from './hours-words.js';
import type { TabProps } from './tab-props.js';
import { useAntennaChange } from './use-antenna-change.js';
import { WeekDrawing } from './week-drawing.js';
import { WeekdayPicker } from './weekday-picker.js';

const HoursInput = z.object({ rules: z.array(WeeklyRule).max(50) });
const rules = formRules(HoursInput);
const ROUND_THE_CLOCK: WeeklyRule = { days: [1, 2, 3, 4, 5, 6, 7], fromLocal: '00:00', toLocal: '24:00' };

export function HoursTab({ antenna, station, mayWrite }: TabProps) {
  const form = useForm({ initialValues: { rules: structuredClone(antenna.availability) }, validate: rules });
  useLeaveGuard(form.isDirty() && !form.submitting, 'these hours', true);
  const save = useAntennaChange(
    (body: z.output<typeof HoursInput>) => call(routes.setAvailability, { params: { id: antenna.id }, body }),
    'The hours are saved. Sold contacts outside them stay.',
  );
  const submit = form.onSubmit(async (values) => {
    try {
      await save.mutateAsync(values);
      form.resetDirty();
    } catch (error) {
      form.setErrors({ ...fieldErrors(error), '': sentenceOf(error) });
    }
  });
  return (
    <div className={classes.columns}>
      <div className={classes.form}>
        <form onSubmit={submit} noValidate>
          {form.errors[''] && <ProblemNotice title="The hours were not saved">{form.errors['']}</ProblemNotice>}
          <section className={classes.part} aria-labelledby="weekly-title">
            <header>
              <h2 id="weekly-title" className={classes.cardTitle}>
                Weekly hours
              </h2>
              <span className={classes.quiet}>On the station's clock, {station.timeZone.replaceAll('_', ' ')}.</span>
            </header>
            {form.values.rules.map((rule, index) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: rows have no name of their own; their fields are named by place
              <div key={index} className={classes.listRow}>
                <WeekdayPicker
                  label={`Days of row ${index + 1}`}
                  value={rule.days}
                  onChange={(days) => form.setFieldValue(`rules.${index}.days`, days)}
                  readOnly={!mayWrite}
                />
                <TextInput
                  label="From"
                  w={72}
                  readOnly={!mayWrite}
                  {...form.getInputProps(`rules.${index}.fromLocal`)}
                />
                <TextInput label="To" w={72} readOnly={!mayWrite} {...form.getInputProps(`rules.${index}.toLocal`)} />
                {mayWrite && (
                  <Anchor
                    component="button"
                    type="button"
                    pb={8}
                    onClick={() => form.removeListItem('rules', index)}
                    aria-label={`Remove the hours of row ${index + 1}`}
                  >
                    Remove
                  </Anchor>
                )}
                {(form.errors[`rules.${index}`] ?? form.errors[`rules.${index}.days`]) && (
                  <p className={classes.fieldError} role="alert">
                    {form.errors[`rules.${index}`] ?? form.errors[`rules.${index}.days`]}
                  </p>
                )}
              </div>
            ))}
            <p className={classes.quiet}>
              24:00 is the end of the day; an end before the beginning runs past midnight. Nothing is sold outside these
              hours.
            </p>
            {mayWrite && (
              <Group>
                <Button
                  variant="default"
                  onClick={() =>
                    form.insertListItem('rules', { days: [1, 2, 3, 4, 5], fromLocal: '08:00', toLocal: '18:00' })
                  }
                >
                  Add hours
                </Button>
                <Button variant="default" onClick={() => form.setFieldValue('rules', [ROUND_THE_CLOCK])}>
                  Round the clock
                </Button>
                <Button type="submit" loading={form.submitting} disabled={!form.isDirty()}>
                  Save the hours
                </Button>
              </Group>
            )}
          </section>
        </form>
        <CalendarRules antenna={antenna} station={station} mayWrite={mayWrite} />
        <Blackouts antenna={antenna} mayWrite={mayWrite} timeZone={station.timeZone} />
      </div>
      <div className={classes.stack}>
        <Paper component="section" withBorder className={classes.card} aria-labelledby="week-title">
          <h2 id="week-title" className={classes.cardTitle}>
            Open {formatNumber(openHoursAWeek(form.values.rules), 1)} h a week
          </h2>
          <WeekDrawing rules={form.values.rules} />
        </Paper>
        {mayWrite && (
          <Paper component="section" withBorder className={classes.card} aria-labelledby="hours-effect-title">
            <h2 id="hours-effect-title" className={classes.cardTitle}>
              What these hours would do
            </h2>
            <ChangeEffect
              antennaId={antenna.id}
              change={form.isDirty() ? triedHours(form.values) : null}
              idle="Change the hours to see the coming week by them."
            />
          </Paper>
        )}
      </div>
    </div>
  );
}

/** The hours as they are typed, as a change to try; null while they are incomplete. */
function triedHours(values: z.input<typeof HoursInput>): AntennaChange | null {
  const hours = HoursInput.safeParse(values);
  return hours.success ? { hours: hours.data.rules } : null;
}

interface BlackoutsProps extends Pick<TabProps, 'antenna' | 'mayWrite'> {
  readonly timeZone: string;
}

function Blackouts({ antenna, mayWrite, timeZone }: BlackoutsProps) {
  const client = useQueryClient();
  const remove = useMutation({
    mutationFn: (blackout: Blackout) => call(routes.removeBlackout, { params: { id: blackout.id } }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: stationQueries.all });
      notifications.show({ message: 'That time is open again, within the weekly hours.' });
    },
    onError: (error) => notifications.show({ title: 'It stays closed', message: sentenceOf(error), color: 'buoy' }),
  });
  const ask = (blackout: Blackout) =>
    modals.openConfirmModal({
      title: 'Open this time again?',
      children: 'Operators can book it at once, within the weekly hours.',
      labels: { confirm: 'Open it', cancel: 'Leave it closed' },
      onConfirm: () => remove.mutate(blackout),
    });
  const nowMs = serverNowMs();
  const toCome = antenna.blackouts.filter((blackout) => Date.parse(blackout.toUtc) > nowMs);
  return (
    <section className={classes.part} aria-labelledby="blackouts-title">
      <header>
        <h2 id="blackouts-title" className={classes.cardTitle}>
          Blackouts to come
        </h2>
        <Anchor component={Link} to={paths.availabilityOf(antenna.id)}>
          {mayWrite ? 'Block out time in the calendar' : 'See the calendar'}
        </Anchor>
      </header>
      {toCome.length === 0 && <p className={classes.quiet}>None: it is open whenever the weekly hours say so.</p>}
      <ul className={classes.blackouts}>
        {toCome.map((blackout) => (
          <li key={blackout.id}>
            <span>
              <strong>{blackout.reason}</strong>{' '}
              <DayTime atMs={Date.parse(blackout.fromUtc)} placeTimeZone={timeZone} /> to{' '}
              <DayTime atMs={Date.parse(blackout.toUtc)} placeTimeZone={timeZone} />
              {blackout.note && `, ${blackout.note}`}
            </span>
            {mayWrite && (
              <Anchor component="button" type="button" onClick={() => ask(blackout)}>
                Open again
              </Anchor>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
