/** Payout runs: what owners are paid, reviewed line by line and approved by a second person. And what owners see of it. */
import { z } from 'zod';
import { Currency, Id, IdParams, PageQuery, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { Code } from './second-factor.js';

export const PayoutLine = z.object({
  id: Id,
  ownerId: Id,
  ownerName: z.string(),
  state: z.enum(['ready', 'held back', 'below minimum', 'nothing due', 'paying', 'paid', 'failed']),
  note: z.string().describe('why it is held back, or why its transfer failed'),
  contactCount: z.int(),
  settledMinor: z.int(),
  feeMinor: z.int(),
  refundMinor: z.int(),
  reserveMinor: z.int(),
  adjustedMinor: z.int(),
  toPayMinor: z.int(),
  paidUtc: UtcTime.nullable(),
});
export type PayoutLine = z.infer<typeof PayoutLine>;

const PayoutRunHead = z.object({
  id: Id,
  number: z.int(),
  currency: Currency,
  state: z.enum(['draft', 'reviewed', 'paying', 'done', 'dropped']),
  preparedUtc: UtcTime,
  preparedBy: z.string(),
  reviewedBy: z.string().nullable(),
  approvedBy: z.string().nullable(),
  sendsMinor: z.int().describe('what the lines that are ready, on their way or paid send'),
  transfers: z.int(),
  failed: z.int(),
});
export const PayoutRun = PayoutRunHead.extend({
  lines: z.array(PayoutLine),
  mayApprove: z.boolean().describe('whether the caller is another person than those who prepared and reviewed it'),
});
export type PayoutRun = z.infer<typeof PayoutRun>;

const LineParams = IdParams.extend({ lineId: Id });
const Reason = z.string().trim().min(3, 'Say why.').max(300);
const tag = 'money';
const finance = { tag, data: 'all' } as const;
export const payoutRoutes = {
  listPayoutRuns: defineRoute({
    ...finance,
    name: 'listPayoutRuns',
    method: 'GET',
    path: '/api/payouts',
    summary: 'Payout runs, the newest first',
    access: 'payouts.read',
    query: PageQuery,
    response: pageOf(PayoutRunHead),
  }),
  getPayoutRun: defineRoute({
    ...finance,
    name: 'getPayoutRun',
    method: 'GET',
    path: '/api/payouts/:id',
    summary: 'One run, line by line',
    access: 'payouts.read',
    params: IdParams,
    response: PayoutRun,
  }),
  preparePayoutRun: defineRoute({
    ...finance,
    name: 'preparePayoutRun',
    method: 'POST',
    path: '/api/payouts',
    summary: 'Gather what is owed to owners in one currency',
    access: 'payouts.review',
    body: z.object({ currency: Currency, minimumMinor: z.int().min(0).max(1_000_000).default(0) }),
    response: PayoutRun,
    status: 201,
    errors: ['wrong-state'],
  }),
  holdPayoutLine: defineRoute({
    ...finance,
    name: 'holdPayoutLine',
    method: 'POST',
    path: '/api/payouts/:id/lines/:lineId/hold',
    summary: 'Hold a line back with a reason, or let it go (`reason: null`)',
    access: 'payouts.review',
    params: LineParams,
    body: z.object({ reason: Reason.nullable() }),
    response: PayoutRun,
    errors: ['not-found', 'wrong-state'],
  }),
  adjustPayoutLine: defineRoute({
    ...finance,
    name: 'adjustPayoutLine',
    method: 'POST',
    path: '/api/payouts/:id/lines/:lineId/adjust',
    summary: 'Give to an owner (positive) or take (negative), with the reason that the owner reads',
    access: 'payouts.review',
    params: LineParams,
    body: z.object({
      amountMinor: z
        .int()
        .min(-10_000_000)
        .max(10_000_000)
        .refine((amount) => amount !== 0, 'Give an amount.'),
      reason: Reason,
    }),
    response: PayoutRun,
    errors: ['not-found', 'wrong-state'],
  }),
  reviewPayoutRun: defineRoute({
    ...finance,
    name: 'reviewPayoutRun',
    method: 'POST',
    path: '/api/payouts/:id/review',
    summary: 'Say that every line was looked at; asks for a code of the second factor',
    access: 'payouts.review',
    params: IdParams,
    body: z.object({ code: Code }),
    response: PayoutRun,
    errors: ['not-found', 'wrong-state', 'bad-input', 'too-many'],
  }),
  approvePayoutRun: defineRoute({
    ...finance,
    name: 'approvePayoutRun',
    method: 'POST',
    path: '/api/payouts/:id/approve',
    summary: 'Send the money, as another person than who prepared or reviewed; asks for a code of the second factor',
    access: 'payouts.approve',
    params: IdParams,
    body: z.object({ code: Code, expectedMinor: z.int() }),
    response: PayoutRun,
    errors: ['not-found', 'wrong-state', 'changed-meanwhile', 'not-allowed', 'bad-input', 'too-many'],
  }),
  dropPayoutRun: defineRoute({
    ...finance,
    name: 'dropPayoutRun',
    method: 'POST',
    path: '/api/payouts/:id/drop',
    summary: 'Drop a run that was not approved; all of it comes in the next one',
    access: 'payouts.review',
    params: IdParams,
    response: PayoutRun,
    errors: ['not-found', 'wrong-state'],
  }),
  earnings: defineRoute({
    name: 'earnings',
    method: 'GET',
    path: '/api/earnings',
    summary: 'What the caller’s organisation has earned, by currency, and what was paid out',
    tag,
    access: 'earnings.read',
    data: 'own',
    response: z.object({
      account: z.enum(['none', 'given']).describe('whether an account to be paid to was given'),
      currencies: z.array(
        z.object({
          currency: Currency,
          dueMinor: z.int().describe('after fee; not yet on its way'),
          onTheWayMinor: z.int(),
          paidMinor: z.int(),
        }),
      ),
      payouts: z.array(PayoutLine.extend({ runNumber: z.int(), currency: Currency })),
    }),
  }),
  givePayoutAccount: defineRoute({
    name: 'givePayoutAccount',
    method: 'POST',
    path: '/api/earnings/account',
    summary: 'Open the provider’s page on which an owner says who they are and where the money goes',
    tag,
    access: 'earnings.manage',
    data: 'own',
    response: z.object({ url: z.string() }),
    errors: ['payment-unavailable'],
  }),
} as const;
