import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createTransport } from 'nodemailer';
import { describe, expect, it, onTestFinished } from 'vitest';
import { type MailSettings, type Message, type MessageSummary, type RunningMail, start } from './index.js';

function folder(): string {
  const path = mkdtempSync(join(tmpdir(), 'skyberth-mail-'));
  onTestFinished(() => rmSync(path, { recursive: true, force: true }));
  return path;
}

async function bench(
  given: Partial<MailSettings> = {},
): Promise<{ service: RunningMail; send: (message: object) => Promise<unknown> }> {
  const service = await start({ port: 0, smtpPort: 0, dataDir: folder(), ...given });
  onTestFinished(() => service.close());
  const transport = createTransport({ host: '127.0.0.1', port: service.smtpPort, secure: false, ignoreTLS: true });
  return {
    service,
    send: (message) => transport.sendMail({ from: 'harbour@skyberth.example', text: 'Hello', ...message }),
  };
}

async function listed(service: RunningMail, query = ''): Promise<MessageSummary[]> {
  const response = await fetch(`${service.url}/api/messages${query}`);
  return ((await response.json()) as { messages: MessageSummary[] }).messages;
}

const INVOICE = {
  to: 'Ops <ops@fjordsat.example>',
  bcc: 'books@fjordsat.example',
  subject: 'Invoice 7 — <b>paid</b>',
  text: 'Total 123,45 €',
  html: '<p onclick="x()">Total</p><script>alert(1)</script>',
  attachments: [{ filename: 'invoice 7.pdf', content: Buffer.from('%PDF-1.7 test'), contentType: 'application/pdf' }],
};

describe('the mail sink', () => {
  it('keeps what nodemailer sends, hidden copies and attachments included', async () => {
    const { service, send } = await bench();
    await send(INVOICE);
    const [summary] = await listed(service, '?to=OPS@fjordsat.example');
    expect(summary).toMatchObject({
      from: 'harbour@skyberth.example',
      subject: INVOICE.subject,
      to: ['ops@fjordsat.example', 'books@fjordsat.example'],
    });
    expect(summary?.attachments).toEqual([{ name: 'invoice 7.pdf', contentType: 'application/pdf', sizeBytes: 13 }]);
    const message = (await (await fetch(`${service.url}/api/messages/${summary?.id}`)).json()) as Message;
    expect(message.text.trim()).toBe(INVOICE.text);
    expect(message.headers.to).toContain('ops@fjordsat.example');
    const file = await fetch(`${service.url}/api/messages/${summary?.id}/attachments/0`);
    expect(file.headers.get('content-disposition')).toContain('attachment');
    expect(await file.text()).toBe('%PDF-1.7 test');
    expect(await listed(service, '?to=nobody@fjordsat.example')).toEqual([]);
  });

  it('shows a message so that nothing in it can run', async () => {
    const { service, send } = await bench();
    await send(INVOICE);
    const [summary] = await listed(service);
    expect(await (await fetch(service.url)).text()).toContain('Invoice 7 — &#60;b&#62;paid');
    const page = await (await fetch(`${service.url}/messages/${summary?.id}`)).text();
    expect(page).toContain('<iframe sandbox=""');
    expect(page).not.toContain('<script>');
    const frame = await fetch(`${service.url}/messages/${summary?.id}/html`);
    expect(frame.headers.get('content-security-policy')).toContain("sandbox; default-src 'none'");
    expect((await fetch(`${service.url}/messages/..%2F..%2Fetc`)).status).toBe(404);
  });

  it('lists the newest first, keeps no more than it should, and forgets on demand', async () => {
    const dataDir = folder();
    const { service, send } = await bench({ messagesMax: 2, dataDir });
    for (const subject of ['one', 'two', 'three']) await send({ to: 'a@b.example', subject });
    expect((await listed(service)).map(({ subject }) => subject)).toEqual(['three', 'two']);
    expect(readdirSync(dataDir)).toHaveLength(4);
    expect((await fetch(`${service.url}/api/messages?limit=0`)).status).toBe(400);
    await fetch(`${service.url}/api/messages`, { method: 'DELETE' });
    expect(await listed(service)).toEqual([]);
    expect(readdirSync(dataDir)).toEqual([]);
  });

  it('refuses what is too large and goes on', async () => {
    const { service, send } = await bench({ sizeMaxBytes: 20_000 });
    await expect(send({ to: 'a@b.example', subject: 'big', text: 'x'.repeat(40_000) })).rejects.toThrow();
    await send({ to: 'a@b.example', subject: 'small' });
    expect((await listed(service)).map(({ subject }) => subject)).toEqual(['small']);
  });

  it('still has the messages after a restart', async () => {
    const dataDir = folder();
    const first = await start({ port: 0, smtpPort: 0, dataDir });
    const transport = createTransport({ host: '127.0.0.1', port: first.smtpPort, ignoreTLS: true });
    await transport.sendMail({ from: 'a@b.example', to: 'c@d.example', subject: 'kept', text: 'x' });
    await first.close();
    const { service } = await bench({ dataDir });
    expect((await listed(service)).map(({ subject }) => subject)).toEqual(['kept']);
    expect(await (await fetch(`${service.url}/health`)).json()).toEqual({ status: 'ok' });
  });
});
