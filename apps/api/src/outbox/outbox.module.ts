/** What must leave the process: written with the change that causes it, carried out afterwards, nothing lost. */
import { Global, Module } from '@nestjs/common';
import { JobsModule } from '../jobs/jobs.module.js';
import { OutboxRepository } from './outbox.repository.js';
import { OutboxRunner } from './outbox.runner.js';
import { OutboxService } from './outbox.service.js';

@Global()
@Module({
  imports: [JobsModule],
  providers: [OutboxRepository, OutboxService, OutboxRunner],
  exports: [OutboxRepository, OutboxService, OutboxRunner],
})
export class OutboxModule {}
