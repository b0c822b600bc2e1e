import type Stripe from 'stripe';
import { badParameter } from '../core/errors.js';
import { newId, randomText } from '../core/ids.js';
import type { Input } from '../core/input.js';
import { API_VERSION } from '../core/kinds.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';
import { readUrl, staysTrusted } from './urls.js';

const ENDPOINTS_MAX = 16;

function create(call: Call): Stripe.WebhookEndpoint {
  const { input } = call;
  const url = readTarget(call);
  if (url === null) throw badParameter('url', 'Missing required param: url.', 'parameter_missing');
  const events = readEvents(input);
  if (!events) throw badParameter('enabled_events', 'Missing required param: enabled_events.', 'parameter_missing');
  const connect = input.flag('connect') ?? false;
  const endpoint: Stripe.WebhookEndpoint = {
    id: newId('we'),
    object: 'webhook_endpoint',
    api_version: input.text('api_version') ?? API_VERSION,
    application: null,
    created: call.desk.clock.nowS(),
    description: input.text('description') ?? null,
    enabled_events: events,
    livemode: false,
    metadata: input.metadata(),
    status: 'enabled',
    url,
  };
  input.done();
  if (
    call.desk.store.list('webhook_endpoint', { account: call.account, limit: ENDPOINTS_MAX }).items.length >=
    ENDPOINTS_MAX
  ) {
    throw badParameter('url', `There can be at most ${ENDPOINTS_MAX} webhook endpoints.`);
  }
  const secret = `whsec_${randomText(32)}`;
  call.desk.insert('webhook_endpoint', endpoint, call.account, { secret, connect });
  // The secret is answered once, here, and never again.
  return { ...endpoint, secret };
}

function update(call: Call): Stripe.WebhookEndpoint {
  const before = call.desk.get('webhook_endpoint', param(call, 'id'), call.account);
  const { input } = call;
  const disabled = input.flag('disabled');
  const after: Stripe.WebhookEndpoint = {
    ...before,
    url: readTarget(call) ?? before.url,
    enabled_events: readEvents(input) ?? before.enabled_events,
    description: input.textOrNull('description') ?? (input.has('description') ? null : before.description),
    metadata: input.metadata(before.metadata),
    status: disabled === undefined ? before.status : disabled ? 'disabled' : 'enabled',
  };
  input.done();
  call.desk.store.save<'webhook_endpoint'>(after);
  return after;
}

function retrieve(call: Call): Stripe.WebhookEndpoint {
  call.input.done();
  return call.desk.get('webhook_endpoint', param(call, 'id'), call.account);
}

function remove(call: Call): Stripe.DeletedWebhookEndpoint {
  call.input.done();
  const endpoint = call.desk.get('webhook_endpoint', param(call, 'id'), call.account);
  call.desk.store.remove(endpoint.id);
  return { id: endpoint.id, object: 'webhook_endpoint', deleted: true };
}

function list(call: Call): object {
  return answerList(call, 'webhook_endpoint', '/v1/webhook_endpoints');
}

/** Nothing may be sent away from this machine unless its host was trusted at the start. */
function readTarget(call: Call): string | null {
  const url = readUrl(call.input, 'url');
  if (url !== null && !staysTrusted(url, call.desk.settings.trustedHosts)) {
    throw badParameter(
      'url',
      'This local service only delivers to this machine and to hosts it was told to trust.',
      'url_invalid',
    );
  }
  return url;
}

function readEvents(input: Input): string[] | undefined {
  const events = input.texts('enabled_events');
  if (events?.length === 0 || events?.some((event) => event !== '*' && !/^[a-z0-9_]+(\.[a-z0-9_]+)+$/.test(event))) {
    throw badParameter('enabled_events', 'enabled_events takes event types such as payment_intent.succeeded, or "*".');
  }
  return events;
}

export const webhookEndpointRoutes: readonly Route[] = [
  { method: 'POST', path: '/v1/webhook_endpoints', run: create },
  { method: 'GET', path: '/v1/webhook_endpoints', run: list },
  { method: 'GET', path: '/v1/webhook_endpoints/:id', run: retrieve },
  { method: 'POST', path: '/v1/webhook_endpoints/:id', run: update },
  { method: 'DELETE', path: '/v1/webhook_endpoints/:id', run: remove },
];
