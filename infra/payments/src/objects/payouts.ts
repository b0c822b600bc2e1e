import type Stripe from 'stripe';
import { postBalance } from '../core/balance.js';
import { checkAmount, knownCurrency } from '../core/currencies.js';
import { refused } from '../core/errors.js';
import { newId } from '../core/ids.js';
import { PLATFORM } from '../core/store.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { checkAvailable, returnPayout } from './payout-life.js';

const ARRIVES_AFTER_S = 2 * 86_400;

function create(call: Call): Stripe.Payout {
  const { input } = call;
  const amountMinor = input.requiredInteger('amount');
  const currency = knownCurrency(input.requiredText('currency'));
  const fields = {
    description: input.text('description') ?? null,
    metadata: input.metadata(),
    statement_descriptor: input.text('statement_descriptor', 22) ?? null,
  };
  input.choice('method', ['standard'] as const);
  input.done();
  checkAmount(amountMinor, currency, 'amount');
  if (call.account !== PLATFORM && !call.desk.get('account', call.account).payouts_enabled) {
    throw refused('This account cannot be paid out yet.', { code: 'payouts_not_allowed' });
  }
  checkAvailable(call, amountMinor, currency);
  const id = newId('po');
  const row = postBalance(call.desk, {
    account: call.account,
    type: 'payout',
    reportingCategory: 'payout',
    amountMinor: -amountMinor,
    currency,
    sourceId: id,
    description: fields.description,
  });
  const arrivesS = call.desk.clock.nowS() + ARRIVES_AFTER_S;
  const payout: Stripe.Payout = {
    id,
    object: 'payout',
    amount: amountMinor,
    application_fee: null,
    application_fee_amount: null,
    arrival_date: arrivesS,
    automatic: false,
    balance_transaction: row.id,
    created: call.desk.clock.nowS(),
    currency,
    destination: null,
    failure_balance_transaction: null,
    failure_code: null,
    failure_message: null,
    livemode: false,
    method: 'standard',
    original_payout: null,
    payout_method: null,
    reconciliation_status: 'not_applicable',
    reversed_by: null,
    source_type: 'card',
    status: 'pending',
    trace_id: null,
    type: 'bank_account',
    ...fields,
  };
  call.desk.insert('payout', payout, call.account);
  call.desk.schedule('payout_arrives', id, arrivesS);
  call.desk.emit('payout.created', payout, call.account);
  return payout;
}

function cancel(call: Call): Stripe.Payout {
  call.input.done();
  return returnPayout(call, call.desk.get('payout', param(call, 'id'), call.account), 'canceled');
}

function retrieve(call: Call): Stripe.Payout {
  call.input.done();
  return call.desk.get('payout', param(call, 'id'), call.account);
}

function list(call: Call): object {
  return answerList(call, 'payout', '/v1/payouts', { where: { status: call.input.text('status') } });
}

export const payoutRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/payouts', run: create },
  { method: 'GET', path: '/v1/payouts', run: list },
  { method: 'GET', path: '/v1/payouts/:id', run: retrieve },
  { method: 'POST', path: '/v1/payouts/:id/cancel', run: cancel },
];
