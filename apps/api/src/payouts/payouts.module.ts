/** Paying owners: runs, their transfers, and what owners see of it. */
import { Module } from '@nestjs/common';
import { AccountsModule } from '../accounts/accounts.module.js';
import { StripePayouts } from '../adapters/payment/stripe-payouts.adapter.js';
import { LedgerModule } from '../ledger/ledger.module.js';
import { MailModule } from '../mail/mail.module.js';
import { OutboxModule } from '../outbox/outbox.module.js';
import { EarningsService } from './earnings.service.js';
import { PAYOUT_PORT } from './payout.port.js';
import { PayoutWorker } from './payout-worker.js';
import { PayoutsController } from './payouts.controller.js';
import { PayoutRepository } from './payouts.repository.js';
import { PayoutService } from './payouts.service.js';

@Module({
  imports: [AccountsModule, LedgerModule, MailModule, OutboxModule],
  controllers: [PayoutsController],
  providers: [
    { provide: PAYOUT_PORT, useClass: StripePayouts },
    EarningsService,
    PayoutRepository,
    PayoutService,
    PayoutWorker,
  ],
})
export class PayoutsModule {}
