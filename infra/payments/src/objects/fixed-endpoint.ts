import type Stripe from 'stripe';
import type { Desk } from '../core/desk.js';
import { newId } from '../core/ids.js';
import { API_VERSION } from '../core/kinds.js';
import { PLATFORM } from '../core/store.js';

const DESCRIPTION = 'Set at the start of the local service';

/** Makes the webhook endpoint that the settings ask for, or brings the one of the last start up to date. */
export function keepFixedEndpoint(desk: Desk): void {
  const wanted = desk.settings.webhook;
  if (!wanted) return;
  desk.store.transaction(() => {
    for (const connect of [false, true]) {
      const known = desk.store
        .list('webhook_endpoint', { account: PLATFORM, where: { description: DESCRIPTION }, limit: 100 })
        .items.find((endpoint) => (desk.store.hidden(endpoint.id).connect === true) === connect);
      const endpoint: Stripe.WebhookEndpoint = {
        id: known?.id ?? newId('we'),
        object: 'webhook_endpoint',
        api_version: API_VERSION,
        application: null,
        created: known?.created ?? desk.clock.nowS(),
        description: DESCRIPTION,
        enabled_events: ['*'],
        livemode: false,
        metadata: {},
        status: 'enabled',
        url: wanted.url,
      };
      if (known) desk.store.save<'webhook_endpoint'>(endpoint);
      else desk.insert('webhook_endpoint', endpoint);
      desk.store.setHidden(endpoint.id, { secret: wanted.secret, connect });
    }
  });
}
