/** What newer elements did to a booked contact, and the operator's answer where they moved it too far. */
import { z } from 'zod';
import { Id, IdParams, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { Booking } from './bookings.js';

const Times = z.object({ aosUtc: UtcTime, losUtc: UtcTime });

export const Retime = z.object({
  atUtc: UtcTime,
  cause: z.enum(['inside the guard', 'accepted']),
  from: Times,
  to: Times,
  aosShiftS: z.number().describe('later is positive'),
  losShiftS: z.number(),
  fromEpochUtc: UtcTime.describe('epoch of the elements before'),
  toEpochUtc: UtcTime,
});

export const DriftQuestion = z.object({
  id: Id,
  askedUtc: UtcTime,
  sentence: z.string(),
  from: Times,
  to: Times,
  aosShiftS: z.number(),
  losShiftS: z.number(),
});

export const Drift = z.object({
  checkedUtc: UtcTime.nullable().describe('when it was last held against the elements in force'),
  /** By how much the elements in force would move it; null where that is not known. */
  aosShiftS: z.number().nullable(),
  losShiftS: z.number().nullable(),
  guardS: z.number().describe('a shift up to this is made without asking'),
  retimes: z.array(Retime),
  question: DriftQuestion.nullable(),
});
export type Drift = z.infer<typeof Drift>;

const tag = 'drift';
const answer = {
  tag,
  method: 'POST',
  access: 'bookings.buy',
  data: 'own',
  params: IdParams,
  body: z.object({ questionId: Id.describe('the question that the page showed; a newer one is refused') }),
  response: Booking,
} as const;
export const driftRoutes = {
  bookingDrift: defineRoute({
    name: 'bookingDrift',
    method: 'GET',
    path: '/api/bookings/:id/drift',
    summary: 'How newer elements moved a booked contact, and what is asked about it',
    tag,
    access: 'bookings.read',
    data: 'parties',
    params: IdParams,
    response: Drift,
    errors: ['not-found'],
  }),
  acceptDrift: defineRoute({
    ...answer,
    name: 'acceptDrift',
    path: '/api/bookings/:id/drift/accept',
    summary: 'Take the new times at the agreed price',
    errors: ['not-found', 'wrong-state', 'changed-meanwhile', 'berth-taken', 'spacecraft-busy'],
  }),
  refuseDrift: defineRoute({
    ...answer,
    name: 'refuseDrift',
    path: '/api/bookings/:id/drift/refuse',
    summary: 'Cancel because of the shift; all of the price goes back',
    errors: ['not-found', 'wrong-state', 'changed-meanwhile'],
  }),
} as const;
