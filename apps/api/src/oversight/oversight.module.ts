/** What admins watch over: the standing of accounts and the audit trail. */
import { Module } from '@nestjs/common';
import { AccountsModule } from '../accounts/accounts.module.js';
import { MailModule } from '../mail/mail.module.js';
import { OversightController } from './oversight.controller.js';
import { OversightRepository } from './oversight.repository.js';
import { OversightService } from './oversight.service.js';

@Module({
  imports: [AccountsModule, MailModule],
  controllers: [OversightController],
  providers: [OversightRepository, OversightService],
})
export class OversightModule {}
