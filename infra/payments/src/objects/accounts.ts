import type Stripe from 'stripe';
import { knownCurrency } from '../core/currencies.js';
import { badParameter, refused } from '../core/errors.js';
import { newId, randomText } from '../core/ids.js';
import type { Input } from '../core/input.js';
import { PLATFORM } from '../core/store.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { requirements } from './account-life.js';
import { readUrl } from './urls.js';

const CAPABILITIES = ['card_payments', 'transfers'] as const;
const LINK_LIFE_S = 300;

function create(call: Call): Stripe.Account {
  const { input } = call;
  const account: Stripe.Account = {
    id: newId('acct'),
    object: 'account',
    business_profile: null,
    business_type: input.choice('business_type', ['company', 'individual', 'non_profit'] as const) ?? null,
    capabilities: readCapabilities(input),
    charges_enabled: false,
    country: (input.text('country', 2) ?? 'DE').toUpperCase(),
    created: call.desk.clock.nowS(),
    default_currency: knownCurrency(input.text('default_currency') ?? 'eur', 'default_currency'),
    details_submitted: false,
    email: input.text('email') ?? null,
    external_accounts: { object: 'list', data: [], has_more: false, url: '' },
    metadata: input.metadata(),
    payouts_enabled: false,
    requirements: requirements(['external_account', 'tos_acceptance.date'], 'requirements.past_due'),
    type: input.choice('type', ['express', 'custom', 'standard'] as const) ?? 'express',
  };
  input.done();
  account.external_accounts = {
    object: 'list',
    data: [],
    has_more: false,
    url: `/v1/accounts/${account.id}/external_accounts`,
  };
  // Accounts belong to the platform; what happens inside one is kept under its own id.
  call.desk.insert('account', account, PLATFORM);
  return account;
}

/** Every asked capability starts inactive: the account has not said who it is yet. */
function readCapabilities(input: Input): Stripe.Account.Capabilities {
  const asked = input.group('capabilities');
  const result: Stripe.Account.Capabilities = {};
  for (const name of CAPABILITIES) {
    if (asked?.group(name)?.flag('requested')) result[name] = 'inactive';
  }
  return result;
}

function retrieve(call: Call): Stripe.Account {
  call.input.done();
  return call.desk.get('account', param(call, 'id'), PLATFORM, 'account');
}

function update(call: Call): Stripe.Account {
  const before = call.desk.get('account', param(call, 'id'), PLATFORM, 'account');
  const email = call.input.text('email');
  const after: Stripe.Account = {
    ...before,
    email: email ?? before.email,
    metadata: call.input.metadata(before.metadata ?? {}),
  };
  call.input.done();
  call.desk.store.save<'account'>(after);
  call.desk.emit('account.updated', after, after.id);
  return after;
}

function remove(call: Call): Stripe.DeletedAccount {
  call.input.done();
  const account = call.desk.get('account', param(call, 'id'), PLATFORM, 'account');
  const owed = call.desk.store
    .sql(
      'SELECT coalesce(sum(abs(total)), 0) AS rest FROM (SELECT sum(net_minor) AS total FROM balance_rows WHERE account = ? GROUP BY currency)',
    )
    .get(account.id);
  if ((owed as { rest: number }).rest !== 0) throw refused('This account still has a balance. Pay it out first.');
  call.desk.store.remove(account.id);
  return { id: account.id, object: 'account', deleted: true };
}

function list(call: Call): object {
  return answerList(call, 'account', '/v1/accounts', { account: PLATFORM });
}

/** A page of this service on which the account's owner "tells who they are". Works once, for a few minutes. */
function createLink(call: Call): Stripe.AccountLink {
  const { input } = call;
  const account = call.desk.get('account', input.requiredText('account'), PLATFORM, 'account');
  const type = input.choice('type', ['account_onboarding', 'account_update'] as const);
  const returnUrl = readUrl(input, 'return_url');
  const refreshUrl = readUrl(input, 'refresh_url');
  input.done();
  if (type === undefined) throw badParameter('type', 'Missing required param: type.', 'parameter_missing');
  if (returnUrl === null || refreshUrl === null)
    throw badParameter('return_url', 'Give both return_url and refresh_url.', 'parameter_missing');
  const token = randomText(32);
  const expiresAtS = call.desk.clock.nowS() + LINK_LIFE_S;
  call.desk.store.setHidden(account.id, { linkToken: token, linkExpiresAtS: expiresAtS, returnUrl, refreshUrl });
  return {
    object: 'account_link',
    created: call.desk.clock.nowS(),
    expires_at: expiresAtS,
    url: `${call.baseUrl}/onboarding/${account.id}/${token}`,
  };
}

export const accountRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/accounts', run: create },
  { method: 'GET', path: '/v1/accounts', run: list },
  { method: 'GET', path: '/v1/accounts/:id', run: retrieve },
  { method: 'POST', path: '/v1/accounts/:id', run: update },
  { method: 'DELETE', path: '/v1/accounts/:id', run: remove },
  { method: 'POST', path: '/v1/account_links', run: createLink },
];
