import type Stripe from 'stripe';
import { balanceOf, currentBalanceTransaction } from '../core/balance.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';

function retrieveBalance(call: Call): Stripe.Balance {
  call.input.done();
  return balanceOf(call.desk, call.account);
}

function retrieve(call: Call): Stripe.BalanceTransaction {
  call.input.done();
  return currentBalanceTransaction(call.desk, call.desk.get('balance_transaction', param(call, 'id'), call.account));
}

function list(call: Call): object {
  const { input } = call;
  const where = { currency: input.text('currency'), source: input.text('source'), type: input.text('type') };
  const page = answerList(call, 'balance_transaction', '/v1/balance_transactions', { where });
  return { ...page, data: page.data.map((row) => currentBalanceTransaction(call.desk, row)) };
}

export const balanceRoutes: readonly Route[] = [
  { method: 'GET', path: '/v1/balance', run: retrieveBalance },
  { method: 'GET', path: '/v1/balance_transactions', run: list },
  { method: 'GET', path: '/v1/balance_transactions/:id', run: retrieve },
];
