import type { Request, Response } from 'express';
import { balanceOf } from '../core/balance.js';
import { PLATFORM } from '../core/store.js';
import { idOf } from '../objects/common.js';
import type { Delivery } from '../webhooks/outbox.js';
import { html, type Markup, money, sendPage, utc } from './html.js';
import type { PageTools } from './mount.js';

const ROWS_SHOWN = 25;

/** Everything the service holds, newest first, on one page. */
export function showOverview(tools: PageTools, _request: Request, response: Response): void {
  const { store, clock } = tools.desk;
  const newest = { account: PLATFORM, limit: ROWS_SHOWN };
  const intents = store.list('payment_intent', newest).items;
  const charges = store.list('charge', newest).items;
  const refunds = store.list('refund', newest).items;
  const transfers = store.list('transfer', newest).items;
  const body = html`<main>
<h1>What the payment service holds</h1>
<p>Its time is ${utc(clock.nowS())} UTC. At most ${ROWS_SHOWN} rows of each kind are shown.</p>
${balances(tools)}
${table(
  'Customers',
  ['Id', 'Name', 'E-mail', 'Made'],
  store.list('customer', newest).items.map((c) => row([c.id, c.name, c.email, utc(c.created)])),
)}
${table(
  'Payment intents',
  ['Id', 'Status', 'Amount', 'Taken', 'Customer', 'Made'],
  intents.map((i) =>
    row([
      i.id,
      i.status,
      money(i.amount, i.currency),
      money(i.amount_received, i.currency),
      idOf(i.customer),
      utc(i.created),
    ]),
  ),
)}
${table(
  'Checkout pages',
  ['Id', 'Status', 'Amount', 'Payment intent', 'Made'],
  store
    .list('checkout.session', newest)
    .items.map((s) =>
      row([s.id, s.status, money(s.amount_total ?? 0, s.currency ?? ''), idOf(s.payment_intent), utc(s.created)]),
    ),
)}
${table(
  'Charges',
  ['Id', 'Status', 'Amount', 'Taken', 'Given back', 'Disputed', 'Made'],
  charges.map((c) =>
    row([
      c.id,
      c.failure_code ?? c.status,
      money(c.amount, c.currency),
      money(c.amount_captured, c.currency),
      money(c.amount_refunded, c.currency),
      c.disputed ? 'yes' : '',
      utc(c.created),
    ]),
  ),
)}
${table(
  'Refunds',
  ['Id', 'Status', 'Amount', 'Charge', 'Made'],
  refunds.map((r) => row([r.id, r.status, money(r.amount, r.currency), idOf(r.charge), utc(r.created)])),
)}
${table(
  'Transfers',
  ['Id', 'Amount', 'Reversed', 'To', 'Made'],
  transfers.map((t) =>
    row([t.id, money(t.amount, t.currency), money(t.amount_reversed, t.currency), idOf(t.destination), utc(t.created)]),
  ),
)}
${events(tools)}
</main>`;
  sendPage(response, { title: 'Local payment service' }, body);
}

function balances(tools: PageTools): Markup {
  const accounts = tools.desk.store.list('account', { account: PLATFORM, limit: ROWS_SHOWN }).items;
  const owners = [
    { id: PLATFORM, label: 'the platform' },
    ...accounts.map(({ id, email }) => ({ id, label: `${id} ${email ?? ''}` })),
  ];
  const rows = owners.flatMap(({ id, label }) => {
    const balance = balanceOf(tools.desk, id);
    return balance.available.map((available, index) =>
      row([
        label,
        money(available.amount, available.currency),
        money(balance.pending[index]?.amount ?? 0, available.currency),
      ]),
    );
  });
  return table('Balances', ['Of', 'Available', 'On its way'], rows);
}

function events(tools: PageTools): Markup {
  const rows = tools.desk.store
    .sql("SELECT id, body, account FROM objects WHERE kind = 'event' ORDER BY seq DESC LIMIT ?")
    .all(ROWS_SHOWN) as {
    id: string;
    body: string;
    account: string;
  }[];
  const lines = rows.map(({ id, body, account }) => {
    const event = JSON.parse(body) as { type: string; created: number };
    const deliveries = tools.desk.store
      .sql('SELECT * FROM deliveries WHERE event_id = ? ORDER BY seq')
      .all(id) as Delivery[];
    const again = html`<form method="post" action="/events/${id}/resend"><button>Send again</button></form>`;
    return html`<tr><td>${id}</td><td>${event.type}</td><td>${account}</td><td>${utc(event.created)}</td><td>${deliveries.map(deliveryText).join('; ')}</td><td>${again}</td></tr>`;
  });
  return table('Events and their deliveries', ['Id', 'Type', 'Account', 'At', 'Deliveries', ''], lines);
}

function deliveryText(delivery: Delivery): string {
  const answer = delivery.last_status === null ? (delivery.last_error ?? '') : `answered ${delivery.last_status}`;
  return [delivery.state, `${delivery.attempts} attempts`, answer].filter((part) => part !== '').join(', ');
}

function row(cells: readonly (string | number | null | undefined)[]): Markup {
  return html`<tr>${cells.map((cell) => html`<td>${cell}</td>`)}</tr>`;
}

function table(title: string, heads: readonly string[], rows: readonly Markup[]): Markup {
  if (rows.length === 0) return html`<h2>${title}</h2><p>None yet.</p>`;
  return html`<h2>${title}</h2>
<div class="scroll"><table><thead><tr>${heads.map((head) => html`<th>${head}</th>`)}</tr></thead><tbody>${rows}</tbody></table></div>`;
}
