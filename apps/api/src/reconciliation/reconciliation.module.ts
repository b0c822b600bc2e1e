/** The provider's books against ours, the check of the ledger, and the closing of months. */
import { Module } from '@nestjs/common';
import { JobsModule } from '../jobs/jobs.module.js';
import { LedgerModule } from '../ledger/ledger.module.js';
import { PaymentsModule } from '../payments/payments.module.js';
import { LedgerCheckService } from './ledger-check.service.js';
import { MissedNews } from './missed-news.js';
import { MonthRepository } from './months.repository.js';
import { MonthService } from './months.service.js';
import { MovementMatcher } from './movement-matcher.js';
import { ReconciliationController } from './reconciliation.controller.js';
import { ReconciliationRepository } from './reconciliation.repository.js';
import { ReconciliationService } from './reconciliation.service.js';

@Module({
  imports: [JobsModule, LedgerModule, PaymentsModule],
  controllers: [ReconciliationController],
  providers: [
    ReconciliationRepository,
    ReconciliationService,
    MissedNews,
    MovementMatcher,
    LedgerCheckService,
    MonthRepository,
    MonthService,
  ],
  exports: [LedgerCheckService, ReconciliationService],
})
export class ReconciliationModule {}
