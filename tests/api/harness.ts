/**
 * Starts the real server on a port of its own, with a real mail server and a clock that is moved by hand, for tests that
 * speak HTTP with it. Nothing is shared between two of them.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { AdjustableClock, createApp, JobsService, OutboxRunner, readConfig } from '@skyberth/api';
import { routes } from '@skyberth/shared';
import { type Answer, type CallInput, Client } from './harness/client.js';
import { type MailBox, startMailBox } from './harness/mail-box.js';
import { People, type Person } from './harness/people.js';

export { must } from './harness/client.js';
export type { Answer, Client, MailBox, Person };

export interface Skyberth {
  readonly url: string;
  readonly clock: AdjustableClock;
  readonly mail: MailBox;
  readonly people: People;
  /** For what no route shows: the injector of the running application. */
  readonly app: Awaited<ReturnType<typeof createApp>>;
  readonly databaseFile: string;
  /** Calls a route; `as` brings the cookies of a person, without it nobody is signed in. */
  readonly call: Client['call'];
  /** Carries out everything in the outbox that is due: mails, payment calls. */
  drain(): Promise<void>;
  /** One turn of every job, and what becomes due by it. */
  runJobs(): Promise<void>;
  stop(): Promise<void>;
}

export interface Options {
  /** More variables of the environment, such as PAYMENTS_URL of a payment service that the test has started. */
  readonly environment?: Readonly<Record<string, string>>;
  /** Where the data are, for a test that starts a second server on the same ones; the starter then removes them. */
  readonly dataDir?: string;
}

const ADMIN_EMAIL = 'admin@skyberth.example';
const FINANCE_EMAIL = 'finance@skyberth.example';

/** Starts one. Call `stop()` afterwards; it also removes the data. */
export async function startSkyberth(options: Options = {}): Promise<Skyberth> {
  const dataDir = options.dataDir ?? mkdtempSync(join(tmpdir(), 'skyberth-test-'));
  const mail = await startMailBox();
  const config = readConfig({
    PORT: '0',
    SKYBERTH_DATA_DIR: dataDir,
    SKYBERTH_TOKEN_SECRET: 'a secret for tests only, thirty-two characters',
    PAYMENTS_URL: 'http://127.0.0.1:9',
    STRIPE_SECRET_KEY: 'sk_test_harness',
    STRIPE_WEBHOOK_SECRET: 'whsec_harness',
    SMTP_URL: mail.url,
    JOBS: 'off',
    PASS_WORKERS: '0',
    SKYBERTH_ADMIN_EMAIL: ADMIN_EMAIL,
    SKYBERTH_FINANCE_EMAIL: FINANCE_EMAIL,
    ...options.environment,
  });
  const clock = new AdjustableClock();
  const app = await createApp(config, { clock, quiet: true });
  await app.listen(config.port, config.host);
  // A busy test leaves connections idle for longer than the usual five seconds, and then uses them again.
  app.getHttpServer().keepAliveTimeout = 60_000;
  const url = `http://127.0.0.1:${(app.getHttpServer().address() as AddressInfo).port}`;
  const client = new Client(url);
  const drain = () => app.get(OutboxRunner, { strict: false }).drain();
  const people = new People(client, mail, drain, { admin: ADMIN_EMAIL, finance: FINANCE_EMAIL });
  return {
    url,
    clock,
    mail,
    people,
    app,
    databaseFile: config.databaseFile,
    call: client.call.bind(client),
    drain,
    runJobs: async () => {
      await app.get(JobsService, { strict: false }).runAll();
      await drain();
    },
    stop: async () => {
      await app.close();
      await mail.stop();
      if (options.dataDir === undefined) rmSync(dataDir, { recursive: true, force: true });
    },
  };
}

export { type CallInput, routes };
