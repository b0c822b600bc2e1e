/** Waiting for a pass that somebody else has: first come, first offered. */
import { z } from 'zod';
import { Id, IdParams, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { BerthRequest, Need } from './market.js';

export const StandbyState = z.enum(['waiting', 'offered', 'bought', 'passed', 'left', 'ended']);
export type StandbyState = z.infer<typeof StandbyState>;

export const StandbyEntry = z.object({
  id: Id,
  state: StandbyState,
  spacecraftId: Id,
  spacecraftName: z.string(),
  antennaId: Id,
  antennaName: z.string(),
  stationName: z.string(),
  need: Need,
  aosUtc: UtcTime,
  losUtc: UtcTime,
  joinedUtc: UtcTime,
  /** One is next; null where nobody waits any more. */
  place: z.int().min(1).nullable(),
  /** The hold that is offered. */
  bookingId: Id.nullable(),
  offerEndsUtc: UtcTime.nullable(),
  note: z.string().describe('why it ended, where it did'),
});
export type StandbyEntry = z.infer<typeof StandbyEntry>;

const tag = 'standby';
export const standbyRoutes = {
  listStandby: defineRoute({
    name: 'listStandby',
    method: 'GET',
    path: '/api/standby',
    summary: 'What the organisation waits for, is offered, and waited for lately',
    tag,
    access: 'bookings.read',
    data: 'own',
    response: z.object({ items: z.array(StandbyEntry) }),
  }),
  joinStandby: defineRoute({
    name: 'joinStandby',
    method: 'POST',
    path: '/api/standby',
    summary: 'Wait for a pass that is taken; when it frees, the first in line gets a hold for a limited time',
    tag,
    access: 'bookings.buy',
    data: 'own',
    body: BerthRequest,
    status: 201,
    response: StandbyEntry,
    errors: ['not-found', 'not-for-sale', 'wrong-state', 'already-exists', 'elements-unusable', 'too-many'],
  }),
  leaveStandby: defineRoute({
    name: 'leaveStandby',
    method: 'POST',
    path: '/api/standby/:id/leave',
    summary: 'Leave the line; an offer that is open is let go',
    tag,
    access: 'bookings.buy',
    data: 'own',
    params: IdParams,
    response: StandbyEntry,
    errors: ['not-found', 'wrong-state'],
  }),
} as const;
