import { randomUUID } from 'node:crypto';
import { mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { type AddressObject, type ParsedMail, simpleParser } from 'mailparser';

export interface AttachmentInfo {
  name: string;
  contentType: string;
  sizeBytes: number;
}

export interface MessageSummary {
  id: string;
  receivedMs: number;
  /** Envelope addresses: who it was really handed to, hidden copies included. */
  from: string;
  to: string[];
  subject: string;
  attachments: AttachmentInfo[];
}

export interface Message extends MessageSummary {
  text: string;
  html: string | null;
  headers: { from: string; to: string; cc: string };
  /** Contents in the order of `attachments`. */
  contents: Buffer[];
}

interface Envelope {
  from: string;
  to: string[];
}

const ID = /^\d{15}-[0-9a-f-]{36}$/;

/** Messages as files: `<id>.eml` as it came, `<id>.json` with the summary. The oldest go when there are too many. */
export class MessageStore {
  readonly #summaries: MessageSummary[] = [];
  #lastMs = 0;

  constructor(
    private readonly dataDir: string,
    private readonly messagesMax: number,
  ) {
    mkdirSync(dataDir, { recursive: true });
    for (const name of readdirSync(dataDir).sort()) {
      if (name.endsWith('.json'))
        this.#summaries.push(JSON.parse(readFileSync(join(dataDir, name), 'utf8')) as MessageSummary);
    }
    this.#lastMs = this.#summaries.at(-1)?.receivedMs ?? 0;
  }

  async add(envelope: Envelope, raw: Buffer): Promise<MessageSummary> {
    const parsed = await simpleParser(raw);
    // Ids sort in order of arrival, even when two messages come within a millisecond.
    this.#lastMs = Math.max(Date.now(), this.#lastMs + 1);
    const summary: MessageSummary = {
      id: `${String(this.#lastMs).padStart(15, '0')}-${randomUUID()}`,
      receivedMs: this.#lastMs,
      from: envelope.from,
      to: envelope.to,
      subject: parsed.subject ?? '',
      attachments: parsed.attachments.map(({ filename, contentType, size }) => ({
        name: filename ?? 'attachment',
        contentType,
        sizeBytes: size,
      })),
    };
    writeFileSync(this.#path(summary.id, 'eml'), raw);
    // The summary makes the message count, so it comes last and in one step.
    writeFileSync(this.#path(summary.id, 'part'), JSON.stringify(summary));
    renameSync(this.#path(summary.id, 'part'), this.#path(summary.id, 'json'));
    this.#summaries.push(summary);
    while (this.#summaries.length > this.messagesMax) this.#remove(this.#summaries.shift());
    return summary;
  }

  /** Newest first; `to` is compared without regard to case. */
  list(filter: { to?: string | undefined; limit: number }): MessageSummary[] {
    const wanted = filter.to?.toLowerCase();
    const found = this.#summaries.filter(
      ({ to }) => wanted === undefined || to.some((address) => address.toLowerCase() === wanted),
    );
    return found.reverse().slice(0, filter.limit);
  }

  async read(id: string): Promise<Message | undefined> {
    const summary = ID.test(id) ? this.#summaries.find((candidate) => candidate.id === id) : undefined;
    if (!summary) return undefined;
    const parsed = await simpleParser(readFileSync(this.#path(id, 'eml')));
    return {
      ...summary,
      text: parsed.text ?? '',
      html: typeof parsed.html === 'string' ? parsed.html : null,
      headers: { from: addresses(parsed, 'from'), to: addresses(parsed, 'to'), cc: addresses(parsed, 'cc') },
      contents: parsed.attachments.map(({ content }) => content),
    };
  }

  clear(): void {
    for (const summary of this.#summaries.splice(0)) this.#remove(summary);
  }

  #remove(summary: MessageSummary | undefined): void {
    if (!summary) return;
    rmSync(this.#path(summary.id, 'json'), { force: true });
    rmSync(this.#path(summary.id, 'eml'), { force: true });
  }

  #path(id: string, ending: 'eml' | 'json' | 'part'): string {
    return join(this.dataDir, `${id}.${ending}`);
  }
}

function addresses(mail: ParsedMail, field: 'from' | 'to' | 'cc'): string {
  const value: AddressObject | AddressObject[] | undefined = mail[field];
  if (!value) return '';
  return (Array.isArray(value) ? value : [value]).map(({ text }) => text).join(', ');
}
