import type { Request, Response } from 'express';
import type Stripe from 'stripe';
import type { ErrorBody } from '../core/errors.js';
import { PLATFORM } from '../core/store.js';
import { intentOfSession } from '../objects/checkout-sessions.js';
import { idOf } from '../objects/common.js';
import { confirmIntent } from '../objects/intent-life.js';
import { createMethod, usableMethod } from '../objects/payment-method-source.js';
import { staysTrusted } from '../objects/urls.js';
import { html, type Markup, money, sendPage } from './html.js';
import { fieldsOf } from './intents.js';
import type { PageTools } from './mount.js';
import { cardFields, cardForm } from './pay.js';
import { formTargets } from './return.js';

type Session = Stripe.Checkout.Session;

/** The page of a checkout session: what is bought, and the card form. */
export function showCheckout(tools: PageTools, request: Request, response: Response): void {
  const session = sessionAt(tools, request);
  if (!session) sayClosed(response, 404, 'There is no checkout at this address.');
  else if (session.status === 'complete') leave(tools, response, session);
  else if (session.status === 'expired') sayClosed(response, 410, 'This checkout has ended. Nothing was charged.');
  else sendCheckout(tools, response, session, null);
}

export function submitCheckout(tools: PageTools, request: Request, response: Response): void {
  const session = sessionAt(tools, request);
  if (session?.status !== 'open') {
    showCheckout(tools, request, response);
    return;
  }
  const baseUrl = `http://${request.get('host') ?? ''}`;
  const account = tools.desk.store.accountOf(session.id) ?? PLATFORM;
  const answer = tools.api.runForPage(account, baseUrl, cardFields(fieldsOf(request)), (call) => {
    const token = call.input.text('token');
    const method = token === undefined ? createMethod(call, call.input) : usableMethod(call, token);
    const intent = intentOfSession(call, session);
    // The bank's page leads back here, where a finished session leads on to the shop.
    const returnUrl = `${baseUrl}/checkout/${session.id}`;
    return confirmIntent(call, intent, method, { offSession: false, returnUrl, failOnAction: false });
  });
  const after = sessionAt(tools, request) ?? session;
  if (answer.status !== 200) {
    const { error } = JSON.parse(answer.body) as ErrorBody;
    sendCheckout(tools, response, after, error.message);
    return;
  }
  const intent = tools.desk.get('payment_intent', idOf(after.payment_intent) ?? '', account);
  const bank = intent.next_action?.redirect_to_url?.url;
  if (intent.status === 'requires_action' && bank) response.redirect(303, bank);
  else leave(tools, response, after);
}

function sessionAt(tools: PageTools, request: Request): Session | undefined {
  const id = String(request.params.session);
  const account = tools.desk.store.accountOf(id);
  return account === undefined ? undefined : tools.desk.store.find('checkout.session', id, account);
}

function sendCheckout(tools: PageTools, response: Response, session: Session, problem: string | null): void {
  const { trustedHosts } = tools.desk.settings;
  const amount = money(session.amount_total ?? 0, session.currency ?? '');
  const names = tools.desk.store.hidden(session.id).names as string[];
  const body = html`<main class="narrow">
<h1>${amount}</h1>
<ul>${names.map((name) => html`<li>${name}</li>`)}</ul>
${cardForm({ action: `/checkout/${session.id}`, what: `Pay ${amount}`, problem })}
${wayBack(session.cancel_url, trustedHosts)}
</main>`;
  sendPage(response, { title: `Pay ${amount}`, formTargets: formTargets(session.success_url, trustedHosts) }, body);
}

function wayBack(cancelUrl: string | null, trustedHosts: readonly string[]): Markup {
  if (cancelUrl === null || !staysTrusted(cancelUrl, trustedHosts)) return html``;
  return html`<p><a href="${cancelUrl}">Back without paying</a></p>`;
}

/** On to the shop's own page, where it is one that we follow. */
function leave(tools: PageTools, response: Response, session: Session): void {
  const target = (session.success_url ?? '').replaceAll('{CHECKOUT_SESSION_ID}', session.id);
  if (staysTrusted(target, tools.desk.settings.trustedHosts)) response.redirect(303, target);
  else sayClosed(response, 200, 'Done. You can close this page.');
}

function sayClosed(response: Response, status: number, sentence: string): void {
  sendPage(response, { title: 'Checkout', status }, html`<main class="narrow"><h1>${sentence}</h1></main>`);
}
