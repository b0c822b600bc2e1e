/** Reads what the product has sent, from the local mail service's own interface. */
import { vi } from 'vitest';
import { z } from 'zod';
import { PATIENCE_MS } from './browser.js';

const Listed = z.object({
  messages: z.array(
    z.object({
      id: z.string(),
      to: z.array(z.string()),
      subject: z.string(),
      attachments: z.array(z.object({ name: z.string(), contentType: z.string() })),
    }),
  ),
});
const Whole = z.object({ text: z.string() });

export interface Letter {
  readonly subject: string;
  readonly text: string;
  readonly attachments: readonly { readonly name: string; readonly contentType: string }[];
  /** The bytes of an attachment, by its place. */
  readonly attachment: (index: number) => Promise<Buffer>;
}

export class MailDesk {
  constructor(private readonly url: string) {}

  /** The newest mail to an address whose subject fits; waits until it has come. */
  async letterTo(email: string, subject: RegExp): Promise<Letter> {
    const found = await vi.waitFor(
      async () => {
        const { messages } = Listed.parse(await this.read(`/api/messages?to=${encodeURIComponent(email)}`));
        const fitting = messages.find((one) => subject.test(one.subject));
        if (fitting) return fitting;
        const subjects = messages.map((one) => one.subject).join(' | ') || 'nothing';
        throw new Error(`No mail to ${email} has the subject ${subject}. There is: ${subjects}.`);
      },
      { timeout: PATIENCE_MS, interval: 200 },
    );
    const { text } = Whole.parse(await this.read(`/api/messages/${found.id}`));
    return {
      subject: found.subject,
      text,
      attachments: found.attachments,
      attachment: async (index) => {
        const answer = await fetch(`${this.url}/api/messages/${found.id}/attachments/${index}`);
        return Buffer.from(await answer.arrayBuffer());
      },
    };
  }

  /** Subjects of everything that has come to an address, newest first. */
  async subjectsTo(email: string): Promise<string[]> {
    const { messages } = Listed.parse(await this.read(`/api/messages?to=${encodeURIComponent(email)}`));
    return messages.map((one) => one.subject);
  }

  /** The link in the newest invitation. */
  async linkFor(email: string): Promise<string> {
    const { text } = await this.letterTo(email, /invites you/);
    const link = /https?:\/\/\S+token=[\w-]+/.exec(text)?.[0];
    if (!link) throw new Error(`The invitation to ${email} has no link: ${text}`);
    return link;
  }

  private async read(path: string): Promise<unknown> {
    const answer = await fetch(`${this.url}${path}`);
    if (!answer.ok) throw new Error(`The mail service answered ${answer.status} to ${path}.`);
    return answer.json();
  }
}
