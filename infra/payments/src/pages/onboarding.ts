import type { Request, Response } from 'express';
import type Stripe from 'stripe';
import { setAccountActive } from '../objects/account-life.js';
import { staysTrusted } from '../objects/urls.js';
import { html, sendPage } from './html.js';
import type { PageTools } from './mount.js';

interface Link {
  account: Stripe.Account;
  returnUrl: string;
  expired: boolean;
}

/** The page behind an account link: an owner says who they are, with one button, since nobody checks here. */
export function showOnboarding(tools: PageTools, request: Request, response: Response): void {
  const link = readLink(tools, request);
  if (!link || link.expired) {
    sendPage(
      response,
      { title: 'Link ended', status: 410 },
      html`<main class="narrow"><h1>This link has ended.</h1><p>Ask for a new one.</p></main>`,
    );
    return;
  }
  const { trustedHosts } = tools.desk.settings;
  const targets = staysTrusted(link.returnUrl, trustedHosts) ? [new URL(link.returnUrl).origin] : [];
  const body = html`<main class="narrow">
<h1>Be paid through this service</h1>
<p>Account ${link.account.id}, ${link.account.email}. The real service would ask who you are and where to send the money.</p>
<form method="post"><button class="main">Agree and finish</button></form>
</main>`;
  sendPage(response, { title: 'Set up payments', formTargets: targets }, body);
}

export function submitOnboarding(tools: PageTools, request: Request, response: Response): void {
  const link = readLink(tools, request);
  if (!link || link.expired) {
    showOnboarding(tools, request, response);
    return;
  }
  tools.desk.store.transaction(() => {
    tools.desk.cause = { requestId: null, idempotencyKey: null };
    setAccountActive(tools.desk, link.account, true);
    tools.desk.store.setHidden(link.account.id, { linkToken: null });
  });
  tools.courier.wake();
  if (staysTrusted(link.returnUrl, tools.desk.settings.trustedHosts)) response.redirect(303, link.returnUrl);
  else sendPage(response, { title: 'Done' }, html`<main class="narrow"><h1>Done. You can close this page.</h1></main>`);
}

function readLink(tools: PageTools, request: Request): Link | undefined {
  const account = tools.desk.store.find('account', String(request.params.account));
  if (!account) return undefined;
  const hidden = tools.desk.store.hidden(account.id);
  if (typeof hidden.linkToken !== 'string' || hidden.linkToken !== request.params.token) return undefined;
  return {
    account,
    returnUrl: String(hidden.returnUrl),
    expired: Number(hidden.linkExpiresAtS) <= tools.desk.clock.nowS(),
  };
}
