/** The provider's movements against the ledger, chargebacks, and the closing of months. */
import { z } from 'zod';
import { Currency, Id, PageQuery, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { Month } from './ledger.js';

const MOVEMENT_STATES = ['open', 'matched', 'in suspense'] as const;
/** What can be done about a difference: `fetch` asks the provider again, `suspense` and `withdrawal` write an entry. */
export const MOVEMENT_ACTIONS = ['fetch', 'suspense', 'withdrawal'] as const;
export const MovementAction = z.enum(MOVEMENT_ACTIONS);
export type MovementAction = z.infer<typeof MovementAction>;

export const Movement = z.object({
  id: z.string(),
  atUtc: UtcTime,
  type: z.string(),
  description: z.string(),
  sourceId: z.string().nullable(),
  amountMinor: z.int(),
  feeMinor: z.int(),
  netMinor: z.int(),
  currency: Currency,
  state: z.enum(MOVEMENT_STATES),
  importedFrom: z.enum(['provider', 'file']),
  /** Why the two sides differ; `null` where they do not. */
  why: z.string().nullable(),
  actions: z.array(MovementAction).describe('what can be done, the best first'),
  ageDays: z.int(),
  entryCause: z.string().nullable(),
  bookingId: Id.nullable(),
  bookingNumber: z.int().nullable(),
});
export type Movement = z.infer<typeof Movement>;

const LedgerOnly = z.object({
  entryId: Id,
  atUtc: UtcTime,
  cause: z.string(),
  amountMinor: z.int(),
  currency: Currency,
  ageDays: z.int(),
  bookingId: Id.nullable(),
  bookingNumber: z.int().nullable(),
});

export const Chargeback = z.object({
  id: z.string(),
  bookingId: Id,
  bookingNumber: z.int(),
  operatorName: z.string(),
  ownerName: z.string(),
  amountMinor: z.int(),
  reservedMinor: z.int(),
  currency: Currency,
  reason: z.string(),
  state: z.enum(['open', 'won', 'lost']),
  openedUtc: UtcTime,
  closedUtc: UtcTime.nullable(),
});

const CheckItem = z.object({ name: z.string(), ok: z.boolean(), sentence: z.string() });
export const MonthView = z.object({
  month: Month,
  state: z.enum(['closed', 'can be closed', 'not ready', 'running']),
  closedUtc: UtcTime.nullable(),
  closedBy: z.string().nullable(),
  checklist: z.array(CheckItem),
  trialBalance: z.array(
    z.object({
      account: z.string(),
      currency: Currency,
      openingMinor: z.int(),
      debitMinor: z.int(),
      creditMinor: z.int(),
      closingMinor: z.int(),
    }),
  ),
});

const ByCurrency = z.object({
  currency: Currency,
  providerMinor: z.int().describe('what the provider says it holds, by its own movements'),
  ledgerMinor: z.int().describe('provider clearing'),
  differenceMinor: z.int(),
  explainedMinor: z.int().describe('the part of it that the list below explains'),
});

const MovementParams = z.object({ id: z.string().regex(/^[A-Za-z0-9_]{3,80}$/) });
const tag = 'money';
export const reconciliationRoutes = {
  reconciliation: defineRoute({
    name: 'reconciliation',
    method: 'GET',
    path: '/api/reconciliation',
    summary: 'Provider against ledger, by currency, with the age of what is open',
    tag,
    access: 'reconciliation.read',
    data: 'all',
    response: z.object({
      readUtc: UtcTime.nullable(),
      note: z.string(),
      currencies: z.array(ByCurrency),
      ageing: z.array(z.object({ label: z.string(), movements: z.int() })),
      ledgerOnly: z.array(LedgerOnly),
    }),
  }),
  listMovements: defineRoute({
    name: 'listMovements',
    method: 'GET',
    path: '/api/reconciliation/movements',
    summary: "The provider's movements, newest first",
    tag,
    access: 'reconciliation.read',
    data: 'all',
    query: PageQuery.extend({ state: z.enum(MOVEMENT_STATES).optional(), currency: Currency.optional() }),
    response: pageOf(Movement),
  }),
  readMovements: defineRoute({
    name: 'readMovements',
    method: 'POST',
    path: '/api/reconciliation/read',
    summary: 'Read what the provider did since the last time, and match it',
    tag,
    access: 'reconciliation.act',
    data: 'all',
    response: z.object({ imported: z.int(), matched: z.int() }),
    errors: ['payment-unavailable'],
  }),
  importMovements: defineRoute({
    name: 'importMovements',
    method: 'POST',
    path: '/api/reconciliation/import',
    summary: 'Import movements from a CSV file of the provider',
    tag,
    access: 'reconciliation.act',
    data: 'all',
    body: z.object({ text: z.string().min(1).max(2_000_000) }),
    response: z.object({ imported: z.int(), known: z.int(), matched: z.int() }),
    errors: ['bad-input'],
  }),
  resolveMovement: defineRoute({
    name: 'resolveMovement',
    method: 'POST',
    path: '/api/reconciliation/movements/:id/resolve',
    summary: 'Do something about a difference',
    tag,
    access: 'reconciliation.act',
    data: 'all',
    params: MovementParams,
    body: z.object({ action: MovementAction, reason: z.string().trim().min(3).max(300) }),
    response: Movement,
    errors: ['not-found', 'wrong-state', 'payment-unavailable'],
  }),
  listChargebacks: defineRoute({
    name: 'listChargebacks',
    method: 'GET',
    path: '/api/reconciliation/chargebacks',
    summary: 'Payments that banks took back, newest first',
    tag,
    access: 'reconciliation.read',
    data: 'all',
    query: PageQuery,
    response: pageOf(Chargeback),
  }),
  listMonths: defineRoute({
    name: 'listMonths',
    method: 'GET',
    path: '/api/months',
    summary: 'Months of the ledger with the checklist of the next one to close',
    tag,
    access: 'ledger.read',
    data: 'all',
    response: z.object({ items: z.array(MonthView) }),
  }),
  closeMonth: defineRoute({
    name: 'closeMonth',
    method: 'POST',
    path: '/api/months/:month/close',
    summary: 'Close a month for ever',
    tag,
    access: 'ledger.close',
    data: 'all',
    params: z.object({ month: Month }),
    response: MonthView,
    errors: ['wrong-state'],
  }),
} as const;
