import type Stripe from 'stripe';
import { checkAmount, knownCurrency } from '../core/currencies.js';
import { badParameter, refused } from '../core/errors.js';
import { PLATFORM } from '../core/store.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { makeTransfer, reverseTransfer } from './transfer-life.js';

function create(call: Call): Stripe.Transfer {
  const { input } = call;
  const currency = knownCurrency(input.requiredText('currency'));
  const destinationId = input.requiredText('destination');
  const sourceId = input.text('source_transaction');
  const given = input.integer('amount');
  const rest = {
    transferGroup: input.text('transfer_group') ?? null,
    description: input.text('description') ?? null,
    metadata: input.metadata(),
  };
  input.choice('source_type', ['card'] as const);
  input.done();
  if (call.account !== PLATFORM) throw refused('Only the platform can transfer.', { code: 'transfers_not_allowed' });
  const source = sourceId === undefined ? undefined : call.desk.get('charge', sourceId, PLATFORM, 'source_transaction');
  const amountMinor = given ?? (source ? source.amount - source.amount_refunded : undefined);
  if (amountMinor === undefined) throw badParameter('amount', 'Missing required param: amount.', 'parameter_missing');
  checkAmount(amountMinor, currency, 'amount');
  const destination = call.desk.get('account', destinationId, PLATFORM, 'destination');
  return makeTransfer(call, { amountMinor, currency, destination, source, ...rest });
}

function reverse(call: Call): Stripe.TransferReversal {
  const transfer = call.desk.get('transfer', param(call, 'id'), PLATFORM);
  const amount = call.input.integer('amount');
  const metadata = call.input.metadata();
  call.input.text('description');
  call.input.done();
  if (transfer.reversed) throw refused('This transfer has been reversed in full already.', { param: 'amount' });
  const amountMinor = amount ?? transfer.amount - transfer.amount_reversed;
  checkAmount(amountMinor, transfer.currency, 'amount');
  return reverseTransfer(call, transfer, amountMinor, metadata);
}

function retrieve(call: Call): Stripe.Transfer {
  call.input.done();
  return call.desk.get('transfer', param(call, 'id'), PLATFORM);
}

function update(call: Call): Stripe.Transfer {
  const before = call.desk.get('transfer', param(call, 'id'), PLATFORM);
  const after: Stripe.Transfer = {
    ...before,
    metadata: call.input.metadata(before.metadata),
    description: call.input.text('description') ?? before.description,
  };
  call.input.done();
  call.desk.store.save<'transfer'>(after);
  call.desk.emit('transfer.updated', after, PLATFORM);
  return after;
}

function list(call: Call): object {
  const { input } = call;
  const where = { destination: input.text('destination'), transfer_group: input.text('transfer_group') };
  return answerList(call, 'transfer', '/v1/transfers', { where, account: PLATFORM });
}

function listReversals(call: Call): object {
  const transfer = call.desk.get('transfer', param(call, 'id'), PLATFORM);
  return answerList(call, 'transfer_reversal', `/v1/transfers/${transfer.id}/reversals`, {
    where: { transfer: transfer.id },
    account: PLATFORM,
  });
}

export const transferRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/transfers', run: create },
  { method: 'GET', path: '/v1/transfers', run: list },
  { method: 'GET', path: '/v1/transfers/:id', run: retrieve },
  { method: 'POST', path: '/v1/transfers/:id', run: update },
  { method: 'POST', path: '/v1/transfers/:id/reversals', run: reverse },
  { method: 'GET', path: '/v1/transfers/:id/reversals', run: listReversals },
];
