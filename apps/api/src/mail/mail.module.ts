/** Mail to people: queued with its cause, sent through the port. */
import { Global, Module } from '@nestjs/common';
import { NodemailerAdapter } from '../adapters/mail/nodemailer.adapter.js';
import { OutboxModule } from '../outbox/outbox.module.js';
import { MAIL_PORT } from './mail.port.js';
import { MailService } from './mail.service.js';
import { MailAttachments } from './mail-attachments.js';

@Global()
@Module({
  imports: [OutboxModule],
  providers: [MailService, MailAttachments, { provide: MAIL_PORT, useClass: NodemailerAdapter }],
  exports: [MailService, MailAttachments],
})
export class MailModule {}
