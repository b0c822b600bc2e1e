/** Holding, paying, confirming, flying and reporting a contact. */
import { z } from 'zod';
import { BookingState } from '../booking-states.js';
import { AmountMinor, Currency, Done, Id, IdParams, Note, PageQuery, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { PassSource } from './ephemerides.js';
import { BerthRequest, Need, PassDetail, Quote } from './market.js';

export const BookingSummary = z.object({
  id: Id,
  number: z.int(),
  state: BookingState,
  spacecraftName: z.string(),
  spacecraftShortName: z.string(),
  antennaId: Id,
  antennaName: z.string(),
  stationId: Id,
  stationName: z.string(),
  stationTimeZone: z.string(),
  operatorName: z.string(),
  ownerName: z.string(),
  need: Need,
  aosUtc: UtcTime,
  tcaUtc: UtcTime,
  losUtc: UtcTime,
  maxElevationDeg: z.number(),
  currency: Currency,
  toPayMinor: AmountMinor,
  holdEndsUtc: UtcTime.nullable(),
  answerByUtc: UtcTime.nullable(),
});
export type BookingSummary = z.infer<typeof BookingSummary>;

export const BookingEvent = z.object({
  id: Id,
  atUtc: UtcTime,
  kind: z.string(),
  sentence: z.string(),
  by: z.string().describe('a person, an organisation, or Skyberth'),
});

export const PaymentView = z.object({
  state: z.enum([
    'none',
    'waiting for the buyer',
    'authorised',
    'capturing',
    'captured',
    'releasing',
    'released',
    'refunding',
    'refunded',
    'failed',
  ]),
  amountMinor: AmountMinor,
  capturedMinor: AmountMinor,
  refundedMinor: AmountMinor,
  currency: Currency,
  card: z.string().nullable().describe('brand and last four digits'),
  failure: z.string().nullable(),
});

export const ContactReport = z.object({
  outcome: z.enum(['good', 'degraded', 'failed']),
  cause: z.enum(['none', 'station', 'spacecraft', 'weather', 'interference', 'unknown']),
  acquiredUtc: UtcTime.nullable(),
  lostUtc: UtcTime.nullable(),
  receivedBytes: z.int().min(0).nullable(),
  ebN0Db: z.number().nullable(),
  note: Note,
});
export type ContactReport = z.infer<typeof ContactReport>;

export const Booking = BookingSummary.extend({
  quote: Quote,
  payment: PaymentView,
  invoiceId: Id.nullable(),
  invoiceNumber: z.string().nullable(),
  report: ContactReport.nullable(),
  soldOn: PassSource.describe('what the pass was computed from when it was held'),
  setupStartsUtc: UtcTime,
  teardownEndsUtc: UtcTime,
  events: z.array(BookingEvent),
  /** What this caller may do now, from the state table. */
  actions: z.array(z.enum(['pay', 'let go', 'cancel', 'accept', 'decline', 'report', 'dispute'])),
  refundNowMinor: AmountMinor.nullable().describe('what a cancellation now would give back'),
});
export type Booking = z.infer<typeof Booking>;

export const HoldInput = BerthRequest.extend({
  /** What the page showed; a different price is refused and shown, never charged. */
  expectedToPayMinor: AmountMinor,
  oldElementsAcknowledged: z.boolean().default(false),
});

export const CheckoutResult = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('redirect'), url: z.url() }),
  z.object({ kind: z.literal('processing') }),
]);

export const SavedCard = z.object({ id: z.string(), brand: z.string(), last4: z.string(), expires: z.string() });

const bookingFilter = {
  fromUtc: UtcTime.optional(),
  toUtc: UtcTime.optional(),
  state: z.string().max(200).optional().describe('states separated by commas'),
  spacecraftId: Id.optional(),
  antennaId: Id.optional(),
  number: z.coerce.number().int().min(0).max(999_999_999).optional(),
  sort: z.enum(['aos', '-aos', 'number', '-number']).default('aos'),
};

const tag = 'bookings';
const oneBooking = { tag, params: IdParams, response: Booking } as const;
export const bookingRoutes = {
  listBookings: defineRoute({
    name: 'listBookings',
    method: 'GET',
    path: '/api/bookings',
    summary: "The organisation's bookings, as buyer or as station owner; for staff all",
    tag,
    access: 'bookings.read',
    data: 'parties',
    query: PageQuery.extend(bookingFilter),
    response: pageOf(BookingSummary),
  }),
  exportBookings: defineRoute({
    name: 'exportBookings',
    method: 'GET',
    path: '/api/bookings-list.csv',
    summary: 'The same list in full, as CSV (RFC 4180)',
    tag,
    access: 'bookings.read',
    data: 'parties',
    query: z.object(bookingFilter),
    produces: 'text/csv; charset=utf-8',
  }),
  getBooking: defineRoute({
    ...oneBooking,
    name: 'getBooking',
    method: 'GET',
    path: '/api/bookings/:id',
    summary: 'One booking with money and everything that happened',
    access: 'bookings.read',
    data: 'parties',
    errors: ['not-found'],
  }),
  bookingGeometry: defineRoute({
    name: 'bookingGeometry',
    method: 'GET',
    path: '/api/bookings/:id/geometry',
    summary: 'Track, link and Sun of a booked contact, from the elements in force',
    tag,
    access: 'bookings.read',
    data: 'parties',
    params: IdParams,
    response: PassDetail,
    errors: ['not-found', 'elements-unusable'],
  }),
  bookingFile: defineRoute({
    name: 'bookingFile',
    method: 'GET',
    path: '/api/bookings/:id/files/:file',
    summary: 'pointing.csv, frequency.csv, ephemeris.oem, elements.omm or contact.ics',
    tag,
    access: 'bookings.read',
    data: 'parties',
    params: IdParams.extend({
      file: z.enum(['pointing.csv', 'frequency.csv', 'ephemeris.oem', 'elements.omm', 'contact.ics']),
    }),
    produces: 'application/octet-stream',
    errors: ['not-found', 'elements-unusable'],
  }),
  holdBerth: defineRoute({
    ...oneBooking,
    params: undefined,
    name: 'holdBerth',
    method: 'POST',
    path: '/api/bookings',
    summary: 'Hold a pass, or a part, for ten minutes at a frozen price',
    access: 'bookings.buy',
    data: 'own',
    body: HoldInput,
    status: 201,
    errors: [
      'berth-taken',
      'spacecraft-busy',
      'not-for-sale',
      'price-changed',
      'elements-unusable',
      'elements-too-old',
      'not-found',
      'too-many',
    ],
  }),
  letGo: defineRoute({
    ...oneBooking,
    name: 'letGo',
    method: 'POST',
    path: '/api/bookings/:id/let-go',
    summary: 'Give a hold back',
    access: 'bookings.buy',
    data: 'own',
    errors: ['not-found', 'wrong-state'],
  }),
  checkout: defineRoute({
    name: 'checkout',
    method: 'POST',
    path: '/api/bookings/:id/checkout',
    summary: 'Pay for a held berth: with a saved card, or on the payment page',
    tag,
    access: 'bookings.buy',
    data: 'own',
    params: IdParams,
    body: z.object({ savedCardId: z.string().max(100).nullable().default(null), saveCard: z.boolean().default(false) }),
    response: CheckoutResult,
    errors: ['not-found', 'hold-ended', 'wrong-state', 'card-declined', 'payment-unavailable'],
  }),
  cancelBooking: defineRoute({
    ...oneBooking,
    name: 'cancelBooking',
    method: 'POST',
    path: '/api/bookings/:id/cancel',
    summary: 'Cancel: the buyer by the refund ladder, the station with a full refund',
    access: 'bookings.read',
    data: 'parties',
    body: z.object({ reason: z.string().trim().max(300).default(''), expectedRefundMinor: AmountMinor }),
    errors: ['not-found', 'wrong-state', 'price-changed', 'not-allowed'],
  }),
  acceptBooking: defineRoute({
    ...oneBooking,
    name: 'acceptBooking',
    method: 'POST',
    path: '/api/bookings/:id/accept',
    summary: 'Accept a request',
    access: 'bookings.decide',
    data: 'own',
    errors: ['not-found', 'wrong-state'],
  }),
  declineBooking: defineRoute({
    ...oneBooking,
    name: 'declineBooking',
    method: 'POST',
    path: '/api/bookings/:id/decline',
    summary: 'Decline a request; the authorisation is released',
    access: 'bookings.decide',
    data: 'own',
    body: z.object({ reason: z.string().trim().min(1, 'Give the reason; the buyer reads it.').max(300) }),
    errors: ['not-found', 'wrong-state'],
  }),
  reportContact: defineRoute({
    ...oneBooking,
    name: 'reportContact',
    method: 'POST',
    path: '/api/bookings/:id/report',
    summary: 'Report how a contact went; settles the payment',
    access: 'bookings.report',
    data: 'own',
    body: ContactReport,
    errors: ['not-found', 'wrong-state'],
  }),
  savedCards: defineRoute({
    name: 'savedCards',
    method: 'GET',
    path: '/api/payments/cards',
    summary: "The organisation's saved cards",
    tag,
    access: 'bookings.buy',
    data: 'own',
    response: z.object({ items: z.array(SavedCard) }),
    errors: ['payment-unavailable'],
  }),
  paymentWebhook: defineRoute({
    name: 'paymentWebhook',
    method: 'POST',
    path: '/api/payments/events',
    summary: 'Signed events of the payment provider',
    tag,
    access: 'public',
    data: 'all',
    response: Done,
    idempotencyKey: 'none',
    errors: ['bad-signature'],
  }),
} as const;
