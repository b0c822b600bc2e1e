/** Reads blackouts from an iCalendar file: what can be used, what is refused and why, and only then the saving. */
import { Button, FileInput, Group, MultiSelect, Select, Stack } from '@mantine/core';
import { BLACKOUT_REASONS, type BlackoutEntry, type ResponseOf, routes } from '@skyberth/shared';
import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { ChangeEffect } from '../../ui/change-effect.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { repeatsWords } from '../../ui/repeats-field.js';
import classes from './availability.module.css';
import type { AntennaGroup } from './blackout-form.js';
import { useAddBlackouts } from './use-add-blackouts.js';

interface CalendarFileFormProps {
  readonly antennaId: string;
  readonly antennas: AntennaGroup[];
  readonly timeZone: string;
  readonly onDone: () => void;
}

export function CalendarFileForm({ antennaId, antennas, timeZone, onDone }: CalendarFileFormProps) {
  const [chosen, setChosen] = useState([antennaId]);
  const [reason, setReason] = useState<BlackoutEntry['reason']>('own use');
  const read = useMutation({
    mutationFn: async (file: File) =>
      call(routes.readCalendarFile, { body: { text: await file.text(), timeZone, reason } }),
  });
  const save = useAddBlackouts(onDone);
  const entries = (read.data?.entries ?? []).map((entry) => ({ ...entry, reason }));
  return (
    <Stack>
      <Group grow align="start">
        <FileInput
          label="iCalendar file"
          description="An .ics file of up to 500 kB and 200 events."
          accept=".ics,text/calendar"
          placeholder="Choose a file"
          onChange={(file) => file && read.mutate(file)}
        />
        <Select
          label="Reason"
          description="For all of them; the titles become notes."
          data={[...BLACKOUT_REASONS]}
          value={reason}
          allowDeselect={false}
          onChange={(next) => next && setReason(next)}
        />
      </Group>
      <MultiSelect label="Antennas" data={antennas} value={chosen} onChange={setChosen} searchable />
      {read.isPending && <p className={classes.quiet}>Reading the file ...</p>}
      {read.error && <ProblemNotice title="The file was not read">{sentenceOf(read.error)}</ProblemNotice>}
      {read.data && <Found reading={read.data} />}
      {entries.length > 0 && chosen[0] !== undefined && (
        <ChangeEffect antennaId={chosen[0]} change={{ addBlackouts: entries }} />
      )}
      {save.error && <ProblemNotice title="The time stays open">{sentenceOf(save.error)}</ProblemNotice>}
      <Group>
        <Button
          loading={save.isPending}
          disabled={entries.length === 0 || chosen.length === 0}
          onClick={() => save.mutate({ antennaIds: chosen, entries })}
        >
          {entries.length === 0
            ? 'Nothing to block out yet'
            : `Block out ${entries.length === 1 ? 'it' : `these ${entries.length}`}`}
        </Button>
        <Button variant="default" onClick={onDone}>
          Cancel
        </Button>
      </Group>
    </Stack>
  );
}

function Found({ reading: { entries, refused } }: { readonly reading: ResponseOf<typeof routes.readCalendarFile> }) {
  return (
    <div role="status">
      {refused.length > 0 && (
        <ProblemNotice
          title={refused.length === 1 ? 'One event cannot be used' : `${refused.length} events cannot be used`}
          items={refused.map(({ event, message }) => ({ where: event, message }))}
        >
          {entries.length > 0 && 'The others can; nothing is saved yet.'}
        </ProblemNotice>
      )}
      <ul className={classes.found}>
        {entries.map((entry) => (
          <li key={`${entry.startLocal} ${entry.timeZone} ${entry.rrule} ${entry.note}`}>
            <strong>{entry.note || 'No title'}</strong>, {repeatsWords(entry.rrule)} from{' '}
            {entry.startLocal.replace('T', ' ')}{' '}
            {entry.endLocal === null ? `for ${entry.durationMin} min` : `until ${entry.endLocal}`}, on the clock of{' '}
            {entry.timeZone.replaceAll('_', ' ')}
            {entry.exceptLocal.length > 0 && `, with ${entry.exceptLocal.length} left out`}
          </li>
        ))}
      </ul>
    </div>
  );
}
