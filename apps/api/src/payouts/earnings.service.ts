/** What an owner sees: what is due, on its way and paid, and where the money goes. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { Principal, ResponseOf, routes } from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DATABASE } from '../platform/database.module.js';
import { write } from '../platform/transaction.js';
import { PAYOUT_PORT, type PayoutPort } from './payout.port.js';
import { lineView } from './payout-views.js';
import { PayoutRepository } from './payouts.repository.js';

@Injectable()
export class EarningsService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(PAYOUT_PORT) private readonly port: PayoutPort,
    private readonly repository: PayoutRepository,
    private readonly audit: AuditService,
  ) {}

  view({ organisationId }: Principal): ResponseOf<typeof routes.earnings> {
    const owner = this.repository.organisation(this.db, organisationId);
    const lines = this.repository.linesOfOwner(organisationId);
    const sum = (currency: string, state: string): number =>
      lines
        .filter(({ line, run }) => run.currency === currency && line.state === state)
        .reduce((total, { line }) => total + line.toPayMinor, 0);
    return {
      account: owner.providerAccountId === null ? 'none' : 'given',
      currencies: this.repository.dueByCurrency(organisationId).map(({ currency, dueMinor }) => ({
        currency,
        dueMinor,
        onTheWayMinor: sum(currency, 'paying'),
        paidMinor: sum(currency, 'paid'),
      })),
      payouts: lines.map(({ line, run }) => ({
        ...lineView(line, owner.name),
        runNumber: run.number,
        currency: run.currency,
      })),
    };
  }

  /** The account is made once; the provider's key makes a repeat after a crash find the same one. */
  async giveAccount(caller: Principal): Promise<{ url: string }> {
    const owner = this.repository.organisation(this.db, caller.organisationId);
    const accountId =
      owner.providerAccountId ??
      (await this.port.createAccount({
        organisationId: owner.id,
        email: owner.billingEmail,
        country: owner.address.country,
      }));
    if (owner.providerAccountId === null) {
      write(this.db, (tx) => {
        this.repository.giveAccount(tx, owner.id, accountId);
        this.audit.record(tx, { caller, action: 'payout-account.give', subject: `organisation:${owner.id}` });
      });
    }
    return { url: await this.port.onboardingUrl(accountId, `${this.config.publicUrl}/invoices`) };
  }
}
