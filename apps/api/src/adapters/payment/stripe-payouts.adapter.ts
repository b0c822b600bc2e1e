/** Paying owners over the provider's own SDK: connected accounts and transfers to them. */
import { Inject, Injectable } from '@nestjs/common';
import Stripe from 'stripe';
import type { PayoutPort, TransferAnswer, TransferOrder } from '../../payouts/payout.port.js';
import { CONFIG, type Config } from '../../platform/config.js';
import { ask, stripeClient } from './stripe-client.js';

@Injectable()
export class StripePayouts implements PayoutPort {
  private readonly stripe: Stripe;

  constructor(@Inject(CONFIG) config: Config) {
    this.stripe = stripeClient(config);
  }

  async createAccount(owner: { organisationId: string; email: string; country: string }): Promise<string> {
    const { organisationId, email, country } = owner;
    const made = await ask(
      this.stripe.accounts.create(
        {
          type: 'express',
          country,
          email,
          capabilities: { transfers: { requested: true } },
          metadata: { skyberth_organisation: organisationId },
        },
        { idempotencyKey: `skyberth:account:${organisationId}` },
      ),
    );
    return made.id;
  }

  async onboardingUrl(accountId: string, backUrl: string): Promise<string> {
    const link = { account: accountId, type: 'account_onboarding', return_url: backUrl, refresh_url: backUrl } as const;
    return (await ask(this.stripe.accountLinks.create(link))).url;
  }

  /** The provider forgets keys after a day; the group, which is the line, finds a transfer that is older than that. */
  async transfer(order: TransferOrder): Promise<TransferAnswer> {
    const { lineId, accountId, amountMinor, currency, description } = order;
    const [known] = (await ask(this.stripe.transfers.list({ transfer_group: lineId, limit: 1 }))).data;
    if (known) return { kind: 'sent', transferId: known.id };
    try {
      const made = await ask(
        this.stripe.transfers.create(
          {
            amount: amountMinor,
            currency: currency.toLowerCase(),
            destination: accountId,
            transfer_group: lineId,
            description,
          },
          { idempotencyKey: `skyberth:transfer:${lineId}` },
        ),
      );
      return { kind: 'sent', transferId: made.id };
    } catch (error) {
      if (error instanceof Stripe.errors.StripeInvalidRequestError) return { kind: 'refused', why: error.message };
      throw error;
    }
  }
}
