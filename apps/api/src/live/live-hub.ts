/**
 * Streams of events to listening pages. Events are read from the table by number, a few times a second while somebody
 * listens and at once after a report of this process, so that several servers on one database all hear everything, and a
 * listener that comes back with the last number it saw misses nothing and hears nothing twice.
 */
import { type BeforeApplicationShutdown, Inject, Injectable, Logger } from '@nestjs/common';
import { type ContactEvent, LIVE_BEAT, LIVE_EVENT } from '@skyberth/shared';
import type { Response } from 'express';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DomainError } from '../platform/domain-error.js';
import { type HeardEvent, type Listening, LiveRepository } from './live.repository.js';

const LOOK_EVERY_MS = 250;
const BEAT_EVERY_MS = 15_000;
/** A stream ends after so many beats, ten minutes; the page comes back with a session that is checked anew. */
const MOST_BEATS = 40;
const MOST_AT_ONCE = 500;
const MOST_STREAMS_OF_ONE = 8;
const MOST_STREAMS = 2_000;
/** A reader this far behind is cut off and comes back by itself. */
const MOST_UNREAD_BYTES = 1_000_000;
/** What a browser waits before it comes back. */
const COME_BACK_AFTER_MS = 1_000;

interface Listener extends Listening {
  readonly personId: string;
  readonly response: Response;
  sentSeq: number;
  beats: number;
}

@Injectable()
export class LiveHub implements BeforeApplicationShutdown {
  private readonly log = new Logger('Live');
  private readonly listeners = new Set<Listener>();
  private seenSeq = 0;
  private looking: NodeJS.Timeout | undefined;
  private beating: NodeJS.Timeout | undefined;

  constructor(
    private readonly repository: LiveRepository,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /**
   * Opens a stream that goes on after event `afterSeq`; null begins with what comes next. Throws `too-many` where this person
   * or the server has as many streams as they may.
   */
  open(what: Listening & { readonly personId: string; readonly afterSeq: number | null }, response: Response): void {
    const { personId, afterSeq, ...listening } = what;
    this.refuseTooMany(personId);
    response.status(200).set({
      'Content-Type': 'text/event-stream; charset=utf-8',
      'Cache-Control': 'no-store, no-transform',
      'X-Accel-Buffering': 'no',
      // A stream that was ended must not keep its line, or the server would wait for it when it closes.
      Connection: 'close',
    });
    response.flushHeaders();
    if (this.listeners.size === 0) this.begin();
    const listener: Listener = { ...listening, personId, response, sentSeq: afterSeq ?? this.seenSeq, beats: 0 };
    response.write(`retry: ${COME_BACK_AFTER_MS}\n\n`);
    this.beat(listener);
    this.catchUp(listener);
    this.listeners.add(listener);
    response.on('close', () => this.forget(listener));
  }

  /** Looks at once instead of at the next turn; called after something was written. */
  poke(): void {
    if (this.listeners.size > 0) this.look();
  }

  beforeApplicationShutdown(): void {
    for (const { response } of this.listeners) response.end();
    this.rest();
  }

  private refuseTooMany(personId: string): void {
    let own = 0;
    for (const listener of this.listeners) if (listener.personId === personId) own += 1;
    if (own < MOST_STREAMS_OF_ONE && this.listeners.size < MOST_STREAMS) return;
    throw new DomainError(
      'too-many',
      own < MOST_STREAMS_OF_ONE
        ? 'Too many pages are following contacts live just now. This one looks again every half minute.'
        : `You follow contacts live in ${MOST_STREAMS_OF_ONE} places already. Close one of them.`,
    );
  }

  private begin(): void {
    this.seenSeq = this.repository.lastSeq();
    this.looking = setInterval(() => this.look(), LOOK_EVERY_MS);
    this.beating = setInterval(() => {
      for (const listener of this.listeners) this.beat(listener);
    }, BEAT_EVERY_MS);
  }

  private rest(): void {
    clearInterval(this.looking);
    clearInterval(this.beating);
  }

  private forget(listener: Listener): void {
    this.listeners.delete(listener);
    if (this.listeners.size === 0) this.rest();
  }

  private look(): void {
    try {
      for (;;) {
        const events = this.repository.after(this.seenSeq, MOST_AT_ONCE);
        for (const event of events) this.tell(event);
        this.seenSeq = events.at(-1)?.seq ?? this.seenSeq;
        if (events.length < MOST_AT_ONCE) return;
      }
    } catch (error) {
      // The next turn asks for the same numbers again, so nothing is lost by a database that was busy.
      this.log.error(error instanceof Error ? (error.stack ?? error.message) : String(error));
    }
  }

  private tell(event: HeardEvent): void {
    const text = eventText(event);
    for (const listener of this.listeners) if (concerns(event, listener)) this.send(listener, event.seq, text);
  }

  private catchUp(listener: Listener): void {
    for (;;) {
      const events = this.repository.missed(listener, listener.sentSeq, MOST_AT_ONCE);
      for (const event of events) this.send(listener, event.seq, eventText(event));
      if (events.length < MOST_AT_ONCE) return;
    }
  }

  private send(listener: Listener, seq: number, text: string): void {
    if (seq <= listener.sentSeq) return;
    listener.sentSeq = seq;
    listener.response.write(text);
    if (listener.response.writableLength > MOST_UNREAD_BYTES) listener.response.destroy();
  }

  private beat(listener: Listener): void {
    listener.beats += 1;
    if (listener.beats > MOST_BEATS) {
      listener.response.end();
      return;
    }
    const serverTimeUtc = new Date(this.clock.nowMs()).toISOString();
    listener.response.write(`event: ${LIVE_BEAT}\ndata: ${JSON.stringify({ serverTimeUtc })}\n\n`);
  }
}

function concerns(event: HeardEvent, { viewer, bookingId, stationId }: Listening): boolean {
  if (bookingId !== null && event.bookingId !== bookingId) return false;
  if (stationId !== null && event.stationId !== stationId) return false;
  if (viewer.organisationKind === 'staff') return true;
  return event[viewer.organisationKind === 'operator' ? 'operatorId' : 'ownerId'] === viewer.organisationId;
}

/** JSON has no line breaks of its own, so one `data` line carries it, whatever a note holds. */
const eventText = (event: HeardEvent): string =>
  `id: ${event.seq}\nevent: ${LIVE_EVENT}\ndata: ${JSON.stringify(contactEventView(event))}\n\n`;

export function contactEventView(event: HeardEvent): ContactEvent {
  return {
    seq: event.seq,
    bookingId: event.bookingId,
    kind: event.kind,
    atUtc: new Date(event.atMs).toISOString(),
    happenedUtc: new Date(event.happenedMs).toISOString(),
    value: event.value,
    sentence: event.sentence,
    by: event.actorName ?? 'Skyberth',
  };
}
