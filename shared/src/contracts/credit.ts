/** Monthly accounts: asked for by operators, opened by finance with a limit, billed each month, paid by card. */
import { z } from 'zod';
import { AmountMinor, Currency, Done, Id, IdParams, Note, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { Month } from './ledger.js';

export const CreditBill = z.object({
  id: Id,
  number: z.string(),
  month: Month,
  issuedUtc: UtcTime,
  dueUtc: UtcTime,
  currency: Currency,
  totalMinor: z.int(),
  state: z.enum(['open', 'overdue', 'paid']),
  paidUtc: UtcTime.nullable(),
  reminders: z.int().describe('how many reminders were sent'),
  lines: z.array(
    z.object({
      atUtc: UtcTime,
      cause: z.string(),
      bookingId: Id,
      bookingNumber: z.int(),
      invoiceNumber: z.string().nullable(),
      amountMinor: z.int(),
    }),
  ),
});
export type CreditBill = z.infer<typeof CreditBill>;

export const CreditAccount = z.object({
  id: Id,
  operatorId: Id,
  operatorName: z.string(),
  currency: Currency,
  state: z.enum(['asked', 'open', 'refused', 'closed']),
  wishedMinor: z.int(),
  limitMinor: z.int(),
  termsDays: z.int(),
  note: z.string(),
  askedUtc: UtcTime,
  decidedUtc: UtcTime.nullable(),
  reason: z.string(),
  owedMinor: z.int().describe('delivered and not paid yet'),
  bookedMinor: z.int().describe('bought on account and not delivered yet'),
  freeMinor: z.int().describe('what can still be bought'),
  isBlocked: z.boolean().describe('a bill is overdue, so nothing more can be bought'),
  bills: z.array(CreditBill),
});
export type CreditAccount = z.infer<typeof CreditAccount>;

const tag = 'money';
export const creditRoutes = {
  myCredit: defineRoute({
    name: 'myCredit',
    method: 'GET',
    path: '/api/credit',
    summary: "The organisation's monthly accounts with their bills",
    tag,
    access: 'credit.read',
    data: 'own',
    response: z.object({ items: z.array(CreditAccount) }),
  }),
  askCredit: defineRoute({
    name: 'askCredit',
    method: 'POST',
    path: '/api/credit',
    summary: 'Ask for a monthly account, or for another limit',
    tag,
    access: 'credit.ask',
    data: 'own',
    body: z.object({
      currency: Currency,
      wishedMinor: AmountMinor.min(1, 'Name the limit that you need.'),
      note: Note,
    }),
    response: CreditAccount,
    errors: ['bad-input', 'wrong-state'],
  }),
  buyOnAccount: defineRoute({
    name: 'buyOnAccount',
    method: 'POST',
    path: '/api/bookings/:id/buy-on-account',
    summary: 'Buy a held berth on the monthly account',
    tag,
    access: 'bookings.buy',
    data: 'parties',
    params: IdParams,
    response: Done,
    errors: ['not-found', 'hold-ended', 'wrong-state', 'over-limit'],
  }),
  payBill: defineRoute({
    name: 'payBill',
    method: 'POST',
    path: '/api/credit/bills/:id/pay',
    summary: 'Open the payment page of a bill',
    tag,
    access: 'bookings.buy',
    data: 'own',
    params: IdParams,
    response: z.object({ url: z.string().nullable().describe('null where it is paid already') }),
    errors: ['not-found', 'payment-unavailable'],
  }),
  listCredit: defineRoute({
    name: 'listCredit',
    method: 'GET',
    path: '/api/credit/accounts',
    summary: 'Every monthly account, those that wait for a decision first',
    tag,
    access: 'credit.decide',
    data: 'all',
    response: z.object({ items: z.array(CreditAccount) }),
  }),
  decideCredit: defineRoute({
    name: 'decideCredit',
    method: 'POST',
    path: '/api/credit/accounts/:id/decide',
    summary: 'Open, refuse or close a monthly account',
    tag,
    access: 'credit.decide',
    data: 'all',
    params: IdParams,
    body: z.object({
      decision: z.enum(['open', 'refuse', 'close']),
      limitMinor: AmountMinor,
      termsDays: z.int().min(1).max(90).default(14),
      reason: z.string().trim().min(3, 'Say why.').max(500),
    }),
    response: CreditAccount,
    errors: ['not-found', 'bad-input', 'wrong-state'],
  }),
} as const;
