/** Several passes held and bought together: all of them, or none. */
import { z } from 'zod';
import { AmountMinor, Currency, Id, IdParams, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { Booking, CheckoutResult, HoldInput } from './bookings.js';

export const MOST_IN_GROUP = 60;

export const BookingGroup = z.object({
  groupId: Id,
  holdEndsUtc: UtcTime,
  /** `partly secured`: some of the money is reserved; nothing is sold before all of it is. */
  state: z.enum(['held', 'partly secured', 'bought', 'ended']),
  totals: z.array(z.object({ currency: Currency, toPayMinor: AmountMinor })),
  bookings: z.array(Booking),
});
export type BookingGroup = z.infer<typeof BookingGroup>;

const tag = 'bookings';
export const groupRoutes = {
  holdGroup: defineRoute({
    name: 'holdGroup',
    method: 'POST',
    path: '/api/booking-groups',
    summary: 'Hold several passes for ten minutes, all or none; a refusal names every one that fails (/items/n)',
    tag,
    access: 'bookings.buy',
    data: 'own',
    body: z.object({
      items: z
        .array(HoldInput)
        .min(1, 'Choose at least one pass.')
        .max(MOST_IN_GROUP, `Hold at most ${MOST_IN_GROUP} passes together.`),
    }),
    status: 201,
    response: BookingGroup,
    errors: ['group-refused', 'too-many'],
  }),
  getGroup: defineRoute({
    name: 'getGroup',
    method: 'GET',
    path: '/api/booking-groups/:id',
    summary: 'A group with its bookings',
    tag,
    access: 'bookings.read',
    data: 'own',
    params: IdParams,
    response: BookingGroup,
    errors: ['not-found'],
  }),
  checkoutGroup: defineRoute({
    name: 'checkoutGroup',
    method: 'POST',
    path: '/api/booking-groups/:id/checkout',
    summary:
      'Reserve the price of every booking of the group on a saved card; without one, a payment page for the first keeps the card',
    tag,
    access: 'bookings.buy',
    data: 'own',
    params: IdParams,
    body: z.object({ savedCardId: z.string().max(100).nullable().default(null) }),
    response: CheckoutResult,
    errors: ['not-found', 'hold-ended', 'wrong-state', 'card-declined', 'payment-unavailable'],
  }),
  letGroupGo: defineRoute({
    name: 'letGroupGo',
    method: 'POST',
    path: '/api/booking-groups/:id/let-go',
    summary: 'Give all holds of the group back; whatever is reserved is released',
    tag,
    access: 'bookings.buy',
    data: 'own',
    params: IdParams,
    response: BookingGroup,
    errors: ['not-found', 'wrong-state'],
  }),
} as const;
