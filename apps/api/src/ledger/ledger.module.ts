/** Double entry: every movement of money, tied to its cause, for ever. */
import { Module } from '@nestjs/common';
import { JobsModule } from '../jobs/jobs.module.js';
import { LedgerController } from './ledger.controller.js';
import { LedgerRepository } from './ledger.repository.js';
import { LedgerService } from './ledger.service.js';

@Module({
  imports: [JobsModule],
  controllers: [LedgerController],
  providers: [LedgerRepository, LedgerService],
  exports: [LedgerService],
})
export class LedgerModule {}
