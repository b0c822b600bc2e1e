import type Stripe from 'stripe';
import { postBalance } from '../core/balance.js';
import { refused } from '../core/errors.js';
import { newId } from '../core/ids.js';
import type { Work } from '../http/call.js';
import { idOf } from './common.js';

const DAY_S = 86_400;
const EVIDENCE_DAYS = 14;

/** The payer's bank takes the money back, and the service a fee on top. */
export function openDispute(work: Work, charge: Stripe.Charge, amountMinor: number, reason: string): Stripe.Dispute {
  if (!charge.captured || amountMinor < 1 || amountMinor > charge.amount_captured) {
    throw refused('Only captured money can be disputed, and no more of it than was captured.', { param: 'amount' });
  }
  if (charge.disputed) throw refused('This charge is disputed already.', { code: 'charge_disputed' });
  const id = newId('dp');
  const withdrawn = postBalance(work.desk, {
    account: work.account,
    type: 'adjustment',
    reportingCategory: 'dispute',
    amountMinor: -amountMinor,
    feeMinor: work.desk.settings.disputeFeeMinor,
    feeDescription: 'Dispute fee',
    currency: charge.currency,
    sourceId: id,
    description: `Chargeback withdrawal for ${charge.id}`,
  });
  const dispute = blankDispute(work, { id, charge, amountMinor, reason, withdrawn });
  work.desk.insert('dispute', dispute, work.account);
  work.desk.store.save<'charge'>({ ...charge, disputed: true });
  work.desk.emit('charge.dispute.created', dispute, work.account);
  work.desk.emit('charge.dispute.funds_withdrawn', dispute, work.account);
  return dispute;
}

/** The bank's verdict. Money comes back when it was won; the fee does not. */
export function closeDispute(work: Work, dispute: Stripe.Dispute, verdict: 'won' | 'lost'): Stripe.Dispute {
  if (dispute.status === 'won' || dispute.status === 'lost')
    throw refused(`This dispute is already closed as ${dispute.status}.`);
  const closed: Stripe.Dispute = { ...dispute, status: verdict, is_charge_refundable: false };
  if (verdict === 'won') {
    const returned = postBalance(work.desk, {
      account: work.account,
      type: 'adjustment',
      reportingCategory: 'dispute_reversal',
      amountMinor: dispute.amount,
      currency: dispute.currency,
      sourceId: dispute.id,
      description: `Chargeback reversal for ${idOf(dispute.charge)}`,
    });
    closed.balance_transactions = [...dispute.balance_transactions, returned];
  }
  work.desk.store.save<'dispute'>(closed);
  if (verdict === 'won') work.desk.emit('charge.dispute.funds_reinstated', closed, work.account);
  work.desk.emit('charge.dispute.closed', closed, work.account);
  return closed;
}

interface Opening {
  id: string;
  charge: Stripe.Charge;
  amountMinor: number;
  reason: string;
  withdrawn: Stripe.BalanceTransaction;
}

function blankDispute(work: Work, opening: Opening): Stripe.Dispute {
  const nowS = work.desk.clock.nowS();
  return {
    id: opening.id,
    object: 'dispute',
    amount: opening.amountMinor,
    balance_transactions: [opening.withdrawn],
    charge: opening.charge.id,
    created: nowS,
    currency: opening.charge.currency,
    enhanced_eligibility_types: [],
    evidence: emptyEvidence(),
    evidence_details: {
      due_by: nowS + EVIDENCE_DAYS * DAY_S,
      enhanced_eligibility: {},
      has_evidence: false,
      past_due: false,
      submission_count: 0,
      submission_method: 'manual',
    },
    intended_submission_method: null,
    is_charge_refundable: false,
    livemode: false,
    metadata: {},
    network_reason_code: null,
    payment_intent: idOf(opening.charge.payment_intent),
    reason: opening.reason,
    status: 'needs_response',
  };
}

function emptyEvidence(): Stripe.Dispute.Evidence {
  return {
    access_activity_log: null,
    billing_address: null,
    cancellation_policy: null,
    cancellation_policy_disclosure: null,
    cancellation_rebuttal: null,
    customer_communication: null,
    customer_email_address: null,
    customer_name: null,
    customer_purchase_ip: null,
    customer_signature: null,
    duplicate_charge_documentation: null,
    duplicate_charge_explanation: null,
    duplicate_charge_id: null,
    enhanced_evidence: {},
    product_description: null,
    receipt: null,
    refund_policy: null,
    refund_policy_disclosure: null,
    refund_refusal_explanation: null,
    service_date: null,
    service_documentation: null,
    shipping_address: null,
    shipping_carrier: null,
    shipping_date: null,
    shipping_documentation: null,
    shipping_tracking_number: null,
    uncategorized_file: null,
    uncategorized_text: null,
  };
}
