/** Follows contacts as they happen: a stream that comes back by itself after a lost line, and what a station sends. */
import { type BodyInput, ContactEvent, LIVE_BEAT, LIVE_EVENT, LiveBeat, routes } from '@skyberth/shared';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import { addressOf, call } from './api-client.js';
import { bookingQueries } from './booking-queries.js';
import { serverNowMs, setServerTime } from './server-clock.js';
import { sessionQuery } from './session.js';

export const liveQueries = {
  events: (bookingId: string) =>
    queryOptions({
      queryKey: ['live', 'events', bookingId],
      queryFn: ({ signal }) => call(routes.contactEvents, { params: { id: bookingId }, signal }),
    }),
  orbit: (bookingId: string) =>
    queryOptions({
      queryKey: ['live', 'orbit', bookingId],
      queryFn: ({ signal }) => call(routes.contactOrbit, { params: { id: bookingId }, signal }),
      staleTime: 5 * 60_000,
    }),
};

/** The server says something every 15 s; a line that is silent for longer than this is taken as lost. */
const SILENT_AFTER_MS = 40_000;
const FIRST_WAIT_MS = 1_000;
const LONGEST_WAIT_MS = 30_000;

export interface LiveLine {
  readonly isOpen: boolean;
  /** When the line was lost, by the server's clock; null while it is open or before it first was. */
  readonly lostMs: number | null;
}

/**
 * Listens at `address` while it is given. After a lost line it goes on behind the last event that was heard, so `hear` gets every
 * event once; a browser gives up where the session has run out, so coming back is done here, with the session renewed first.
 */
export function useLive(address: string | null, hear: (event: ContactEvent) => void): LiveLine {
  const client = useQueryClient();
  const [line, setLine] = useState<LiveLine>({ isOpen: false, lostMs: null });
  const latest = useRef(hear);
  latest.current = hear;
  useEffect(() => {
    if (address === null) return;
    const follower = new Follower(address, {
      hear: (event) => latest.current(event),
      line: (isOpen) => setLine((now) => ({ isOpen, lostMs: isOpen ? null : (now.lostMs ?? serverNowMs()) })),
      renewSession: () => client.fetchQuery({ ...sessionQuery, staleTime: 0 }).then(Boolean, () => false),
    });
    return () => follower.close();
  }, [address, client]);
  return line;
}

interface Told {
  readonly hear: (event: ContactEvent) => void;
  readonly line: (isOpen: boolean) => void;
  readonly renewSession: () => Promise<boolean>;
}

class Follower {
  private source: EventSource | null = null;
  private lastSeq: number | null = null;
  private waitMs = FIRST_WAIT_MS;
  private waiting: number | undefined;
  private silence: number | undefined;
  private isClosed = false;

  constructor(
    private readonly address: string,
    private readonly told: Told,
  ) {
    this.open();
  }

  close(): void {
    this.isClosed = true;
    this.drop();
    window.clearTimeout(this.waiting);
  }

  private open(): void {
    const joint = this.address.includes('?') ? '&' : '?';
    const source = new EventSource(
      this.lastSeq === null ? this.address : `${this.address}${joint}after=${this.lastSeq}`,
    );
    this.source = source;
    this.awaitSign();
    source.addEventListener(LIVE_BEAT, (message: MessageEvent<string>) => {
      setServerTime(LiveBeat.parse(JSON.parse(message.data)).serverTimeUtc);
      this.waitMs = FIRST_WAIT_MS;
      this.told.line(true);
      this.awaitSign();
    });
    source.addEventListener(LIVE_EVENT, (message: MessageEvent<string>) => {
      const event = ContactEvent.parse(JSON.parse(message.data));
      this.awaitSign();
      if (this.lastSeq !== null && event.seq <= this.lastSeq) return;
      this.lastSeq = event.seq;
      this.told.hear(event);
    });
    source.onerror = () => this.comeBack();
  }

  private awaitSign(): void {
    window.clearTimeout(this.silence);
    this.silence = window.setTimeout(() => this.comeBack(), SILENT_AFTER_MS);
  }

  private drop(): void {
    window.clearTimeout(this.silence);
    this.source?.close();
    this.source = null;
  }

  private comeBack(): void {
    if (this.isClosed) return;
    this.drop();
    this.told.line(false);
    window.clearTimeout(this.waiting);
    this.waiting = window.setTimeout(() => {
      void this.told.renewSession().then((isSignedIn) => {
        if (this.isClosed) return;
        if (isSignedIn) this.open();
        else this.comeBack();
      });
    }, this.waitMs);
    this.waitMs = Math.min(2 * this.waitMs, LONGEST_WAIT_MS);
  }
}

export const contactStream = (bookingId: string): string =>
  addressOf(routes.contactLive, { params: { id: bookingId } });
export const stationStream = (stationId: string): string =>
  addressOf(routes.organisationLive, { query: { stationId } });

export type ReportInput = BodyInput<typeof routes.reportLive>;

/** Sends one live report; it comes back over the stream like those of others, and may have moved the booking. */
export function useLiveReport(bookingId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: ReportInput) => call(routes.reportLive, { params: { id: bookingId }, body }),
    onSettled: () => {
      void client.invalidateQueries({ queryKey: liveQueries.events(bookingId).queryKey });
      void client.invalidateQueries({ queryKey: bookingQueries.one(bookingId).queryKey });
      void client.invalidateQueries({ queryKey: ['run-sheet'] });
    },
  });
}
