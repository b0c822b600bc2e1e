/** The provider's books over its own SDK. */
import { Inject, Injectable } from '@nestjs/common';
import type Stripe from 'stripe';
import type {
  ChargebackFacts,
  ProviderBooks,
  ProviderMovement,
  ReadEvent,
  RefundedFacts,
} from '../../payments/provider-books.port.js';
import { CONFIG, type Config } from '../../platform/config.js';
import { ask, stripeClient } from './stripe-client.js';
import { chargebackFacts, eventFacts, idOf, refundedFacts } from './stripe-facts.js';

const PAGE = 100;

@Injectable()
export class StripeBooks implements ProviderBooks {
  private readonly stripe: Stripe;

  constructor(@Inject(CONFIG) config: Config) {
    this.stripe = stripeClient(config);
  }

  async balances(): Promise<ReadonlyMap<string, number>> {
    const balance = await ask(this.stripe.balance.retrieve());
    const sums = new Map<string, number>();
    for (const { amount, currency } of [...balance.available, ...balance.pending]) {
      const code = currency.toUpperCase();
      sums.set(code, (sums.get(code) ?? 0) + amount);
    }
    return sums;
  }

  async *movements(sinceMs: number): AsyncGenerator<readonly ProviderMovement[]> {
    const rows = pages((after) =>
      this.stripe.balanceTransactions.list({ ...pageOf(sinceMs, after), expand: ['data.source'] }),
    );
    for await (const page of rows) yield page.map(movementOf);
  }

  async *events(sinceMs: number): AsyncGenerator<readonly ReadEvent[]> {
    const rows = pages((after) => this.stripe.events.list(pageOf(sinceMs, after)));
    for await (const page of rows) {
      yield page.map((event) => ({
        ...eventFacts(event),
        payload: JSON.stringify(event),
        createdMs: event.created * 1000,
      }));
    }
  }

  async chargeback(chargebackId: string): Promise<ChargebackFacts> {
    return chargebackFacts(await ask(this.stripe.disputes.retrieve(chargebackId)));
  }

  async refunded(refundId: string): Promise<RefundedFacts> {
    const refund = await ask(this.stripe.refunds.retrieve(refundId));
    const chargeId = idOf(refund.charge);
    if (chargeId === null) throw new Error(`The refund ${refundId} belongs to no charge.`);
    return refundedFacts(await ask(this.stripe.charges.retrieve(chargeId)));
  }
}

const pageOf = (sinceMs: number, after: string | undefined) => ({
  limit: PAGE,
  created: { gte: Math.floor(sinceMs / 1000) },
  ...(after === undefined ? {} : { starting_after: after }),
});

async function* pages<T extends { id: string }>(
  read: (after: string | undefined) => Promise<Stripe.ApiList<T>>,
): AsyncGenerator<T[]> {
  for (let after: string | undefined; ; ) {
    const page: Stripe.ApiList<T> = await ask(read(after));
    if (page.data.length > 0) yield page.data;
    after = page.data.at(-1)?.id;
    if (!page.has_more || after === undefined) return;
  }
}

function movementOf(row: Stripe.BalanceTransaction): ProviderMovement {
  const source = typeof row.source === 'object' ? row.source : null;
  const intent = source !== null && 'payment_intent' in source ? source.payment_intent : null;
  return {
    id: row.id,
    type: row.type,
    category: row.reporting_category,
    sourceId: source === null ? (typeof row.source === 'string' ? row.source : null) : source.id,
    intentId: idOf(intent ?? null),
    amountMinor: row.amount,
    feeMinor: row.fee,
    netMinor: row.net,
    currency: row.currency.toUpperCase(),
    atMs: row.created * 1000,
    availableMs: row.available_on * 1000,
    description: row.description ?? '',
  };
}
