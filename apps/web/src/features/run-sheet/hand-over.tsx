import { Button, Textarea } from '@mantine/core';
import type { RunSheet } from '@skyberth/shared';
import { useState } from 'react';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { DayTime } from '../../ui/day-time.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './run-sheet.module.css';
import { useHandOver } from './run-sheet-queries.js';

/** What the watches wrote for each other, newest first, and a field for the next. */
export function HandOver({ stationId, notes }: { readonly stationId: string; readonly notes: RunSheet['notes'] }) {
  const mayWrite = useCan()('bookings.report');
  const [text, setText] = useState('');
  const write = useHandOver(stationId);
  return (
    <section className={classes.handOver} aria-labelledby="hand-over-title">
      <h2 id="hand-over-title" className={classes.heading}>
        Hand-over
      </h2>
      {notes.length === 0 && <p className={classes.quiet}>Nothing written yet.</p>}
      {notes.map((note) => (
        <p key={note.id}>
          <strong>
            {note.byName}, <DayTime atMs={Date.parse(note.writtenUtc)} />:
          </strong>{' '}
          {note.text}
        </p>
      ))}
      {mayWrite && (
        <form
          className="sk-no-print"
          onSubmit={(event) => {
            event.preventDefault();
            write.mutate(text, { onSuccess: () => setText('') });
          }}
        >
          <Textarea
            label="For the next watch"
            autosize
            minRows={4}
            maxLength={2000}
            value={text}
            onChange={(event) => setText(event.currentTarget.value)}
          />
          {write.error && <ProblemNotice title="The note was not saved">{sentenceOf(write.error)}</ProblemNotice>}
          <div className={classes.acts}>
            <Button type="submit" variant="default" loading={write.isPending} disabled={text.trim() === ''}>
              Save note
            </Button>
            <span className={classes.quiet}>Buyers never see it.</span>
          </div>
        </form>
      )}
    </section>
  );
}
