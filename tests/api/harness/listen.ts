/** Listens to a stream of server-sent events as a browser does, and keeps what came. */
import { ContactEvent, LIVE_EVENT } from '@skyberth/shared';
import type { Person } from './people.js';

export interface Listening {
  readonly events: readonly ContactEvent[];
  /** Resolves with everything heard so far as soon as `isEnough` says so. */
  until(isEnough: (events: readonly ContactEvent[]) => boolean): Promise<readonly ContactEvent[]>;
  close(): void;
}

export const addressOfStream = (serverUrl: string, path: string): URL => new URL(path, serverUrl);

/** Resolves once the stream is open. Throws with the status where it is refused. */
export async function listen(url: URL, as: Person, lastEventId?: number): Promise<Listening> {
  const control = new AbortController();
  const response = await fetch(url, {
    headers: {
      Accept: 'text/event-stream',
      Cookie: as.jar.header(url.pathname),
      ...(lastEventId === undefined ? {} : { 'Last-Event-ID': String(lastEventId) }),
    },
    signal: control.signal,
  });
  if (!response.ok || !response.body) throw new Error(`The stream answered ${response.status}.`);
  const events: ContactEvent[] = [];
  let heard = (): void => {};
  void read(response.body, (event) => {
    events.push(event);
    heard();
  }).catch((error: unknown) => {
    if (!control.signal.aborted) throw error;
  });
  return {
    events,
    until: (isEnough) =>
      new Promise((resolve) => {
        heard = () => {
          if (isEnough(events)) resolve([...events]);
        };
        heard();
      }),
    close: () => control.abort(),
  };
}

async function read(body: ReadableStream<Uint8Array>, take: (event: ContactEvent) => void): Promise<void> {
  let text = '';
  const decoder = new TextDecoder();
  for await (const part of body) {
    text += decoder.decode(part, { stream: true });
    const blocks = text.split('\n\n');
    text = blocks.pop() ?? '';
    for (const block of blocks) {
      const fields = new Map(
        block.split('\n').map((line) => [line.split(': ')[0], line.slice(line.indexOf(': ') + 2)]),
      );
      if (fields.get('event') !== LIVE_EVENT) continue;
      const event = ContactEvent.parse(JSON.parse(fields.get('data') ?? ''));
      if (fields.get('id') !== String(event.seq)) throw new Error('The id of an event is not its number.');
      take(event);
    }
  }
}
