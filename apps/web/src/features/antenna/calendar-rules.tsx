/** Openings and blackouts that come again, in words, each of which can be taken away. */
import { Anchor, Button, Group, Modal } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type CalendarRule, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { availabilityQueries } from '../../lib/availability-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { stationQueries } from '../../lib/station-queries.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { repeatsWords } from '../../ui/repeats-field.js';
import classes from './antenna.module.css';
import { OpeningForm } from './opening-form.js';
import type { TabProps } from './tab-props.js';

const WEEK_MS = 7 * 86_400_000;

export function CalendarRules({ antenna, station, mayWrite }: TabProps) {
  const [period] = useState(() => {
    const nowMs = serverNowMs();
    return { fromUtc: new Date(nowMs).toISOString(), toUtc: new Date(nowMs + WEEK_MS).toISOString() };
  });
  const calendar = useQuery(availabilityQueries.calendar(antenna.id, period.fromUtc, period.toUtc));
  const [isAdding, setAdding] = useState(false);
  const remove = useRemove();
  const rules = calendar.data?.rules ?? [];
  return (
    <section className={classes.part} aria-labelledby="rules-title">
      <header>
        <h2 id="rules-title" className={classes.cardTitle}>
          Openings and repeated blackouts
        </h2>
        {mayWrite && (
          <Button variant="default" size="xs" onClick={() => setAdding(true)}>
            Add an opening
          </Button>
        )}
      </header>
      {calendar.error && (
        <ProblemNotice title="They could not be read" onRetry={() => void calendar.refetch()}>
          {sentenceOf(calendar.error)}
        </ProblemNotice>
      )}
      {calendar.data && rules.length === 0 && <p className={classes.quiet}>None beyond the weekly hours.</p>}
      <ul className={classes.blackouts}>
        {rules.map((rule) => (
          <li key={rule.id}>
            <span>
              <strong>{rule.kind === 'opening' ? 'Open' : rule.reason}</strong> {ruleWords(rule)}
            </span>
            {mayWrite && (
              <Anchor component="button" type="button" onClick={() => remove.mutate(rule)}>
                Remove
              </Anchor>
            )}
          </li>
        ))}
      </ul>
      <Modal
        opened={isAdding}
        onClose={() => setAdding(false)}
        title={`Open ${antenna.name} beyond its weekly hours`}
        size="lg"
        closeButtonProps={{ 'aria-label': 'Close' }}
      >
        <OpeningForm antenna={antenna} station={station} onDone={() => setAdding(false)} />
      </Modal>
    </section>
  );
}

function ruleWords({ rrule, startLocal, durationMin, endLocal, exceptLocal, timeZone, note }: CalendarRule): string {
  const length = endLocal === null ? `for ${durationMin} min` : `until ${endLocal}`;
  const except =
    exceptLocal.length === 0 ? '' : `, but not on ${exceptLocal.map((each) => each.slice(0, 10)).join(', ')}`;
  const clock = timeZone.replaceAll('_', ' ');
  const when = `${repeatsWords(rrule)} from ${startLocal.replace('T', ' ')} ${length}${except}, on the clock of ${clock}`;
  return note ? `${when}: ${note}` : when;
}

/** Takes a rule away, with a way back. */
function useRemove() {
  const client = useQueryClient();
  const refresh = () => void client.invalidateQueries({ queryKey: stationQueries.all });
  const undo = (rule: CalendarRule) => {
    const { id: _id, antennaId, kind, reason, ...entry } = rule;
    const again =
      kind === 'opening'
        ? call(routes.addOpening, { params: { id: antennaId }, body: entry })
        : call(routes.addBlackouts, {
            body: { antennaIds: [antennaId], entries: [{ ...entry, reason: reason as 'maintenance' }] },
          });
    again.then(refresh, (error: unknown) =>
      notifications.show({ title: 'It was not put back', message: sentenceOf(error), color: 'buoy' }),
    );
  };
  return useMutation({
    mutationFn: (rule: CalendarRule) => call(routes.removeCalendarEntries, { body: { ids: [rule.id] } }),
    onSuccess: (_done, rule) => {
      refresh();
      const noticeId = `removed ${rule.id}`;
      notifications.show({
        id: noticeId,
        autoClose: 10_000,
        message: (
          <Group justify="space-between">
            It is gone.
            <Anchor
              component="button"
              type="button"
              onClick={() => {
                undo(rule);
                notifications.hide(noticeId);
              }}
            >
              Put it back
            </Anchor>
          </Group>
        ),
      });
    },
    onError: (error) => notifications.show({ title: 'It stays', message: sentenceOf(error), color: 'buoy' }),
  });
}
