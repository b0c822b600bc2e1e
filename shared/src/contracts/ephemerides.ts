/** A spacecraft's own ephemeris: states that its operator computed, used instead of the element set where it reaches. */
import { z } from 'zod';
import { Id, IdParams, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

/** What one file may hold. */
export const EPHEMERIS_LIMITS = { characters: 20_000_000, states: 200_000 } as const;

export const EphemerisSummary = z.object({
  id: Id,
  startUtc: UtcTime,
  stopUtc: UtcTime,
  segments: z.int(),
  states: z.int(),
  frame: z.string().describe('as written in the file; several are joined by commas'),
  interpolation: z.string().describe('method and degree, or what is used where the file names none'),
  objectName: z.string(),
  objectId: z.string(),
  originator: z.string(),
  source: z.string().describe('pasted, or uploaded with its file name'),
  addedByName: z.string(),
  addedUtc: UtcTime,
  withdrawnByName: z.string().nullable(),
  withdrawnUtc: UtcTime.nullable(),
});
export type EphemerisSummary = z.infer<typeof EphemerisSummary>;

/** What a pass was computed from: `both` where the ephemeris begins or ends inside it. */
export const PassSource = z.enum(['element set', 'ephemeris', 'both']);
export type PassSource = z.infer<typeof PassSource>;

const tag = 'spacecraft';
export const ephemerisRoutes = {
  listEphemerides: defineRoute({
    name: 'listEphemerides',
    method: 'GET',
    path: '/api/spacecraft/:id/ephemerides',
    summary: 'The newest hundred ephemerides of a spacecraft, also those withdrawn',
    tag,
    access: 'spacecraft.read',
    data: 'own',
    params: IdParams,
    response: z.object({ items: z.array(EphemerisSummary) }),
    errors: ['not-found'],
  }),
  addEphemeris: defineRoute({
    name: 'addEphemeris',
    method: 'POST',
    path: '/api/spacecraft/:id/ephemerides',
    summary:
      'Keep a CCSDS OEM (KVN or XML) as ephemeris; refused as a whole, with line and reason, if anything is wrong',
    tag,
    access: 'spacecraft.write',
    data: 'own',
    params: IdParams,
    body: z.object({
      text: z
        .string()
        .min(1, 'Paste an orbit ephemeris message or choose a file.')
        .max(EPHEMERIS_LIMITS.characters, 'Send at most 20 MB at once.'),
      fileName: z.string().trim().max(200).nullable().default(null),
    }),
    response: EphemerisSummary,
    status: 201,
    errors: ['not-found', 'bad-input', 'already-exists', 'too-large', 'elements-unusable', 'unavailable'],
  }),
  withdrawEphemeris: defineRoute({
    name: 'withdrawEphemeris',
    method: 'POST',
    path: '/api/spacecraft/:id/ephemerides/:ephemerisId/withdraw',
    summary: 'Stop using an ephemeris; it is kept for the contacts that were sold on it',
    tag,
    access: 'spacecraft.write',
    data: 'own',
    params: IdParams.extend({ ephemerisId: Id }),
    response: EphemerisSummary,
    errors: ['not-found', 'wrong-state'],
  }),
} as const;
