/** The way mail leaves: one message, delivered to the mail server or refused with an error. */
export interface MailMessage {
  /** The same for every attempt at the same mail, so that a mailbox can tell a repeat. */
  readonly messageId: string;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html?: string | undefined;
  readonly attachments: readonly MailFile[];
}

export interface MailFile {
  readonly fileName: string;
  readonly contentType: string;
  readonly content: Buffer;
}

export interface MailPort {
  /** Throws `PermanentFailure` where the mail server refuses this message for good, any other error otherwise. */
  send(message: MailMessage): Promise<void>;
}
export const MAIL_PORT = Symbol('MailPort');
