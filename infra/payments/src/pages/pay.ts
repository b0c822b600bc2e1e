import type { Request, Response } from 'express';
import { TEST_CARDS } from '../cards/test-cards.js';
import type { ErrorBody } from '../core/errors.js';
import type { Call } from '../http/call.js';
import { confirmIntent } from '../objects/intent-life.js';
import { createMethod, usableMethod } from '../objects/payment-method-source.js';
import { confirmSetup } from '../objects/setup-intents.js';
import { html, type Markup, money, sendPage } from './html.js';
import { fieldsOf, type Intent, openIntent, reread } from './intents.js';
import type { PageTools } from './mount.js';
import { formTargets, goBack } from './return.js';

const WAITS_FOR_CARD = ['requires_payment_method', 'requires_confirmation'];

/** The card page: what the product sends a payer to, so that no card number ever reaches the product. */
export function showPay(tools: PageTools, request: Request, response: Response): void {
  const open = openIntent(tools, request, response);
  if (!open) return;
  const returnUrl = returnUrlOf(request);
  const { trustedHosts } = tools.desk.settings;
  if (open.intent.status === 'requires_action') {
    response.redirect(303, `/confirm/${open.intent.client_secret}${suffix(returnUrl)}`);
  } else if (!WAITS_FOR_CARD.includes(open.intent.status)) goBack(response, open.intent, returnUrl, trustedHosts);
  else sendForm(response, open.intent, returnUrl, trustedHosts, null);
}

export function submitPay(tools: PageTools, request: Request, response: Response): void {
  const open = openIntent(tools, request, response);
  if (!open) return;
  const returnUrl = returnUrlOf(request);
  const { trustedHosts } = tools.desk.settings;
  const answer = tools.api.runForPage(open.account, open.baseUrl, cardFields(fieldsOf(request)), (call) =>
    tryCard(call, open.intent, returnUrl),
  );
  const after = reread(tools, open);
  if (answer.status !== 200) {
    const { error } = JSON.parse(answer.body) as ErrorBody;
    sendForm(response, after, returnUrl, trustedHosts, error.message);
  } else if (after.status === 'requires_action') {
    response.redirect(303, `/confirm/${after.client_secret}${suffix(returnUrl)}`);
  } else goBack(response, after, returnUrl, trustedHosts);
}

function tryCard(call: Call, intent: Intent, returnUrl: string | null): object {
  const token = call.input.text('token');
  const method = token === undefined ? createMethod(call, call.input) : usableMethod(call, token);
  // The page itself is where the payer comes back to, when the product named no other place.
  const target = returnUrl ?? call.baseUrl;
  if (intent.object === 'setup_intent') return confirmSetup(call, intent, method, target);
  return confirmIntent(call, intent, method, { offSession: false, returnUrl: target, failOnAction: false });
}

/** The form's fields in the API's own shape, so that one set of checks serves both. */
export function cardFields(fields: Record<string, string>): Record<string, unknown> {
  if (fields.token) return { token: fields.token };
  const [month = '', year = ''] = (fields.expiry ?? '').split('/').map((part) => part.trim());
  const card = {
    number: fields.number || '0',
    exp_month: /^\d+$/.test(month) ? month : '0',
    exp_year: /^\d\d$/.test(year) ? `20${year}` : /^\d+$/.test(year) ? year : '0',
    cvc: fields.cvc || 'none',
  };
  return { type: 'card', card, ...(fields.name ? { billing_details: { name: fields.name } } : {}) };
}

function sendForm(
  response: Response,
  intent: Intent,
  returnUrl: string | null,
  trustedHosts: readonly string[],
  problem: string | null,
): void {
  const action = `/pay/${intent.client_secret}${suffix(returnUrl)}`;
  const what = intent.object === 'payment_intent' ? `Pay ${money(intent.amount, intent.currency)}` : 'Save a card';
  const body = html`<main class="narrow">
<h1>${what}</h1>
<p>${intent.description}</p>
${cardForm({ action, what, problem })}
</main>`;
  sendPage(response, { title: what, formTargets: formTargets(returnUrl, trustedHosts) }, body);
}

/** Takes a typed card, or a button for what the bank shall say. */
export function cardForm(form: { action: string; what: string; problem: string | null }): Markup {
  const buttons = TEST_CARDS.map(
    (card) => html`<button name="token" value="pm_card_${card.names[0]}">${card.label}</button>`,
  );
  return html`${problemOf(form.problem)}
<form method="post" action="${form.action}" autocomplete="off">
<label>Card number <input name="number" inputmode="numeric" required placeholder="4242 4242 4242 4242"></label>
<div class="row">
<label>Expires (MM/YY) <input name="expiry" inputmode="numeric" required placeholder="12/34"></label>
<label>Security code <input name="cvc" inputmode="numeric" required placeholder="123"></label>
</div>
<label>Name on the card <input name="name"></label>
<button class="main">${form.what}</button>
</form>
<h2>Or choose what the bank shall say</h2>
<form method="post" action="${form.action}" class="buttons">${buttons}</form>`;
}

function problemOf(problem: string | null): Markup {
  return problem === null ? html`` : html`<p class="problem" role="alert">${problem}</p>`;
}

export function returnUrlOf(request: Request): string | null {
  const value = request.query.return_url;
  return typeof value === 'string' && value !== '' ? value : null;
}

function suffix(returnUrl: string | null): string {
  return returnUrl === null ? '' : `?return_url=${encodeURIComponent(returnUrl)}`;
}
