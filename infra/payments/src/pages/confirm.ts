import type { Request, Response } from 'express';
import { answerAuthentication } from '../objects/intent-life.js';
import { answerSetup } from '../objects/setup-intents.js';
import { html, money, sendPage } from './html.js';
import { fieldsOf, openIntent, reread } from './intents.js';
import type { PageTools } from './mount.js';
import { returnUrlOf } from './pay.js';
import { formTargets, goBack } from './return.js';

/** What the payer's bank would show: a question with two answers. */
export function showConfirm(tools: PageTools, request: Request, response: Response): void {
  const open = openIntent(tools, request, response);
  if (!open) return;
  const { intent } = open;
  const { trustedHosts } = tools.desk.settings;
  const returnUrl = targetOf(tools, request, intent.id);
  if (intent.status !== 'requires_action') {
    goBack(response, intent, returnUrl, trustedHosts);
    return;
  }
  const what =
    intent.object === 'payment_intent'
      ? `a payment of ${money(intent.amount, intent.currency)}`
      : 'that your card is saved';
  const body = html`<main class="narrow">
<h1>Your bank asks: is it you?</h1>
<p>Please confirm ${what}.</p>
<form method="post" class="buttons">
<button name="answer" value="approve">Yes, confirm</button>
<button name="answer" value="refuse">No, refuse</button>
</form>
</main>`;
  sendPage(response, { title: 'Confirmation', formTargets: formTargets(returnUrl, trustedHosts) }, body);
}

export function submitConfirm(tools: PageTools, request: Request, response: Response): void {
  const open = openIntent(tools, request, response);
  if (!open) return;
  const returnUrl = targetOf(tools, request, open.intent.id);
  const approved = fieldsOf(request).answer === 'approve';
  const { intent } = open;
  tools.api.runForPage(open.account, open.baseUrl, {}, (call) =>
    intent.object === 'payment_intent'
      ? answerAuthentication(call, intent, approved)
      : answerSetup(call, intent, approved),
  );
  goBack(response, reread(tools, open), returnUrl, tools.desk.settings.trustedHosts);
}

/** The place named in the address, or else the one that was named when the intent was confirmed. */
function targetOf(tools: PageTools, request: Request, intentId: string): string | null {
  const stored = tools.desk.store.hidden(intentId).returnUrl;
  return returnUrlOf(request) ?? (typeof stored === 'string' ? stored : null);
}
