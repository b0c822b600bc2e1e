/** What a station does now, next and later, who is at its dishes, and what one watch leaves to the next. */
import { z } from 'zod';
import { BookingState } from '../booking-states.js';
import { AzimuthDeg, Done, Id, IdParams, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { Need } from './market.js';

export const DishVisit = z.object({ id: Id, name: z.string(), cameUtc: UtcTime });

export const SheetAntenna = z.object({
  id: Id,
  name: z.string(),
  slewAzimuthDegPerS: z.number(),
  slewElevationDegPerS: z.number(),
  /** People inside the fence now. */
  visits: z.array(DishVisit),
  stop: z.object({ reason: z.string(), sinceUtc: UtcTime, byName: z.string() }).nullable(),
});
export type SheetAntenna = z.infer<typeof SheetAntenna>;

export const SheetContact = z.object({
  bookingId: Id,
  number: z.int(),
  antennaId: Id,
  beam: z.int(),
  state: BookingState,
  spacecraftName: z.string(),
  operatorName: z.string(),
  need: Need,
  setupStartsUtc: UtcTime,
  aosUtc: UtcTime,
  tcaUtc: UtcTime,
  losUtc: UtcTime,
  teardownEndsUtc: UtcTime,
  answerByUtc: UtcTime.nullable(),
  maxElevationDeg: z.number(),
  aosAzimuthDeg: AzimuthDeg,
  losAzimuthDeg: AzimuthDeg,
  /** From where the contact before left the dish to this AOS; null for the first of the list. */
  slew: z
    .object({
      fromAzimuthDeg: AzimuthDeg,
      needS: z.number().nullable().describe('by the rates of the mount; null where it cannot get there'),
      givenS: z.number().describe('from LOS of the contact before to this AOS'),
      fits: z.boolean(),
    })
    .nullable(),
  reported: z.object({
    acquiredUtc: UtcTime.nullable(),
    lostUtc: UtcTime.nullable(),
    bytes: z.number().nullable(),
    bytesUtc: UtcTime.nullable(),
    ebN0Db: z.number().nullable(),
    note: z.string().nullable(),
  }),
});
export type SheetContact = z.infer<typeof SheetContact>;

export const SheetConflict = z.object({
  antennaId: Id,
  bookingId: Id,
  kind: z.enum(['slew', 'blackout', 'people', 'stop']),
  sentence: z.string(),
});
export type SheetConflict = z.infer<typeof SheetConflict>;

export const HandOverNote = z.object({ id: Id, text: z.string(), writtenUtc: UtcTime, byName: z.string() });

export const RunSheet = z.object({
  asOfUtc: UtcTime,
  station: z.object({ id: Id, name: z.string(), timeZone: z.string() }),
  /** All stations of the owner, for the choice. */
  stations: z.array(z.object({ id: Id, name: z.string() })),
  antennas: z.array(SheetAntenna),
  /** By AOS, from those not yet torn down on. */
  contacts: z.array(SheetContact),
  conflicts: z.array(SheetConflict),
  notes: z.array(HandOverNote),
});
export type RunSheet = z.infer<typeof RunSheet>;

const tag = 'run sheet';
export const runSheetRoutes = {
  runSheet: defineRoute({
    name: 'runSheet',
    method: 'GET',
    path: '/api/run-sheet',
    summary: 'Contacts of one station in the coming hours, its dishes and who is at them',
    tag,
    access: 'run-sheet.read',
    data: 'own',
    query: z.object({
      stationId: Id.optional().describe('left out: the first station by name'),
      hours: z.coerce.number().int().min(1).max(72).default(24),
    }),
    response: RunSheet,
    errors: ['not-found'],
  }),
  enterDish: defineRoute({
    name: 'enterDish',
    method: 'POST',
    path: '/api/antennas/:id/visits',
    summary: 'Somebody goes inside the fence of a dish: nothing may start there until they have left',
    tag,
    access: 'bookings.report',
    data: 'own',
    params: IdParams,
    body: z.object({ name: z.string().trim().min(1, 'Give the name of the person.').max(120) }),
    response: DishVisit,
    status: 201,
    errors: ['not-found', 'already-exists'],
  }),
  leaveDish: defineRoute({
    name: 'leaveDish',
    method: 'POST',
    path: '/api/dish-visits/:id/leave',
    summary: 'They have left the fence',
    tag,
    access: 'bookings.report',
    data: 'own',
    inPerson: true,
    params: IdParams,
    response: Done,
    errors: ['not-found', 'wrong-state'],
  }),
  stopDish: defineRoute({
    name: 'stopDish',
    method: 'POST',
    path: '/api/antennas/:id/stop',
    summary: 'Keep a dish still: no contact begins on it until it is released',
    tag,
    access: 'bookings.report',
    data: 'own',
    params: IdParams,
    body: z.object({ reason: z.string().trim().min(1, 'Say why; the next watch reads it.').max(300) }),
    response: Done,
    errors: ['not-found', 'already-exists'],
  }),
  releaseDish: defineRoute({
    name: 'releaseDish',
    method: 'POST',
    path: '/api/antennas/:id/release',
    summary: 'Let a dish move again',
    tag,
    access: 'bookings.report',
    data: 'own',
    inPerson: true,
    params: IdParams,
    response: Done,
    errors: ['not-found', 'wrong-state'],
  }),
  writeHandOver: defineRoute({
    name: 'writeHandOver',
    method: 'POST',
    path: '/api/stations/:id/hand-over',
    summary: 'A note for the next watch; buyers never see it',
    tag,
    access: 'bookings.report',
    data: 'own',
    params: IdParams,
    body: z.object({ text: z.string().trim().min(1, 'Write the note first.').max(2_000) }),
    response: HandOverNote,
    status: 201,
    errors: ['not-found'],
  }),
} as const;
