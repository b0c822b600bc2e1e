/** What the two sides write to each other about this contact. Opening the page counts as reading. */
import { Button, Skeleton, Textarea } from '@mantine/core';
import { type AttachedFile, type Booking, type Message, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { call } from '../../lib/api-client.js';
import { messageQueries } from '../../lib/message-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { AttachedFiles } from '../../ui/attached-files.js';
import { DayTime } from '../../ui/day-time.js';
import { FileDrop } from '../../ui/file-drop.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './messages.module.css';

const SIDE_WORDS = { operator: 'operator', owner: 'station', admin: 'marketplace' } as const;

export function MessagesSection({ booking }: { readonly booking: Booking }) {
  const may = useCan();
  const { data, error } = useQuery({ ...messageQueries.of(booking.id), enabled: may('messages.read') });
  useRead(booking.id, data?.items);
  if (!may('messages.read')) return null;
  return (
    <section className={classes.section} aria-labelledby="messages-title" id="messages">
      <h2 id="messages-title">Messages</h2>
      {error && !data && <ProblemNotice title="The messages could not be read">{sentenceOf(error)}</ProblemNotice>}
      {!data && !error && <Skeleton height={80} aria-label="Loading messages" />}
      {data?.items.length === 0 && <p className={classes.quiet}>Nothing was written yet.</p>}
      <ol className={classes.list} aria-live="polite">
        {data?.items.map((message) => (
          <li key={message.id} data-side={message.side} data-new={message.isNew || undefined}>
            <div className={classes.head}>
              <strong>{message.byName}</strong>, {SIDE_WORDS[message.side]}
              {message.isNew && <span className={classes.new}>new</span>}
              <span className={classes.when}>
                <DayTime atMs={Date.parse(message.atUtc)} />
              </span>
            </div>
            <p>{message.text}</p>
            <AttachedFiles files={message.files} label={`Files of the message by ${message.byName}`} />
          </li>
        ))}
      </ol>
      {may('messages.write') && <Compose bookingId={booking.id} />}
    </section>
  );
}

/** Once seen, the newest message is marked as read, and counts elsewhere follow. */
function useRead(bookingId: string, items: readonly Message[] | undefined): void {
  const client = useQueryClient();
  const newest = items?.findLast((message) => message.isNew)?.id;
  useEffect(() => {
    if (!newest) return;
    void call(routes.readMessages, { params: { id: bookingId }, body: { messageId: newest } }).then(() => {
      void client.invalidateQueries({ queryKey: ['messages', 'threads'] });
      void client.invalidateQueries({ queryKey: ['home'] });
    });
  }, [client, bookingId, newest]);
}

function Compose({ bookingId }: { readonly bookingId: string }) {
  const client = useQueryClient();
  const [text, setText] = useState('');
  const [files, setFiles] = useState<readonly AttachedFile[]>([]);
  const [isAttaching, setAttaching] = useState(false);
  const send = useMutation({
    mutationFn: () =>
      call(routes.sendMessage, {
        params: { id: bookingId },
        body: { text: text.trim(), fileIds: files.map(({ id }) => id) },
      }),
    onSuccess: () => {
      setText('');
      setFiles([]);
      setAttaching(false);
      void client.invalidateQueries({ queryKey: ['messages'] });
    },
  });
  return (
    <form
      className={classes.compose}
      onSubmit={(event) => {
        event.preventDefault();
        send.mutate();
      }}
    >
      {send.error && <ProblemNotice title="The message was not sent">{sentenceOf(send.error)}</ProblemNotice>}
      <Textarea
        label="Write to the other side"
        autosize
        minRows={2}
        maxRows={10}
        maxLength={4_000}
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
      />
      {isAttaching && <FileDrop label="Files" files={files} onChange={setFiles} />}
      <div className={classes.buttons}>
        <Button type="submit" disabled={text.trim() === ''} loading={send.isPending}>
          Send
        </Button>
        {!isAttaching && (
          <Button variant="default" onClick={() => setAttaching(true)}>
            Attach files
          </Button>
        )}
      </div>
    </form>
  );
}
