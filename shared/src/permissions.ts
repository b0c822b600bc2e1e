/**
 * Who may do what: the one table that the API's guard, the pages and the tests read.
 * A permission that names nobody for a kind of organisation is denied to it; there is no default.
 */
import { z } from 'zod';

export const ORGANISATION_KINDS = ['operator', 'owner', 'staff'] as const;
export const OrganisationKind = z.enum(ORGANISATION_KINDS);
export type OrganisationKind = z.infer<typeof OrganisationKind>;

export const ROLES = ['manager', 'member', 'viewer', 'finance', 'admin'] as const;
export const Role = z.enum(ROLES);
export type Role = z.infer<typeof Role>;

/** Roles that exist in each kind of organisation; the database checks the same pairs. */
export const ROLES_OF_KIND: Record<OrganisationKind, readonly Role[]> = {
  operator: ['manager', 'member', 'viewer'],
  owner: ['manager', 'member', 'viewer'],
  staff: ['finance', 'admin'],
};

type Grant = Partial<Record<OrganisationKind, readonly Role[]>>;

const ALL: readonly Role[] = ['manager', 'member', 'viewer'];
const WORKERS: readonly Role[] = ['manager', 'member'];
const MANAGERS: readonly Role[] = ['manager'];

export const PERMISSIONS = {
  'organisation.read': { operator: ALL, owner: ALL, staff: ['finance', 'admin'] },
  'organisation.manage': { operator: MANAGERS, owner: MANAGERS },
  'api-keys.make': { operator: MANAGERS, owner: MANAGERS },
  'api-keys.revoke': { operator: MANAGERS, owner: MANAGERS },
  'calendar-feeds.make': { operator: ALL, owner: ALL },
  'calendar-feeds.revoke': { operator: ALL, owner: ALL },
  'members.manage': { operator: MANAGERS, owner: MANAGERS, staff: ['admin'] },
  'spacecraft.read': { operator: ALL },
  'spacecraft.write': { operator: WORKERS },
  'stations.read': { owner: ALL, staff: ['admin'] },
  'stations.write': { owner: WORKERS },
  'stations.approve': { staff: ['admin'] },
  'files.upload': { operator: WORKERS, owner: WORKERS, staff: ['finance', 'admin'] },
  'clearances.read': { operator: ALL, owner: ALL, staff: ['admin'] },
  'clearances.request': { operator: WORKERS },
  'clearances.grant': { owner: WORKERS },
  'clearances.check': { staff: ['admin'] },
  'clearances.withdraw': { operator: WORKERS, owner: WORKERS, staff: ['admin'] },
  'market.search': { operator: ALL },
  'plans.read': { operator: ALL },
  'plans.make': { operator: WORKERS },
  'bookings.read': { operator: ALL, owner: ALL, staff: ['finance', 'admin'] },
  'bookings.buy': { operator: WORKERS },
  'bookings.decide': { owner: WORKERS },
  'bookings.report': { owner: WORKERS },
  'run-sheet.read': { owner: ALL },
  'messages.read': { operator: ALL, owner: ALL, staff: ['admin'] },
  'messages.write': { operator: WORKERS, owner: WORKERS, staff: ['admin'] },
  'disputes.read': { operator: ALL, owner: ALL, staff: ['admin'] },
  'disputes.open': { operator: WORKERS },
  'disputes.answer': { operator: WORKERS, owner: WORKERS },
  'disputes.decide': { staff: ['admin'] },
  'invoices.read': { operator: ALL, owner: ALL, staff: ['finance'] },
  'credit.read': { operator: ALL },
  'credit.ask': { operator: MANAGERS },
  'credit.decide': { staff: ['finance'] },
  'tax.read': { staff: ['finance'] },
  'payouts.read': { staff: ['finance'] },
  'payouts.review': { staff: ['finance'] },
  'payouts.approve': { staff: ['finance'] },
  'earnings.read': { owner: ALL },
  'earnings.manage': { owner: MANAGERS },
  'ledger.read': { staff: ['finance'] },
  'ledger.close': { staff: ['finance'] },
  'reconciliation.read': { staff: ['finance'] },
  'reconciliation.act': { staff: ['finance'] },
  'accounts.read': { staff: ['admin'] },
  'accounts.suspend': { staff: ['admin'] },
  'audit.read': { staff: ['admin'] },
  'system.read': { staff: ['admin'] },
} as const satisfies Record<string, Grant>;

export type Permission = keyof typeof PERMISSIONS;

/** The person who calls, in the organisation they act for. */
export interface Principal {
  readonly personId: string;
  readonly organisationId: string;
  readonly organisationKind: OrganisationKind;
  readonly role: Role;
}

/** Whether the table lets this person, in this organisation, do that. */
export function can(principal: Pick<Principal, 'organisationKind' | 'role'>, permission: Permission): boolean {
  const grant: Grant = PERMISSIONS[permission];
  return grant[principal.organisationKind]?.includes(principal.role) ?? false;
}
