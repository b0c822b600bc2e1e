/** Disputes: opened by the operator, answered by the owner, decided by an admin on evidence that the system assembles. */
import { z } from 'zod';
import { Currency, Id, IdParams, PageQuery, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { AttachedFile, FileIds } from './files.js';

export const DISPUTE_REASONS = [
  'no signal',
  'signal broken off',
  'poor signal',
  'data missing',
  'wrong configuration',
  'other',
] as const;
export const DisputeReason = z.enum(DISPUTE_REASONS);
export type DisputeReason = z.infer<typeof DisputeReason>;

/** `open` waits for a decision, `decided` may be appealed, `appealed` waits for the second one, `closed` is for ever. */
export const DISPUTE_STATES = ['open', 'decided', 'appealed', 'closed'] as const;
export const DisputeState = z.enum(DISPUTE_STATES);
export type DisputeState = z.infer<typeof DisputeState>;

export const DisputeSide = z.enum(['operator', 'owner', 'admin']);
export type DisputeSide = z.infer<typeof DisputeSide>;

/** A line of a side's own log: what was noticed when. */
export const Observation = z.object({
  atUtc: UtcTime,
  kind: z.enum(['heard', 'stopped', 'note']),
  words: z.string().trim().min(1, 'Say in a few words what was noticed.').max(200),
});
export type Observation = z.infer<typeof Observation>;

const StatementText = z.string().trim().min(1, 'Write what happened.').max(4_000);
const Observations = z.array(Observation).max(60).default([]);

export const DisputeStatement = z.object({
  id: Id,
  side: DisputeSide,
  byName: z.string(),
  atUtc: UtcTime,
  text: z.string(),
  observations: z.array(Observation),
  files: z.array(AttachedFile),
});
export type DisputeStatement = z.infer<typeof DisputeStatement>;

export const Finding = z.object({
  /** `clear` speaks against a fault, `fault` for one, `neutral` for neither. */
  weight: z.enum(['clear', 'fault', 'neutral']),
  title: z.string(),
  words: z.string(),
});
export type Finding = z.infer<typeof Finding>;

export const DisputeEvidence = z.object({
  assembledUtc: UtcTime,
  aosUtc: UtcTime,
  losUtc: UtcTime,
  elements: z.object({ epochUtc: UtcTime, ageH: z.number() }),
  later: z
    .object({
      epochUtc: UtcTime,
      aosUtc: UtcTime.nullable().describe('null where the pass is not found by them'),
      losUtc: UtcTime.nullable(),
      aosShiftS: z.number().nullable(),
      losShiftS: z.number().nullable(),
    })
    .nullable()
    .describe('the best elements known when it was assembled, with an epoch nearer to the contact'),
  track: z.array(
    z.object({
      timeUtc: UtcTime,
      azimuthDeg: z.number(),
      elevationDeg: z.number(),
      maskDeg: z.number(),
      marginDb: z.number().nullable(),
    }),
  ),
  sunClosestDeg: z.number().nullable(),
  gap: z
    .object({ fromUtc: UtcTime, toUtc: UtcTime, from: z.string().describe('who says so') })
    .nullable()
    .describe('the time without data that the dispute is about'),
  station: z.array(z.object({ atUtc: UtcTime, kind: z.string(), words: z.string() })),
  predictedBytes: z.number().nullable(),
  reportedBytes: z.number().nullable(),
  mails: z.array(z.object({ atUtc: UtcTime, subject: z.string() })),
  findings: z.array(Finding),
});
export type DisputeEvidence = z.infer<typeof DisputeEvidence>;

export const DisputeOutcome = z.enum(['none', 'part', 'full']);
export type DisputeOutcome = z.infer<typeof DisputeOutcome>;
export const BorneBy = z.enum(['owner', 'marketplace']);
export type BorneBy = z.infer<typeof BorneBy>;

const Share = z.int().min(0).max(10_000).describe('of the price that goes back, in basis points: 10,000 is all of it');

export const DecisionTerms = z
  .object({ outcome: DisputeOutcome, refundBasisPoints: Share, borneBy: BorneBy })
  .refine(
    ({ outcome, refundBasisPoints: share }) =>
      outcome === 'none' ? share === 0 : outcome === 'full' ? share === 10_000 : share > 0 && share < 10_000,
    { path: ['refundBasisPoints'], message: 'None is 0 %, full is 100 %, and part lies between.' },
  );
export type DecisionTerms = z.infer<typeof DecisionTerms>;

/** What a decision books, line by line, from the side of the party named. */
export const DecisionEffect = z.object({
  currency: Currency,
  refundMinor: z.int().describe('to the operator, VAT included, beyond what was given back already'),
  lines: z.array(z.object({ words: z.string(), amountMinor: z.int() })),
});
export type DecisionEffect = z.infer<typeof DecisionEffect>;

export const DisputeDecision = z.object({
  round: z.int().min(1).max(2),
  outcome: DisputeOutcome,
  refundBasisPoints: Share,
  borneBy: BorneBy,
  text: z.string(),
  byName: z.string(),
  atUtc: UtcTime,
  effect: DecisionEffect,
});

export const DisputeSummary = z.object({
  id: Id,
  number: z.int(),
  state: DisputeState,
  reason: DisputeReason,
  bookingId: Id,
  bookingNumber: z.int(),
  spacecraftName: z.string(),
  antennaName: z.string(),
  operatorName: z.string(),
  ownerName: z.string(),
  aosUtc: UtcTime,
  losUtc: UtcTime,
  openedUtc: UtcTime,
  statementDueUtc: UtcTime.describe('until then the owner answers; after it an admin decides on what is there'),
  decideByUtc: UtcTime,
  gapS: z.number().nullable(),
  currency: Currency,
  priceMinor: z.int(),
});
export type DisputeSummary = z.infer<typeof DisputeSummary>;

export const Dispute = DisputeSummary.extend({
  statements: z.array(DisputeStatement),
  evidence: DisputeEvidence,
  money: z.array(z.object({ atUtc: UtcTime, words: z.string(), amountMinor: z.int() })),
  heldMinor: z.int().describe("of the owner's earnings, set aside until it is decided"),
  decisions: z.array(DisputeDecision),
  appealByUtc: UtcTime.nullable(),
  appealedBy: DisputeSide.nullable(),
  suggestedBasisPoints: Share.nullable().describe("the gap's share of the contact"),
  actions: z.array(z.enum(['state', 'appeal', 'decide', 'assemble', 'ask'])),
});
export type Dispute = z.infer<typeof Dispute>;

export const Precedent = z.object({
  number: z.int(),
  reason: DisputeReason,
  outcome: DisputeOutcome,
  refundBasisPoints: Share,
  borneBy: BorneBy,
  gapS: z.number().nullable(),
  text: z.string(),
  decidedUtc: UtcTime,
  appealed: z.boolean(),
});
export type Precedent = z.infer<typeof Precedent>;

const tag = 'disputes';
const one = { tag, params: IdParams, response: Dispute } as const;
export const disputeRoutes = {
  listDisputes: defineRoute({
    name: 'listDisputes',
    method: 'GET',
    path: '/api/disputes',
    summary: "The organisation's disputes, of either side; for admins all",
    tag,
    access: 'disputes.read',
    data: 'parties',
    query: PageQuery.extend({ state: z.enum(['waiting', ...DISPUTE_STATES]).optional(), bookingId: Id.optional() }),
    response: pageOf(DisputeSummary),
  }),
  getDispute: defineRoute({
    ...one,
    name: 'getDispute',
    method: 'GET',
    path: '/api/disputes/:id',
    summary: 'One dispute with evidence, statements and money',
    access: 'disputes.read',
    data: 'parties',
    errors: ['not-found'],
  }),
  openDispute: defineRoute({
    ...one,
    name: 'openDispute',
    method: 'POST',
    path: '/api/bookings/:id/dispute',
    summary: 'Dispute how a contact went, within 14 days of LOS; the money is set aside',
    access: 'disputes.open',
    data: 'own',
    body: z
      .object({
        reason: DisputeReason,
        text: StatementText,
        observations: Observations,
        gapFromUtc: UtcTime.nullable().default(null),
        gapToUtc: UtcTime.nullable().default(null),
        fileIds: FileIds.default([]),
      })
      .refine(({ gapFromUtc, gapToUtc }) => (gapFromUtc === null) === (gapToUtc === null), {
        path: ['gapToUtc'],
        message: 'Give both ends of the time without data, or neither.',
      })
      .refine(
        ({ gapFromUtc: from, gapToUtc: to }) => from === null || to === null || Date.parse(to) > Date.parse(from),
        {
          path: ['gapToUtc'],
          message: 'The time without data must end after it begins.',
        },
      ),
    errors: ['not-found', 'wrong-state', 'already-exists', 'elements-unusable', 'too-large'],
  }),
  stateInDispute: defineRoute({
    ...one,
    name: 'stateInDispute',
    method: 'POST',
    path: '/api/disputes/:id/statements',
    summary: 'Add to what your side says; nothing said can be changed',
    access: 'disputes.answer',
    data: 'parties',
    body: z.object({ text: StatementText, observations: Observations, fileIds: FileIds.default([]) }),
    errors: ['not-found', 'wrong-state', 'too-large'],
  }),
  askInDispute: defineRoute({
    ...one,
    name: 'askInDispute',
    method: 'POST',
    path: '/api/disputes/:id/questions',
    summary: 'Ask one side for more',
    access: 'disputes.decide',
    data: 'all',
    body: z.object({ side: z.enum(['operator', 'owner']), text: StatementText }),
    errors: ['not-found', 'wrong-state'],
  }),
  assembleEvidence: defineRoute({
    ...one,
    name: 'assembleEvidence',
    method: 'POST',
    path: '/api/disputes/:id/evidence',
    summary: 'Assemble the evidence again, with what is known by now; earlier ones are kept',
    access: 'disputes.decide',
    data: 'all',
    errors: ['not-found', 'wrong-state', 'elements-unusable'],
  }),
  previewDecision: defineRoute({
    name: 'previewDecision',
    method: 'POST',
    path: '/api/disputes/:id/preview',
    summary: 'Exactly what a decision would book',
    tag,
    access: 'disputes.decide',
    data: 'all',
    params: IdParams,
    body: DecisionTerms,
    response: DecisionEffect,
    idempotencyKey: 'none',
    errors: ['not-found', 'wrong-state'],
  }),
  decideDispute: defineRoute({
    ...one,
    name: 'decideDispute',
    method: 'POST',
    path: '/api/disputes/:id/decision',
    summary: 'Decide it; ledger, refund, credit note, mails and audit follow',
    access: 'disputes.decide',
    data: 'all',
    body: z.object({
      terms: DecisionTerms,
      text: z.string().trim().min(1, 'Give the reasons; both sides read them.').max(4_000),
      expectedRefundMinor: z.int().min(0).describe('what the preview showed; another sum is refused'),
    }),
    errors: ['not-found', 'wrong-state', 'price-changed', 'not-allowed'],
  }),
  appealDecision: defineRoute({
    ...one,
    name: 'appealDecision',
    method: 'POST',
    path: '/api/disputes/:id/appeal',
    summary: 'Appeal a decision, once, within 14 days; another admin decides again',
    access: 'disputes.answer',
    data: 'parties',
    body: z.object({ text: StatementText }),
    errors: ['not-found', 'wrong-state'],
  }),
  precedents: defineRoute({
    name: 'precedents',
    method: 'GET',
    path: '/api/precedents',
    summary: 'Earlier decisions, newest first, without names',
    tag,
    access: 'disputes.decide',
    data: 'all',
    query: z.object({ reason: DisputeReason.optional() }),
    response: z.object({ items: z.array(Precedent) }),
  }),
} as const;
