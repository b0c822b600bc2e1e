/** Which pages stand in the head line, by the kind of organisation and the role. */
import type { Membership } from '@skyberth/shared';
import { paths } from '../lib/paths.js';

export interface Page {
  readonly label: string;
  readonly to: string;
  /** Name of the number in the home view that stands beside it. */
  readonly count?: string;
  readonly countNoun?: string;
}

const HOME: Page = { label: 'Home', to: paths.home };
const MESSAGES: Page = { label: 'Messages', to: paths.messages, count: 'messages', countNoun: 'new messages' };

const OPERATOR: readonly Page[] = [
  HOME,
  { label: 'Find time', to: paths.findTime },
  { label: 'Plan', to: paths.plans },
  { label: 'Bookings', to: paths.bookings },
  { label: 'Standby', to: paths.standby },
  { label: 'Spacecraft', to: paths.spacecraft },
  { label: 'Clearances', to: paths.clearances },
  MESSAGES,
  { label: 'Invoices', to: paths.invoices },
  { label: 'Monthly account', to: paths.monthlyAccount },
];
const OWNER: readonly Page[] = [
  HOME,
  { label: 'Stations', to: paths.stations },
  { label: 'Availability', to: paths.availability },
  { label: 'Requests', to: paths.requests, count: 'requests', countNoun: 'requests wait for an answer' },
  { label: 'Run sheet', to: paths.runSheet },
  { label: 'Clearances', to: paths.clearances },
  { label: 'Bookings', to: paths.bookings },
  MESSAGES,
  { label: 'Earnings', to: paths.invoices },
];
const FINANCE: readonly Page[] = [
  HOME,
  { label: 'Payouts', to: paths.payouts },
  { label: 'Ledger', to: paths.ledger },
  { label: 'Reconciliation', to: paths.reconciliation },
  { label: 'Tax and fees', to: paths.taxAndFees },
  { label: 'Monthly accounts', to: paths.creditAccounts },
  { label: 'Invoices', to: paths.invoices },
  { label: 'Bookings', to: paths.bookings },
];
const ADMIN: readonly Page[] = [
  HOME,
  { label: 'Approvals', to: paths.approvals, count: 'approvals', countNoun: 'stations wait for approval' },
  { label: 'Clearances', to: paths.clearances },
  { label: 'Bookings', to: paths.bookings },
  { label: 'Disputes', to: paths.disputes, count: 'disputes', countNoun: 'disputes wait for a decision' },
  MESSAGES,
  { label: 'Accounts', to: paths.accounts },
  { label: 'Audit', to: paths.audit },
  { label: 'System', to: paths.system },
];

/** The pages of this membership, home first. */
export function pagesFor(active: Pick<Membership, 'organisationKind' | 'role'>): readonly Page[] {
  if (active.organisationKind === 'operator') return OPERATOR;
  if (active.organisationKind === 'owner') return OWNER;
  return active.role === 'finance' ? FINANCE : ADMIN;
}
