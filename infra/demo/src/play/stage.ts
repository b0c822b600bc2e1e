/** The stage of the play: the real server and the local stand-ins in this process, on a clock that the play moves. */
import { setTimeout as pause } from 'node:timers/promises';
import { AdjustableClock, createApp, DATABASE, JobsService, OutboxRunner, readConfig } from '@skyberth/api';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { start as startMail } from '@skyberth/mail-standin';
import { start as startPayments } from '@skyberth/payments-standin';
import { type Call, clientOf } from './client.js';

export interface StageSettings {
  readonly environment: Readonly<Record<string, string | undefined>>;
  readonly startMs: number;
}

export class Stage {
  private constructor(
    readonly call: Call,
    readonly paymentsUrl: string,
    private readonly clock: AdjustableClock,
    private readonly mailUrl: string,
    private readonly outbox: OutboxRunner,
    private readonly jobs: JobsService,
    private readonly closers: readonly (() => Promise<unknown>)[],
  ) {}

  static async open({ environment, startMs }: StageSettings): Promise<Stage> {
    const need = (name: string): string => {
      const value = environment[name];
      if (!value) throw new Error(`${name} is not set; the demo is loaded by npm start.`);
      return value;
    };
    const payments = await startPayments({
      port: Number(need('PAYMENTS_PORT')),
      dataDir: need('PAYMENTS_DATA_DIR'),
      secretKey: need('PAYMENTS_SECRET_KEY'),
      publishableKey: need('PAYMENTS_PUBLISHABLE_KEY'),
      webhook: { url: need('PAYMENTS_WEBHOOK_URL'), secret: need('PAYMENTS_WEBHOOK_SECRET') },
      startOffsetMs: startMs - Date.now(),
    });
    const mail = await startMail({
      port: Number(need('MAIL_PORT')),
      smtpPort: Number(need('SMTP_PORT')),
      dataDir: need('MAIL_DATA_DIR'),
    });
    const clock = new AdjustableClock();
    clock.set(startMs);
    const config = readConfig({
      ...environment,
      JOBS: 'off',
      ELEMENT_FEED_URL: undefined,
      PASS_WORKERS: '0',
      SKYBERTH_ADMIN_EMAIL: STAFF.admin,
      SKYBERTH_FINANCE_EMAIL: STAFF.finance,
    });
    const app = await createApp(config, { clock, quiet: true });
    // A load that is interrupted begins again from nothing, so nothing has to survive a power cut yet.
    app.get<SkyberthDatabase>(DATABASE, { strict: false }).$client.pragma('synchronous = OFF');
    await app.listen(config.port, config.host);
    return new Stage(
      clientOf(`http://${config.host}:${config.port}`),
      payments.url,
      clock,
      mail.url,
      app.get(OutboxRunner, { strict: false }),
      app.get(JobsService, { strict: false }),
      [() => app.close(), () => payments.close(), () => mail.close()],
    );
  }

  nowMs(): number {
    return this.clock.nowMs();
  }

  /** Moves both clocks forward to `timeMs`, then does what has become due. Time never runs back. */
  async moveTo(timeMs: number): Promise<void> {
    const byMs = Math.round(timeMs - this.clock.nowMs());
    if (byMs > 0) {
      this.clock.advance(byMs);
      await this.hook('clock', { advanceMs: byMs });
    }
    await this.settle();
  }

  /** Jobs, outbox and the provider's events, until nothing is due. */
  async settle(): Promise<void> {
    await this.jobs.runAll();
    for (let round = 0; round < 3; round += 1) {
      await this.outbox.drain();
      await this.hook('deliveries/settle', {});
    }
  }

  /** Puts both clocks on the machine's own time, the last step of the play. */
  async returnToPresent(): Promise<void> {
    await this.moveTo(Date.now());
    this.clock.set(Date.now());
  }

  async hook(path: string, body: object): Promise<void> {
    const answer = await fetch(`${this.paymentsUrl}/_test/${path}`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify(body),
    });
    if (!answer.ok) throw new Error(`The payment stand-in refused ${path}: ${await answer.text()}`);
  }

  /** The token of the newest mail to `address`. */
  async mailedToken(address: string): Promise<string> {
    for (let attempt = 0; attempt < 20; attempt += 1) {
      await this.outbox.drain();
      const list = (await (await fetch(`${this.mailUrl}/api/messages?to=${encodeURIComponent(address)}`)).json()) as {
        messages: { id: string }[];
      };
      for (const { id } of list.messages) {
        const message = (await (await fetch(`${this.mailUrl}/api/messages/${id}`)).json()) as { text?: string | null };
        const token = /[?&]token=([\w-]+)/.exec(message.text ?? '')?.[1];
        if (token) return token;
      }
      await pause(50);
    }
    throw new Error(`No mail with a link came to ${address}.`);
  }

  async close(): Promise<void> {
    for (const close of this.closers) await close();
  }
}

export const STAFF = {
  admin: 'ruth@skyberth.example',
  finance: 'ansel@skyberth.example',
  secondFinance: 'noor@skyberth.example',
} as const;
