/** What each role does here, step by step. Words only; the pages themselves stay the truth. */
import type { OrganisationKind, Role } from '@skyberth/shared';
import { paths } from '../../lib/paths.js';

export interface Guide {
  readonly title: string;
  readonly steps: readonly { readonly words: string; readonly to?: string }[];
}

const OPERATOR: readonly Guide[] = [
  {
    title: 'Buy a contact',
    steps: [
      { words: 'Bring your spacecraft: paste or upload element sets.', to: paths.addElements },
      { words: 'Describe its radios, so that the link can be computed.', to: paths.spacecraft },
      { words: 'Find time: choose spacecraft and period; each hump on the board is a pass.', to: paths.findTime },
      { words: 'Hold a pass. The price is frozen for ten minutes and nothing is charged.' },
      { words: 'Pay. The funds are only secured; they are charged after the contact.' },
      { words: 'Take pointing, frequency table and ephemeris from the contact page.', to: paths.bookings },
    ],
  },
  {
    title: 'Change or cancel',
    steps: [
      { words: 'Open the contact and cancel; the page says first what comes back by the refund steps.' },
      { words: 'If the station cancels, everything comes back.' },
    ],
  },
];
const OWNER: readonly Guide[] = [
  {
    title: 'Sell time on an antenna',
    steps: [
      { words: 'Describe the station: position, time zone, currency.', to: paths.newStation },
      { words: 'Add the antenna, draw or upload its mask, list its bands.', to: paths.stations },
      { words: 'Set opening hours and the price; look at what they would have earned.', to: paths.stations },
      { words: 'Ask for approval. After it, put the antenna on sale.', to: paths.stations },
    ],
  },
  {
    title: 'Each day',
    steps: [
      { words: 'Answer requests before their deadline.', to: paths.requests },
      { words: 'Block out time for maintenance or your own use.', to: paths.availability },
      { words: 'Report every contact; a good report charges the buyer.', to: paths.bookings },
    ],
  },
];
const FINANCE: readonly Guide[] = [
  {
    title: 'Follow the money',
    steps: [
      { words: 'Every movement stands in the ledger, tied to its contact.', to: paths.ledger },
      { words: 'Invoices and credit notes are numbered without a gap.', to: paths.invoices },
    ],
  },
];
const ADMIN: readonly Guide[] = [
  {
    title: 'Keep the market honest',
    steps: [
      { words: 'Approve stations on position, mask and papers.', to: paths.approvals },
      { words: 'Suspend an account, with the reason, where it must be.', to: paths.accounts },
      { words: 'Read who did what in the audit trail.', to: paths.audit },
      { words: 'Watch jobs, mails and the element feed.', to: paths.system },
    ],
  },
];

/** The guides of a membership. */
export function guidesFor(active: {
  readonly organisationKind: OrganisationKind;
  readonly role: Role;
}): readonly Guide[] {
  if (active.organisationKind === 'operator') return OPERATOR;
  if (active.organisationKind === 'owner') return OWNER;
  return active.role === 'finance' ? FINANCE : ADMIN;
}
