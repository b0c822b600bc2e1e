import express, { type Express, type NextFunction, type Request, type Response } from 'express';
import type { Desk } from '../core/desk.js';
import { PLATFORM } from '../core/store.js';
import type { Api } from '../http/api.js';
import type { Courier } from '../webhooks/courier.js';
import type { Outbox } from '../webhooks/outbox.js';
import { showCheckout, submitCheckout } from './checkout.js';
import { showConfirm, submitConfirm } from './confirm.js';
import { sendStyle } from './html.js';
import { showOnboarding, submitOnboarding } from './onboarding.js';
import { showOverview } from './overview.js';
import { showPay, submitPay } from './pay.js';

export interface PageTools {
  desk: Desk;
  api: Api;
  outbox: Outbox;
  courier: Courier;
}

type Page = (tools: PageTools, request: Request, response: Response) => void;

/** The pages a person sees: what the service holds, card entry, confirmation, account set-up. */
export function mountPages(app: Express, tools: PageTools): void {
  const form = [refuseOtherOrigins, express.urlencoded({ extended: false, limit: '16kb' })];
  const show = (page: Page) => (request: Request, response: Response) => page(tools, request, response);
  app.get('/style.css', (_request, response) => sendStyle(response));
  app.get('/', show(showOverview));
  app.get('/pay/:clientSecret', show(showPay));
  app.post('/pay/:clientSecret', form, show(submitPay));
  app.get('/checkout/:session', show(showCheckout));
  app.post('/checkout/:session', form, show(submitCheckout));
  app.get('/confirm/:clientSecret', show(showConfirm));
  app.post('/confirm/:clientSecret', form, show(submitConfirm));
  app.get('/onboarding/:account/:token', show(showOnboarding));
  app.post('/onboarding/:account/:token', form, show(submitOnboarding));
  app.post('/events/:id/resend', form, show(resend));
}

function resend(tools: PageTools, request: Request, response: Response): void {
  const id = String(request.params.id);
  const account = tools.desk.store.accountOf(id) ?? PLATFORM;
  const event = tools.desk.store.find('event', id, account);
  if (event) tools.desk.store.transaction(() => tools.outbox.resend(event, account));
  tools.courier.wake();
  response.redirect(303, '/');
}

/** Forms are taken from our own pages only. Browsers send no origin ("null") from pages that send no referrer. */
function refuseOtherOrigins(request: Request, response: Response, next: NextFunction): void {
  const site = request.get('sec-fetch-site');
  const origin = request.get('origin');
  const own = `http://${request.get('host') ?? ''}`;
  if (site === 'same-origin' || (site === undefined && (origin === undefined || origin === own))) next();
  else response.status(403).type('text/plain').send('This form can only be sent from its own page.');
}
