/** When an antenna is open beyond its weekly hours, and what a change would do before it is saved. */
import { z } from 'zod';
import { AmountMinor, Currency, Done, Id, IdParams, LocalTime, MaskPoints, TimeZone, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { PriceCard, PriceCardInput, WeeklyRule } from './stations.js';

export const BLACKOUT_REASONS = ['maintenance', 'own use', 'weather', 'other'] as const;

const LocalDateTime = z
  .string()
  .regex(/^\d{4}-\d{2}-\d{2}T([01]\d|2[0-3]):[0-5]\d$/, 'Use a day and a time, such as 2026-12-01T08:30.');
/** 400 days: as far ahead as anything can be booked. */
const LONGEST_MIN = 576_000;

const entryFields = {
  startLocal: LocalDateTime.describe('the first time, on the clock of `timeZone`'),
  durationMin: z.int().min(1, 'It must end after it begins.').max(LONGEST_MIN, 'It lasts 400 days at most.').nullable(),
  endLocal: LocalTime.nullable().describe('instead of a length: the time of day at which each ends'),
  timeZone: TimeZone,
  rrule: z.string().max(500).nullable().describe('RFC 5545 recurrence without RRULE:, daily or slower; null for once'),
  exceptLocal: z.array(LocalDateTime).max(500).default([]).describe('starts that are left out (EXDATE)'),
  note: z.string().trim().max(120).default(''),
};
const oneLength = (entry: { durationMin: number | null; endLocal: string | null }) =>
  (entry.durationMin === null) !== (entry.endLocal === null);
const oneLengthMessage = {
  path: ['durationMin'],
  message: 'Give either a length in minutes or the time of day at which it ends.',
};

export const OpeningInput = z.object(entryFields).refine(oneLength, oneLengthMessage);
export type OpeningInput = z.infer<typeof OpeningInput>;
export const BlackoutEntry = z
  .object({ ...entryFields, reason: z.enum(BLACKOUT_REASONS) })
  .refine(oneLength, oneLengthMessage);
export type BlackoutEntry = z.infer<typeof BlackoutEntry>;

export const CalendarRule = z.object({
  id: Id,
  antennaId: Id,
  kind: z.enum(['opening', 'blackout']),
  ...entryFields,
  reason: z.string(),
});
export type CalendarRule = z.infer<typeof CalendarRule>;

const Stretch = z.object({ fromUtc: UtcTime, toUtc: UtcTime });
export const AntennaCalendar = z.object({
  timeZone: z.string(),
  open: z.array(Stretch).describe('weekly hours and openings together, cut to the period'),
  openings: z.array(Stretch.extend({ id: Id, note: z.string() })),
  blackouts: z.array(
    Stretch.extend({ id: Id, repeats: z.boolean(), reason: z.string(), note: z.string() }).describe(
      '`id` names the blackout, or the rule where it repeats',
    ),
  ),
  rules: z.array(CalendarRule).describe('every rule, whether or not it falls into the period'),
});
export type AntennaCalendar = z.infer<typeof AntennaCalendar>;

export const RefusedEvent = z.object({ event: z.string(), message: z.string() });

/** What is changed; what is absent stays as it is. */
export const PreviewInput = z.object({
  hours: z.array(WeeklyRule).max(50).optional(),
  addOpenings: z.array(OpeningInput).max(50).default([]),
  addBlackouts: z.array(BlackoutEntry).max(200).default([]),
  mask: MaskPoints.optional(),
  price: PriceCardInput.optional(),
});
export type PreviewInput = z.infer<typeof PreviewInput>;

const Side = z.object({
  openMin: z.number().describe('open and not blacked out, in the coming seven days'),
  sellableMin: z.number().describe('of it: passes of the spacecraft that have booked here, that could be sold now'),
  expectedMinor: z
    .int()
    .nullable()
    .describe('a week like the last four, at this price and in proportion to the sellable minutes; null without any'),
});
export const ChangePreview = z.object({
  currency: Currency,
  before: Side.nullable().describe('null where the antenna has no price yet'),
  after: Side.nullable(),
  spacecraft: z.int().describe('how many spacecraft the sellable minutes are of'),
  soldMinor: z.int().describe('sold already for the coming week, before VAT; no change takes it away'),
  touched: z.array(
    z.object({
      bookingId: Id,
      number: z.int(),
      spacecraftName: z.string(),
      operatorName: z.string(),
      aosUtc: UtcTime,
      why: z.string(),
      buyerGets: z.string(),
      refundMinor: AmountMinor.describe('comes back to the buyer if the owner cancels it'),
    }),
  ),
  lastMonth: z
    .object({
      contacts: z.int(),
      thenMinor: z.int().describe('what they cost, before VAT'),
      nowMinor: z.int().describe('what they would cost by the new card, bought as long before'),
    })
    .nullable()
    .describe('only where the price changes'),
});
export type ChangePreview = z.infer<typeof ChangePreview>;

const tag = 'stations';
const own = { tag, access: 'stations.write', data: 'own', params: IdParams } as const;
const EXAMPLE_CONTACT = z.object({
  lengthS: z.number().min(1).max(86_400),
  day: z.int().min(1).max(7).describe('1 is Monday, at the station'),
  startLocal: z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'Use hours and minutes, such as 18:10.'),
  boughtHoursBefore: z.number().min(0).max(8_760),
});

export const availabilityRoutes = {
  antennaCalendar: defineRoute({
    ...own,
    name: 'antennaCalendar',
    method: 'GET',
    path: '/api/antennas/:id/calendar',
    summary: 'When an antenna is open and blacked out; at most 62 days',
    access: 'stations.read',
    query: z.object({
      fromUtc: UtcTime.optional().describe('now where it is absent'),
      toUtc: UtcTime.optional().describe('a week later where it is absent'),
    }),
    response: AntennaCalendar,
    errors: ['not-found', 'bad-input'],
  }),
  addOpening: defineRoute({
    ...own,
    name: 'addOpening',
    method: 'POST',
    path: '/api/antennas/:id/openings',
    summary: 'Open an antenna beyond its weekly hours, once or again and again',
    body: OpeningInput,
    response: CalendarRule,
    status: 201,
    errors: ['not-found', 'bad-input'],
  }),
  addBlackouts: defineRoute({
    name: 'addBlackouts',
    method: 'POST',
    path: '/api/blackouts',
    summary: 'Block out time on several antennas at once; sold contacts stay',
    tag,
    access: 'stations.write',
    data: 'own',
    body: z.object({
      antennaIds: z.array(Id).min(1, 'Choose at least one antenna.').max(50),
      entries: z.array(BlackoutEntry).min(1, 'There is nothing to block out.').max(200),
    }),
    response: z.object({
      ids: z.array(Id).describe('what `removeCalendarEntries` takes to undo it'),
      touches: z.array(z.object({ antennaId: Id, bookingId: Id, number: z.int(), aosUtc: UtcTime })),
    }),
    status: 201,
    errors: ['not-found', 'bad-input'],
  }),
  removeCalendarEntries: defineRoute({
    name: 'removeCalendarEntries',
    method: 'POST',
    path: '/api/calendar/remove',
    summary: 'Take openings and blackouts away again, all or none of them',
    tag,
    access: 'stations.write',
    data: 'own',
    body: z.object({ ids: z.array(Id).min(1).max(10_000) }),
    response: Done,
    errors: ['not-found'],
  }),
  readCalendarFile: defineRoute({
    name: 'readCalendarFile',
    method: 'POST',
    path: '/api/calendar/read',
    summary: 'Read blackouts from an iCalendar file without saving; each event that cannot be used is named',
    tag,
    access: 'stations.write',
    data: 'none',
    body: z.object({
      text: z.string().min(1, 'The file is empty.').max(500_000, 'A calendar file is at most 500 kB.'),
      timeZone: TimeZone.describe('for all-day events and those without a zone: the station’s'),
      reason: z.enum(BLACKOUT_REASONS).default('own use'),
    }),
    response: z.object({ entries: z.array(BlackoutEntry), refused: z.array(RefusedEvent) }),
    idempotencyKey: 'none',
    errors: ['bad-input'],
  }),
  previewAntennaChange: defineRoute({
    ...own,
    name: 'previewAntennaChange',
    method: 'POST',
    path: '/api/antennas/:id/preview',
    summary: 'What a change of hours, blackouts, mask or price would do to the coming week and to sold contacts',
    body: PreviewInput,
    response: ChangePreview,
    idempotencyKey: 'none',
    errors: ['not-found', 'bad-input'],
  }),
  priceExample: defineRoute({
    ...own,
    name: 'priceExample',
    method: 'POST',
    path: '/api/antennas/:id/price-example',
    summary: 'One contact worked out by a price card that is not published yet, a first one of its month, before VAT',
    access: 'stations.read',
    body: z.object({ price: PriceCardInput, contact: EXAMPLE_CONTACT }),
    response: z.object({
      currency: Currency,
      lines: z.array(z.object({ label: z.string(), detail: z.string(), amountMinor: z.int() })),
      totalMinor: z.int(),
    }),
    idempotencyKey: 'none',
    errors: ['not-found', 'bad-input'],
  }),
  listPriceCards: defineRoute({
    ...own,
    name: 'listPriceCards',
    method: 'GET',
    path: '/api/antennas/:id/prices',
    summary: 'The price cards of an antenna, the last to come first',
    access: 'stations.read',
    response: z.object({ items: z.array(PriceCard) }),
    errors: ['not-found'],
  }),
} as const;
