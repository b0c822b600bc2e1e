/** The ledger as finance reads it: journal, lines of an account, balances, sums by month, exports, and its check of itself. */
import { z } from 'zod';
import { Currency, Id, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

export const Month = z.string().regex(/^\d{4}-(0[1-9]|1[0-2])$/, 'Use a month such as 2026-12.');
const Account = z.string().min(1).max(60);
/** Where a page goes on; made by the page before. */
const Cursor = z.string().regex(/^\d{1,15}(\.\d+)?_[0-9a-f-]{36}_\d{1,6}$/, 'That is no place in this list.');
const LIMIT = z.coerce.number().int().min(1).max(200).default(50);

const Span = z.object({ fromMonth: Month.optional(), toMonth: Month.optional() });

export const JournalEntry = z.object({
  id: Id,
  atUtc: UtcTime,
  cause: z.string(),
  bookingNumber: z.int().nullable(),
  bookingId: Id.nullable(),
  currency: Currency,
  postings: z.array(
    z.object({
      account: z.string(),
      organisationId: Id.nullable(),
      organisationName: z.string().nullable(),
      amountMinor: z.int(),
    }),
  ),
});

/** One posting of one account, with the balance that it left behind. */
export const LedgerLine = z.object({
  entryId: Id,
  atUtc: UtcTime,
  cause: z.string(),
  bookingNumber: z.int().nullable(),
  bookingId: Id.nullable(),
  organisationId: Id.nullable(),
  organisationName: z.string().nullable(),
  currency: Currency,
  amountMinor: z.int(),
  balanceMinor: z.int(),
});

export const LedgerFault = z.object({ kind: z.string(), sentence: z.string() });
/** What the last check of the ledger found; `null` before the first. */
export const LedgerCheck = z
  .object({ atUtc: UtcTime, postings: z.int(), providerAsked: z.boolean(), faults: z.array(LedgerFault) })
  .nullable();
export type LedgerCheck = z.infer<typeof LedgerCheck>;

const tag = 'money';
export const ledgerRoutes = {
  journal: defineRoute({
    name: 'journal',
    method: 'GET',
    path: '/api/ledger/journal',
    summary: 'Journal entries, newest first',
    tag,
    access: 'ledger.read',
    data: 'all',
    query: Span.extend({
      currency: Currency.optional(),
      bookingNumber: z.coerce.number().int().min(1).optional(),
      after: Cursor.optional(),
      limit: LIMIT,
    }),
    response: z.object({ items: z.array(JournalEntry), next: z.string().nullable() }),
  }),
  ledgerLines: defineRoute({
    name: 'ledgerLines',
    method: 'GET',
    path: '/api/ledger/lines',
    summary: 'Postings of one account, newest first, with the running balance',
    tag,
    access: 'ledger.read',
    data: 'all',
    query: Span.extend({
      account: Account,
      currency: Currency,
      organisationId: Id.optional(),
      after: Cursor.optional(),
      limit: LIMIT,
    }),
    response: z.object({
      items: z.array(LedgerLine),
      next: z.string().nullable(),
      openingMinor: z.int(),
      debitMinor: z.int(),
      creditMinor: z.int(),
      closingMinor: z.int(),
      postings: z.int(),
    }),
  }),
  balances: defineRoute({
    name: 'balances',
    method: 'GET',
    path: '/api/ledger/balances',
    summary: 'Balance of every account, as sums of the journal',
    tag,
    access: 'ledger.read',
    data: 'all',
    response: z.object({
      items: z.array(z.object({ account: z.string(), currency: Currency, balanceMinor: z.int() })),
    }),
  }),
  partyBalances: defineRoute({
    name: 'partyBalances',
    method: 'GET',
    path: '/api/ledger/parties',
    summary: 'One account, by the organisations that it is kept for',
    tag,
    access: 'ledger.read',
    data: 'all',
    query: z.object({ account: Account, currency: Currency }),
    response: z.object({
      items: z.array(z.object({ organisationId: Id, organisationName: z.string(), balanceMinor: z.int() })),
    }),
  }),
  ledgerMonths: defineRoute({
    name: 'ledgerMonths',
    method: 'GET',
    path: '/api/ledger/months',
    summary: 'Debits, credits and balance of every account by month',
    tag,
    access: 'ledger.read',
    data: 'all',
    query: Span.extend({ currency: Currency }),
    response: z.object({
      items: z.array(
        z.object({
          month: Month,
          account: z.string(),
          debitMinor: z.int(),
          creditMinor: z.int(),
          balanceMinor: z.int(),
        }),
      ),
    }),
  }),
  ledgerFile: defineRoute({
    name: 'ledgerFile',
    method: 'GET',
    path: '/api/ledger/files/:file',
    summary: 'Journal, trial balance or VAT summary of one month as CSV',
    tag,
    access: 'ledger.read',
    data: 'all',
    params: z.object({ file: z.enum(['journal.csv', 'trial-balance.csv', 'vat-summary.csv']) }),
    query: z.object({ month: Month }),
    produces: 'text/csv; charset=utf-8',
  }),
  ledgerCheck: defineRoute({
    name: 'ledgerCheck',
    method: 'GET',
    path: '/api/ledger/check',
    summary: 'What the last check of the ledger found',
    tag,
    access: 'ledger.read',
    data: 'all',
    response: z.object({ check: LedgerCheck }),
  }),
  runLedgerCheck: defineRoute({
    name: 'runLedgerCheck',
    method: 'POST',
    path: '/api/ledger/check',
    summary: 'Check the ledger against itself and against the provider, now',
    tag,
    access: 'ledger.read',
    data: 'all',
    response: z.object({ check: LedgerCheck }),
  }),
  systemLedgerCheck: defineRoute({
    name: 'systemLedgerCheck',
    method: 'GET',
    path: '/api/system/ledger-check',
    summary: 'When the ledger was checked last, and how many faults there were',
    tag: 'system',
    access: 'system.read',
    data: 'all',
    response: z.object({ atUtc: UtcTime.nullable(), postings: z.int(), faults: z.int() }),
  }),
} as const;
