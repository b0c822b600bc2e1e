/** What admins watch over: accounts and their standing, and the audit trail. */
import { z } from 'zod';
import { OrganisationKind, Role } from '../permissions.js';
import { Country, Done, Email, Id, IdParams, PageQuery, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

const Standing = z
  .object({ reason: z.string(), sinceUtc: UtcTime, byName: z.string() })
  .nullable()
  .describe('why and since when it is suspended; null in good standing');

export const AccountSummary = z.object({
  id: Id,
  kind: OrganisationKind,
  name: z.string(),
  country: Country,
  members: z.int(),
  openBookings: z.int().describe('as buyer or as owner'),
  createdUtc: UtcTime,
  lastSeenUtc: UtcTime.nullable().describe('the latest of its members'),
  suspended: Standing,
});
export type AccountSummary = z.infer<typeof AccountSummary>;

export const AccountView = AccountSummary.extend({
  billingEmail: Email,
  vatNumber: z.string().nullable(),
  people: z.array(z.object({ id: Id, name: z.string(), email: Email, role: Role, lastSeenUtc: UtcTime.nullable() })),
});
export type AccountView = z.infer<typeof AccountView>;

const Reason = z.string().trim().min(1, 'Give the reason; its managers read it.').max(2_000);

export const AuditRow = z.object({
  seq: z.int(),
  atUtc: UtcTime,
  personName: z.string().nullable(),
  organisationName: z.string().nullable(),
  action: z.string(),
  subject: z.string(),
  data: z.string().describe('JSON, as it was recorded'),
});
export type AuditRow = z.infer<typeof AuditRow>;

export const AuditQuery = z.object({
  subject: z.string().max(120).optional().describe('begins with this, such as booking:'),
  action: z.string().max(80).optional().describe('begins with this, such as station.'),
  organisationId: Id.optional(),
  fromUtc: UtcTime.optional(),
  toUtc: UtcTime.optional(),
  beforeSeq: z.coerce.number().int().min(1).optional().describe('rows older than this one'),
  pageSize: z.coerce.number().int().min(1).max(200).default(50),
});

export const AuditCheck = z.object({
  rows: z.int(),
  intact: z.boolean(),
  brokenSeq: z.int().nullable().describe('the first row that does not follow from the one before'),
});
export type AuditCheck = z.infer<typeof AuditCheck>;

const tag = 'oversight';
export const oversightRoutes = {
  listAccounts: defineRoute({
    name: 'listAccounts',
    method: 'GET',
    path: '/api/accounts',
    summary: 'Every organisation, with its standing',
    tag,
    access: 'accounts.read',
    data: 'all',
    query: PageQuery.extend({
      kind: OrganisationKind.optional(),
      search: z.string().max(120).optional().describe('part of the name, or of the address of a member'),
      standing: z.enum(['good', 'suspended']).optional(),
    }),
    response: pageOf(AccountSummary),
  }),
  getAccount: defineRoute({
    name: 'getAccount',
    method: 'GET',
    path: '/api/accounts/:id',
    summary: 'One organisation and its people',
    tag,
    access: 'accounts.read',
    data: 'all',
    params: IdParams,
    response: AccountView,
    errors: ['not-found'],
  }),
  suspendAccount: defineRoute({
    name: 'suspendAccount',
    method: 'POST',
    path: '/api/accounts/:id/suspension',
    summary: 'Suspend an organisation: it reads on, but buys, sells and changes nothing',
    tag,
    access: 'accounts.suspend',
    data: 'all',
    params: IdParams,
    body: z.object({ reason: Reason }),
    response: Done,
    errors: ['not-found', 'wrong-state', 'not-allowed'],
  }),
  reinstateAccount: defineRoute({
    name: 'reinstateAccount',
    method: 'POST',
    path: '/api/accounts/:id/reinstatement',
    summary: 'Lift a suspension',
    tag,
    access: 'accounts.suspend',
    data: 'all',
    params: IdParams,
    body: z.object({ reason: Reason }),
    response: Done,
    errors: ['not-found', 'wrong-state'],
  }),
  listAudit: defineRoute({
    name: 'listAudit',
    method: 'GET',
    path: '/api/audit',
    summary: 'The audit trail, newest first',
    tag,
    access: 'audit.read',
    data: 'all',
    query: AuditQuery,
    response: z.object({ items: z.array(AuditRow), nextBeforeSeq: z.int().nullable() }),
  }),
  checkAudit: defineRoute({
    name: 'checkAudit',
    method: 'GET',
    path: '/api/audit/check',
    summary: 'Recomputes the chain of the audit trail from its first row',
    tag,
    access: 'audit.read',
    data: 'all',
    response: AuditCheck,
  }),
} as const;
