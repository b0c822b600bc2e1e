/** Secret addresses from which calendar programs read contacts, by RFC 5545. */
import { z } from 'zod';
import { Done, Id, IdParams, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

/** Addresses in force that a person may have in an organisation at a time. */
export const MOST_CALENDAR_FEEDS = 10;

export const CalendarFeed = z.object({
  id: Id,
  antennaId: Id.nullable(),
  antennaName: z.string().nullable().describe('null: all contacts of the organisation'),
  createdUtc: UtcTime,
});
export type CalendarFeed = z.infer<typeof CalendarFeed>;

const tag = 'calendar addresses';
export const feedRoutes = {
  listCalendarFeeds: defineRoute({
    name: 'listCalendarFeeds',
    method: 'GET',
    path: '/api/calendar-feeds',
    summary: 'The caller’s calendar addresses in force, without their secret part',
    tag,
    access: 'calendar-feeds.make',
    data: 'self',
    response: z.object({ items: z.array(CalendarFeed) }),
  }),
  /** Takes no idempotency key: the remembered answer would keep the secret in clear. */
  makeCalendarFeed: defineRoute({
    name: 'makeCalendarFeed',
    method: 'POST',
    path: '/api/calendar-feeds',
    summary:
      'Make a calendar address, for all contacts or for those of one own antenna; it is shown in this answer alone',
    tag,
    access: 'calendar-feeds.make',
    data: 'self',
    body: z.object({ antennaId: Id.nullable().default(null) }),
    response: z.object({ feed: CalendarFeed, url: z.url() }),
    status: 201,
    idempotencyKey: 'none',
    errors: ['not-found', 'wrong-state'],
  }),
  revokeCalendarFeed: defineRoute({
    name: 'revokeCalendarFeed',
    method: 'POST',
    path: '/api/calendar-feeds/:id/revoke',
    summary: 'End a calendar address at once and for good',
    tag,
    access: 'calendar-feeds.revoke',
    data: 'own',
    params: IdParams,
    response: Done,
    errors: ['not-found'],
  }),
  readCalendarFeed: defineRoute({
    name: 'readCalendarFeed',
    method: 'GET',
    path: '/api/feeds/:token.ics',
    summary: 'The contacts behind a calendar address; whoever knows the address may read them',
    tag,
    access: 'public',
    data: 'parties',
    params: z.object({ token: z.string().regex(/^[A-Za-z0-9_-]{20,100}$/) }),
    produces: 'text/calendar',
    errors: ['not-found', 'too-many'],
  }),
} as const;
