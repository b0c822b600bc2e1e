/** The four things that a station reports while a contact runs, on buttons that take a gloved thumb. */
import { Button, Modal, NumberInput, Textarea } from '@mantine/core';
import { useState } from 'react';
import { type ReportInput, useLiveReport } from '../lib/live.js';
import { sentenceOf } from '../lib/problem-fields.js';
import { formatBytes, formatTime } from './format.js';
import classes from './live-report.module.css';
import { ProblemNotice } from './problem-notice.js';

/** What has been reported so far, for the small line on each button. */
export interface ReportedSoFar {
  readonly acquiredUtc: string | null;
  readonly lostUtc: string | null;
  readonly bytes: number | null;
  readonly bytesUtc: string | null;
  readonly ebN0Db: number | null;
  readonly note: string | null;
}

interface LiveReportProps {
  readonly bookingId: string;
  readonly name: string;
  readonly reported: ReportedSoFar;
  readonly isUnderWay: boolean;
}

type Asking = 'lost' | 'bytes' | 'note' | null;

export function LiveReport({ bookingId, name, reported, isUnderWay }: LiveReportProps) {
  const report = useLiveReport(bookingId);
  const [asking, setAsking] = useState<Asking>(null);
  const send = (body: ReportInput) => report.mutate(body, { onSuccess: () => setAsking(null) });
  const at = (utc: string | null) => (utc ? formatTime(Date.parse(utc)) : null);
  return (
    <>
      {report.error && !asking && (
        <ProblemNotice title="The report was not taken">{sentenceOf(report.error)}</ProblemNotice>
      )}
      <fieldset className={classes.buttons} aria-label={`Report on ${name}`}>
        <Button
          variant={reported.acquiredUtc ? 'light' : 'filled'}
          color={reported.acquiredUtc ? 'kelp' : 'deep'}
          loading={report.isPending && report.variables.kind === 'acquired'}
          onClick={() => send({ kind: 'acquired' })}
        >
          <Label title="Acquired" note={at(reported.acquiredUtc) ?? 'signal found'} />
        </Button>
        <Button variant={reported.acquiredUtc ? 'filled' : 'default'} onClick={() => setAsking('lost')}>
          <Label title="Lost" note={at(reported.lostUtc) ?? 'signal gone'} />
        </Button>
        <Button variant="default" onClick={() => setAsking('bytes')}>
          <Label
            title="Bytes, Eb/N0"
            note={
              reported.bytes === null ? 'none yet' : `${formatBytes(reported.bytes)} at ${at(reported.bytesUtc) ?? ''}`
            }
          />
        </Button>
        <Button variant="default" onClick={() => setAsking('note')}>
          <Label title="Note" note={reported.note ? `“${reported.note.slice(0, 18)}”` : 'none yet'} />
        </Button>
      </fieldset>
      <Modal
        opened={asking !== null}
        onClose={() => setAsking(null)}
        title={`${name}: ${TITLES[asking ?? 'note']}`}
        closeButtonProps={{ 'aria-label': 'Close' }}
      >
        {report.error && <ProblemNotice title="The report was not taken">{sentenceOf(report.error)}</ProblemNotice>}
        {asking === 'lost' && <LostForm isUnderWay={isUnderWay} isSending={report.isPending} send={send} />}
        {asking === 'bytes' && <BytesForm isSending={report.isPending} send={send} />}
        {asking === 'note' && <NoteForm isSending={report.isPending} send={send} />}
      </Modal>
    </>
  );
}

const TITLES = { lost: 'signal lost', bytes: 'received so far', note: 'note' } as const;

function Label({ title, note }: { readonly title: string; readonly note: string }) {
  return (
    <span className={classes.label}>
      <strong>{title}</strong>
      <small>{note}</small>
    </span>
  );
}

interface FormProps {
  readonly isSending: boolean;
  readonly send: (body: ReportInput) => void;
}

function LostForm({ isSending, send, isUnderWay }: FormProps & { readonly isUnderWay: boolean }) {
  return (
    <div className={classes.form}>
      <p>A fade is noted and the contact goes on. Lost for good ends the contact now; its report is then expected.</p>
      <Button size="md" variant="default" loading={isSending} onClick={() => send({ kind: 'lost', isFinal: false })}>
        It faded, we keep on it
      </Button>
      {isUnderWay && (
        <Button
          size="md"
          variant="outline"
          color="buoy"
          loading={isSending}
          onClick={() => send({ kind: 'lost', isFinal: true })}
        >
          Lost for good: end the contact
        </Button>
      )}
    </div>
  );
}

const BYTES_PER_MB = 1e6;

function BytesForm({ isSending, send }: FormProps) {
  const [megabytes, setMegabytes] = useState<number | string>('');
  const [ebN0Db, setEbN0Db] = useState<number | string>('');
  return (
    <form
      className={classes.form}
      onSubmit={(event) => {
        event.preventDefault();
        if (typeof megabytes === 'number') send({ kind: 'bytes', bytes: Math.round(megabytes * BYTES_PER_MB) });
        if (typeof ebN0Db === 'number') send({ kind: 'eb/n0', ebN0Db });
      }}
    >
      <NumberInput label="Received so far, MB" min={0} value={megabytes} onChange={setMegabytes} data-autofocus />
      <NumberInput label="Eb/N0, dB" decimalScale={1} min={-50} max={100} value={ebN0Db} onChange={setEbN0Db} />
      <Button
        size="md"
        type="submit"
        loading={isSending}
        disabled={typeof megabytes !== 'number' && typeof ebN0Db !== 'number'}
      >
        Send
      </Button>
    </form>
  );
}

function NoteForm({ isSending, send }: FormProps) {
  const [text, setText] = useState('');
  return (
    <form
      className={classes.form}
      onSubmit={(event) => {
        event.preventDefault();
        send({ kind: 'note', text });
      }}
    >
      <Textarea
        label="Note; the other side reads it at once"
        maxLength={500}
        autosize
        minRows={2}
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
        data-autofocus
      />
      <Button size="md" type="submit" loading={isSending} disabled={text.trim() === ''}>
        Send
      </Button>
    </form>
  );
}
