/** Queues mail with the change that causes it, and sends what is queued. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import { z } from 'zod';
import { OutboxRunner } from '../outbox/outbox.runner.js';
import { OutboxService } from '../outbox/outbox.service.js';
import { CONFIG, type Config } from '../platform/config.js';
import type { Db } from '../platform/transaction.js';
import { MAIL_PORT, type MailPort } from './mail.port.js';
import { MailAttachments } from './mail-attachments.js';

const Queued = z.object({
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  html: z.string().optional(),
  attachments: z
    .array(
      z.object({
        fileName: z.string(),
        contentType: z.string(),
        ref: z.object({ kind: z.string(), id: z.string() }),
      }),
    )
    .default([]),
});
export type MailDraft = z.input<typeof Queued>;

const KIND = 'mail';

@Injectable()
export class MailService implements OnModuleInit {
  constructor(
    private readonly outbox: OutboxService,
    private readonly runner: OutboxRunner,
    private readonly attachments: MailAttachments,
    @Inject(MAIL_PORT) private readonly port: MailPort,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  /** A mail may hold a link that signs someone in; once it has left, only its envelope is kept. */
  onModuleInit(): void {
    this.runner.register(KIND, (payload, context) => this.send(payload, context.id), {
      keepWhenDone: (payload) => {
        const { to, subject } = Queued.parse(payload);
        return { to, subject };
      },
    });
  }

  /** Must be called inside the write transaction of the change that causes the mail. */
  queue(tx: Db, mail: MailDraft & { readonly dedupeKey: string }): void {
    const { dedupeKey, ...draft } = mail;
    this.outbox.enqueue(tx, { kind: KIND, dedupeKey: `${KIND}:${dedupeKey}`, payload: draft });
  }

  private async send(payload: unknown, id: string): Promise<void> {
    const mail = Queued.parse(payload);
    const files = [];
    for (const { fileName, contentType, ref } of mail.attachments) {
      files.push({ fileName, contentType, content: await this.attachments.resolve(ref) });
    }
    await this.port.send({ ...mail, messageId: `<${id}@${this.mailDomain()}>`, attachments: files });
  }

  private mailDomain(): string {
    return /@([A-Za-z0-9.-]+)/.exec(this.config.mailFrom)?.[1] ?? 'skyberth.example';
  }
}
