/** Double entry: every movement of money, tied to its cause, for ever. */
import { Module } from '@nestjs/common';
import { LedgerController } from './ledger.controller.js';
import { LedgerRepository } from './ledger.repository.js';
import { LedgerService } from './ledger.service.js';
import { LedgerCheckRepository } from './ledger-check.repository.js';
import { LedgerFiles } from './ledger-files.js';
import { LedgerReading } from './ledger-reading.service.js';

@Module({
  controllers: [LedgerController],
  providers: [LedgerRepository, LedgerCheckRepository, LedgerService, LedgerReading, LedgerFiles],
  exports: [LedgerService, LedgerRepository, LedgerCheckRepository],
})
export class LedgerModule {}
