/** The environment, read once and checked; a wrong value stops the start with a sentence. */
import { z } from 'zod';

const Port = z.coerce.number().int().min(0).max(65_535);

const Environment = z.object({
  PORT: Port.default(3000),
  HOST: z.string().default('127.0.0.1'),
  SKYBERTH_DATA_DIR: z.string().min(1).default('var'),
  SKYBERTH_PUBLIC_URL: z.url().optional(),
  SKYBERTH_WEB_DIR: z.string().optional(),
  /** At least 32 characters; access tokens are signed with it. */
  SKYBERTH_TOKEN_SECRET: z.string().min(32),
  PAYMENTS_URL: z.url(),
  /** What the buyer's browser and the API call; absent in production, where the SDK knows its own host. */
  STRIPE_SECRET_KEY: z.string().min(8),
  STRIPE_WEBHOOK_SECRET: z.string().min(8),
  SMTP_URL: z.url(),
  MAIL_FROM: z.string().default('Skyberth <harbour@skyberth.example>'),
  /** Health endpoints of the local stand-ins, separated by commas; empty in production. */
  STAND_IN_HEALTH_URLS: z.string().default(''),
  JOBS: z.enum(['on', 'off']).default('on'),
});

export interface Config {
  readonly port: number;
  readonly host: string;
  readonly dataDir: string;
  readonly databaseFile: string;
  readonly publicUrl: string;
  readonly webDir: string | undefined;
  readonly tokenSecret: string;
  readonly paymentsUrl: string;
  readonly stripeSecretKey: string;
  readonly stripeWebhookSecret: string;
  readonly smtpUrl: string;
  readonly mailFrom: string;
  readonly standInHealthUrls: readonly string[];
  readonly jobs: boolean;
}

/** Reads the settings; throws one error that lists every bad variable. */
export function readConfig(environment: Readonly<Record<string, string | undefined>>): Config {
  const parsed = Environment.safeParse(environment);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`The environment is not usable.\n${lines.join('\n')}`);
  }
  const env = parsed.data;
  return {
    port: env.PORT,
    host: env.HOST,
    dataDir: env.SKYBERTH_DATA_DIR,
    databaseFile: `${env.SKYBERTH_DATA_DIR}/skyberth.sqlite`,
    publicUrl: (env.SKYBERTH_PUBLIC_URL ?? `http://${env.HOST}:${env.PORT}`).replace(/\/$/, ''),
    webDir: env.SKYBERTH_WEB_DIR,
    tokenSecret: env.SKYBERTH_TOKEN_SECRET,
    paymentsUrl: env.PAYMENTS_URL,
    stripeSecretKey: env.STRIPE_SECRET_KEY,
    stripeWebhookSecret: env.STRIPE_WEBHOOK_SECRET,
    smtpUrl: env.SMTP_URL,
    mailFrom: env.MAIL_FROM,
    standInHealthUrls: env.STAND_IN_HEALTH_URLS.split(',')
      .map((url) => url.trim())
      .filter(Boolean),
    jobs: env.JOBS === 'on',
  };
}

export const CONFIG = Symbol('Config');
