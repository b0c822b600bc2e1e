import type { Response } from 'express';
import { staysTrusted } from '../objects/urls.js';
import { html, sendPage } from './html.js';
import type { Intent } from './intents.js';

export type RedirectStatus = 'succeeded' | 'pending' | 'failed';

/** Origins a form may lead to: the page to return to, when it is one we follow. */
export function formTargets(returnUrl: string | null, trustedHosts: readonly string[]): string[] {
  return returnUrl !== null && staysTrusted(returnUrl, trustedHosts) ? [new URL(returnUrl).origin] : [];
}

/** Sends the browser back with the result, or says the result here when there is no place to go that we follow. */
export function goBack(
  response: Response,
  intent: Intent,
  returnUrl: string | null,
  trustedHosts: readonly string[],
): void {
  const status = redirectStatus(intent);
  if (returnUrl !== null && staysTrusted(returnUrl, trustedHosts)) {
    const target = new URL(returnUrl);
    target.searchParams.set(intent.object, intent.id);
    target.searchParams.set(`${intent.object}_client_secret`, intent.client_secret ?? '');
    target.searchParams.set('redirect_status', status);
    response.redirect(303, target.href);
    return;
  }
  const sentence = {
    succeeded: 'Done. You can close this page.',
    pending: 'Not finished yet.',
    failed: 'It did not go through.',
  }[status];
  const away = returnUrl === null ? '' : 'The page to return to is not on this machine, so it is not followed.';
  sendPage(response, { title: 'Result' }, html`<main class="narrow"><h1>${sentence}</h1><p>${away}</p></main>`);
}

function redirectStatus(intent: Intent): RedirectStatus {
  if (intent.status === 'succeeded' || intent.status === 'requires_capture') return 'succeeded';
  return intent.status === 'requires_payment_method' || intent.status === 'canceled' ? 'failed' : 'pending';
}
