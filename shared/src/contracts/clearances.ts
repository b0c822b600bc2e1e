/**
 * Clearances: a spacecraft may be transmitted to from a station in a band, for a time. Their life is a table of moves, as
 * that of bookings is; the API carries out no other, and the database checks the same ones.
 */
import { z } from 'zod';
import { Band, Id, IdParams, Note, PageQuery, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { AttachedFile, FileIds } from './files.js';

export const CLEARANCE_STATES = ['requested', 'granted', 'in force', 'refused', 'withdrawn', 'expired'] as const;
export const ClearanceState = z.enum(CLEARANCE_STATES);
export type ClearanceState = z.infer<typeof ClearanceState>;

export const CLEARANCE_ACTORS = ['operator', 'owner', 'admin', 'clock'] as const;
export type ClearanceActor = (typeof CLEARANCE_ACTORS)[number];
export const CLEARANCE_ACTS = ['request', 'grant', 'check', 'refuse', 'withdraw', 'expire'] as const;
export const ClearanceAct = z.enum(CLEARANCE_ACTS);
export type ClearanceAct = z.infer<typeof ClearanceAct>;

export interface ClearanceMove {
  /** `null` is the moment before the clearance exists. */
  readonly from: ClearanceState | null;
  readonly act: ClearanceAct;
  readonly to: ClearanceState;
  readonly by: readonly ClearanceActor[];
}

/** The one table of moves. Owner and admin both say yes before anything is transmitted; either side may end it. */
export const CLEARANCE_MOVES: readonly ClearanceMove[] = [
  { from: null, act: 'request', to: 'requested', by: ['operator'] },
  { from: 'requested', act: 'grant', to: 'granted', by: ['owner'] },
  { from: 'requested', act: 'refuse', to: 'refused', by: ['owner'] },
  { from: 'requested', act: 'withdraw', to: 'withdrawn', by: ['operator'] },
  { from: 'requested', act: 'expire', to: 'expired', by: ['clock'] },
  { from: 'granted', act: 'check', to: 'in force', by: ['admin'] },
  { from: 'granted', act: 'refuse', to: 'refused', by: ['admin'] },
  { from: 'granted', act: 'withdraw', to: 'withdrawn', by: ['operator', 'owner'] },
  { from: 'granted', act: 'expire', to: 'expired', by: ['clock'] },
  { from: 'in force', act: 'withdraw', to: 'withdrawn', by: ['operator', 'owner', 'admin'] },
  { from: 'in force', act: 'expire', to: 'expired', by: ['clock'] },
];

/** The move that `act` makes from `from` when `by` causes it, or `undefined` where the table has none. */
export const clearanceMove = (
  from: ClearanceState | null,
  act: ClearanceAct,
  by: ClearanceActor,
): ClearanceMove | undefined =>
  CLEARANCE_MOVES.find((move) => move.from === from && move.act === act && move.by.includes(by));

/** What each state means, and who is to act next. */
export const CLEARANCE_STATE_FACTS: Readonly<
  Record<ClearanceState, { readonly meaning: string; readonly next: 'owner' | 'admin' | null }>
> = {
  requested: { meaning: 'The station looks at the papers and grants or refuses it.', next: 'owner' },
  granted: { meaning: 'The station has granted it; the marketplace checks the papers.', next: 'admin' },
  'in force': { meaning: 'Uplink can be booked within its dates.', next: null },
  refused: { meaning: 'It was refused; the reason stands beside it.', next: null },
  withdrawn: { meaning: 'It was taken back; uplink contacts that needed it are cancelled.', next: null },
  expired: { meaning: 'Its time is over.', next: null },
};

export const ClearanceEvent = z.object({
  atUtc: UtcTime,
  toState: ClearanceState,
  sentence: z.string(),
  byName: z.string().nullable().describe('null where a rule did it'),
});

export const Clearance = z.object({
  id: Id,
  number: z.int(),
  spacecraftId: Id,
  spacecraftName: z.string(),
  operatorName: z.string(),
  stationId: Id,
  stationName: z.string(),
  ownerName: z.string(),
  band: Band,
  direction: z.literal('transmit'),
  state: ClearanceState,
  validFromUtc: UtcTime,
  validToUtc: UtcTime,
  purpose: z.string(),
  conditions: z.string().describe('what the station asks for, in its words'),
  requestedUtc: UtcTime,
  changedUtc: UtcTime,
  papers: z.array(AttachedFile),
  history: z.array(ClearanceEvent),
  contactsToCome: z.int().describe('uplink contacts held or sold under it that have not begun'),
  acts: z.array(ClearanceAct).describe('what the caller may do with it now'),
});
export type Clearance = z.infer<typeof Clearance>;

/** Papers are looked at again at least this often. */
export const LONGEST_CLEARANCE_DAYS = 1_830;

const Reason = Note.min(1, 'Give a reason; the other side reads it.');
const tag = 'clearances';
export const clearanceRoutes = {
  listClearances: defineRoute({
    name: 'listClearances',
    method: 'GET',
    path: '/api/clearances',
    summary: 'Clearances of either side, those that wait first; staff see all',
    tag,
    access: 'clearances.read',
    data: 'parties',
    query: PageQuery.extend({ state: ClearanceState.optional() }),
    response: pageOf(Clearance),
  }),
  getClearance: defineRoute({
    name: 'getClearance',
    method: 'GET',
    path: '/api/clearances/:id',
    summary: 'One clearance with its papers and history',
    tag,
    access: 'clearances.read',
    data: 'parties',
    params: IdParams,
    response: Clearance,
    errors: ['not-found'],
  }),
  clearanceChoices: defineRoute({
    name: 'clearanceChoices',
    method: 'GET',
    path: '/api/clearance-choices',
    summary: 'Stations on the market that transmit, with their bands',
    tag,
    access: 'clearances.request',
    data: 'market',
    response: z.object({
      stations: z.array(z.object({ id: Id, name: z.string(), bands: z.array(Band), antennaIds: z.array(Id) })),
    }),
  }),
  requestClearance: defineRoute({
    name: 'requestClearance',
    method: 'POST',
    path: '/api/clearances',
    summary: 'Ask a station for leave to transmit to a spacecraft, with licence and coordination papers',
    tag,
    access: 'clearances.request',
    data: 'own',
    body: z.object({
      spacecraftId: Id,
      stationId: Id,
      band: Band,
      validFromUtc: UtcTime,
      validToUtc: UtcTime,
      purpose: Note.min(1, 'Say what is to be transmitted.'),
      fileIds: FileIds.min(1, 'Attach the licence and coordination papers.'),
    }),
    response: Clearance,
    status: 201,
    errors: ['not-found', 'bad-input', 'already-exists'],
  }),
  answerClearance: defineRoute({
    name: 'answerClearance',
    method: 'POST',
    path: '/api/clearances/:id/answer',
    summary: 'The station grants or refuses a request',
    tag,
    access: 'clearances.grant',
    data: 'own',
    params: IdParams,
    body: z.discriminatedUnion('answer', [
      z.object({ answer: z.literal('grant'), conditions: Note.default('') }),
      z.object({ answer: z.literal('refuse'), reason: Reason }),
    ]),
    response: Clearance,
    errors: ['not-found', 'wrong-state'],
  }),
  checkClearance: defineRoute({
    name: 'checkClearance',
    method: 'POST',
    path: '/api/clearances/:id/check',
    summary: 'Staff has looked at the papers: put a granted clearance in force, or refuse it',
    tag,
    access: 'clearances.check',
    data: 'all',
    params: IdParams,
    body: z.discriminatedUnion('answer', [
      z.object({ answer: z.literal('put in force') }),
      z.object({ answer: z.literal('refuse'), reason: Reason }),
    ]),
    response: Clearance,
    errors: ['not-found', 'wrong-state'],
  }),
  withdrawClearance: defineRoute({
    name: 'withdrawClearance',
    method: 'POST',
    path: '/api/clearances/:id/withdraw',
    summary: 'Take a clearance back; uplink contacts that need it are cancelled with a full refund',
    tag,
    access: 'clearances.withdraw',
    data: 'parties',
    params: IdParams,
    body: z.object({ reason: Reason }),
    response: Clearance,
    errors: ['not-found', 'wrong-state'],
  }),
} as const;
