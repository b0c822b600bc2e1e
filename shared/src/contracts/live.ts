/** A contact as it happens: what the station reports, and the streams by which the other side sees it at once. */
import { z } from 'zod';
import { Id, IdParams, LatitudeDeg, LongitudeDeg, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

/** `diary` is a line of the booking's own diary; the others are the station's live reports. */
export const ContactEvent = z.object({
  seq: z.int().describe('rises with every event of the marketplace; the id of the event in a stream'),
  bookingId: Id,
  kind: z.enum(['acquired', 'lost', 'bytes', 'eb/n0', 'note', 'diary']),
  atUtc: UtcTime.describe('when it was written down'),
  happenedUtc: UtcTime.describe('when it happened, as the station says'),
  value: z.number().nullable().describe('bytes received so far, or Eb/N0 in dB'),
  sentence: z.string(),
  by: z.string().describe('a person, or Skyberth'),
});
export type ContactEvent = z.infer<typeof ContactEvent>;

/** What a page needs to work out by itself where the spacecraft stands over the antenna. */
export const ContactOrbit = z.object({
  site: z.object({ latitudeDeg: LatitudeDeg, longitudeDeg: LongitudeDeg, altitudeM: z.number() }),
  omm: z
    .string()
    .nullable()
    .describe('the elements in force as CCSDS OMM; null where the pass comes from an ephemeris'),
});
export type ContactOrbit = z.infer<typeof ContactOrbit>;

/** Sent every few seconds, so that a line that is down is noticed on both ends. */
export const LiveBeat = z.object({ serverTimeUtc: UtcTime });
/** Names of the events in a stream. */
export const LIVE_EVENT = 'contact';
export const LIVE_BEAT = 'beat';

const HappenedUtc = UtcTime.nullable().default(null).describe('left out: now');

export const LiveReport = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('acquired'), happenedUtc: HappenedUtc }),
  z.object({
    kind: z.literal('lost'),
    happenedUtc: HappenedUtc,
    isFinal: z.boolean().default(false).describe('lost for good: the contact ends with it'),
  }),
  z.object({
    kind: z.literal('bytes'),
    happenedUtc: HappenedUtc,
    bytes: z.int().min(0).describe('received so far in this contact'),
  }),
  z.object({ kind: z.literal('eb/n0'), happenedUtc: HappenedUtc, ebN0Db: z.number().min(-50).max(100) }),
  z.object({
    kind: z.literal('note'),
    happenedUtc: HappenedUtc,
    text: z.string().trim().min(1, 'Write the note first; the other side reads it.').max(500),
  }),
]);
export type LiveReport = z.infer<typeof LiveReport>;

const LiveQuery = z.object({
  after: z.coerce.number().int().min(0).optional().describe('the last number seen; the Last-Event-ID header wins'),
});

const tag = 'live';
export const liveRoutes = {
  contactEvents: defineRoute({
    name: 'contactEvents',
    method: 'GET',
    path: '/api/contacts/:id/events',
    summary: 'Everything that was reported of a contact, oldest first',
    tag,
    access: 'bookings.read',
    data: 'parties',
    params: IdParams,
    response: z.object({
      items: z.array(ContactEvent),
      dishStop: z
        .string()
        .nullable()
        .describe('why the contact cannot begin now: people at the dish, or it is kept still'),
    }),
    errors: ['not-found'],
  }),
  contactOrbit: defineRoute({
    name: 'contactOrbit',
    method: 'GET',
    path: '/api/contacts/:id/orbit',
    summary: 'Site and elements of a contact, for the live position on the page',
    tag,
    access: 'bookings.read',
    data: 'parties',
    params: IdParams,
    response: ContactOrbit,
    errors: ['not-found', 'elements-unusable'],
  }),
  contactLive: defineRoute({
    name: 'contactLive',
    method: 'GET',
    path: '/api/contacts/:id/live',
    summary: 'The events of one contact as they happen (server-sent events), after the last one seen',
    tag,
    access: 'bookings.read',
    data: 'parties',
    params: IdParams,
    query: LiveQuery,
    produces: 'text/event-stream',
    errors: ['not-found', 'too-many'],
  }),
  organisationLive: defineRoute({
    name: 'organisationLive',
    method: 'GET',
    path: '/api/live',
    summary: "Events of all the organisation's contacts as they happen, or of those at one station",
    tag,
    access: 'bookings.read',
    data: 'parties',
    query: LiveQuery.extend({ stationId: Id.optional() }),
    produces: 'text/event-stream',
    errors: ['too-many'],
  }),
  reportLive: defineRoute({
    name: 'reportLive',
    method: 'POST',
    path: '/api/contacts/:id/reports',
    summary: 'The station reports: acquired, lost, bytes so far, Eb/N0, a note',
    tag,
    access: 'bookings.report',
    data: 'own',
    params: IdParams,
    body: LiveReport,
    response: ContactEvent,
    status: 201,
    errors: ['not-found', 'wrong-state', 'dish-not-clear', 'too-many'],
  }),
} as const;
