/** Mail over SMTP. */
import { Inject, Injectable, type OnApplicationShutdown } from '@nestjs/common';
import { createTransport } from 'nodemailer';
import type { MailMessage, MailPort } from '../../mail/mail.port.js';
import { PermanentFailure } from '../../outbox/permanent-failure.js';
import { CONFIG, type Config } from '../../platform/config.js';

const CONNECT_WITHIN_MS = 10_000;
const ANSWER_WITHIN_MS = 20_000;

@Injectable()
export class NodemailerAdapter implements MailPort, OnApplicationShutdown {
  private readonly transport;

  constructor(@Inject(CONFIG) private readonly config: Config) {
    this.transport = createTransport({
      url: config.smtpUrl,
      pool: true,
      maxConnections: 2,
      connectionTimeout: CONNECT_WITHIN_MS,
      greetingTimeout: CONNECT_WITHIN_MS,
      socketTimeout: ANSWER_WITHIN_MS,
      disableFileAccess: true,
      disableUrlAccess: true,
    });
  }

  async send(message: MailMessage): Promise<void> {
    try {
      await this.transport.sendMail({
        from: this.config.mailFrom,
        to: { name: '', address: message.to },
        subject: message.subject,
        text: message.text,
        ...(message.html === undefined ? {} : { html: message.html }),
        messageId: message.messageId,
        attachments: message.attachments.map(({ fileName, contentType, content }) => ({
          filename: fileName,
          contentType,
          content,
        })),
      });
    } catch (error) {
      throw isFinal(error) ? new PermanentFailure((error as Error).message) : error;
    }
  }

  onApplicationShutdown(): void {
    this.transport.close();
  }
}

/**
 * RFC 5321 4.2.1: a 5yz reply means that the same command will be refused again. Only replies to the envelope and the
 * message count: a refused password is our own setting, and the mail must wait until it is mended.
 */
function isFinal(error: unknown): boolean {
  const { code, responseCode } = (error ?? {}) as { code?: unknown; responseCode?: unknown };
  const aboutThisMail = code === 'EENVELOPE' || code === 'EMESSAGE';
  return aboutThisMail && typeof responseCode === 'number' && responseCode >= 500 && responseCode < 600;
}
