import type { Request, Response } from 'express';
import type Stripe from 'stripe';
import { PLATFORM } from '../core/store.js';
import { html, sendPage } from './html.js';
import type { PageTools } from './mount.js';

export type Intent = Stripe.PaymentIntent | Stripe.SetupIntent;

export interface OpenIntent {
  intent: Intent;
  account: string;
  baseUrl: string;
}

/** The intent whose client secret is in the path; sends a page and returns nothing when there is none. */
export function openIntent(tools: PageTools, request: Request, response: Response): OpenIntent | undefined {
  const secret = String(request.params.clientSecret);
  const intent = tools.desk.store.findByClientSecret(secret);
  if (!intent) {
    sendPage(
      response,
      { title: 'Not found', status: 404 },
      html`<main class="narrow"><h1>There is no payment at this address.</h1></main>`,
    );
    return undefined;
  }
  const account = tools.desk.store.accountOf(intent.id) ?? PLATFORM;
  return { intent, account, baseUrl: `http://${request.get('host') ?? ''}` };
}

/** The intent as it is after something was tried. */
export function reread(tools: PageTools, open: OpenIntent): Intent {
  const kind = open.intent.object;
  return tools.desk.get(kind, open.intent.id, open.account);
}

export function fieldsOf(request: Request): Record<string, string> {
  const body: unknown = request.body;
  if (typeof body !== 'object' || body === null) return {};
  return Object.fromEntries(
    Object.entries(body).filter((pair): pair is [string, string] => typeof pair[1] === 'string'),
  );
}
