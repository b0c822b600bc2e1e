import type Stripe from 'stripe';
import { refused } from '../core/errors.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { closeDispute } from './dispute-life.js';

/** The published texts that decide a test dispute as soon as they are submitted. From memory of the testing documentation. */
const VERDICTS: Readonly<Record<string, 'won' | 'lost'>> = { winning_evidence: 'won', losing_evidence: 'lost' };

const TEXTS = [
  'access_activity_log',
  'cancellation_rebuttal',
  'customer_email_address',
  'customer_name',
  'product_description',
  'refund_refusal_explanation',
  'service_date',
  'uncategorized_text',
] as const;

function update(call: Call): Stripe.Dispute {
  const before = call.desk.get('dispute', param(call, 'id'), call.account);
  const evidence = call.input.group('evidence');
  const submit = call.input.flag('submit') ?? true;
  const metadata = call.input.metadata(before.metadata);
  const shown: Stripe.Dispute.Evidence = { ...before.evidence };
  for (const name of TEXTS) shown[name] = evidence?.textOrNull(name) ?? shown[name];
  call.input.done();
  if (before.status === 'won' || before.status === 'lost')
    throw refused(`This dispute is already closed as ${before.status}.`);
  const submitted = evidence !== undefined && submit;
  const after: Stripe.Dispute = {
    ...before,
    evidence: shown,
    evidence_details: {
      ...before.evidence_details,
      has_evidence: before.evidence_details.has_evidence || evidence !== undefined,
      submission_count: before.evidence_details.submission_count + (submitted ? 1 : 0),
    },
    metadata,
    status: submitted ? 'under_review' : before.status,
  };
  call.desk.store.save<'dispute'>(after);
  call.desk.emit('charge.dispute.updated', after, call.account);
  const verdict = submitted ? VERDICTS[shown.uncategorized_text ?? ''] : undefined;
  return verdict ? closeDispute(call, after, verdict) : after;
}

/** Accepting a dispute means losing it. */
function close(call: Call): Stripe.Dispute {
  call.input.done();
  return closeDispute(call, call.desk.get('dispute', param(call, 'id'), call.account), 'lost');
}

function retrieve(call: Call): Stripe.Dispute {
  call.input.done();
  return call.desk.get('dispute', param(call, 'id'), call.account);
}

function list(call: Call): object {
  const where = { charge: call.input.text('charge'), payment_intent: call.input.text('payment_intent') };
  return answerList(call, 'dispute', '/v1/disputes', { where });
}

export const disputeRoutes: readonly Route[] = [
  { method: 'GET', path: '/v1/disputes', run: list },
  { method: 'GET', path: '/v1/disputes/:id', run: retrieve },
  { method: 'POST', path: '/v1/disputes/:id', run: update },
  { method: 'POST', path: '/v1/disputes/:id/close', run: close },
];
