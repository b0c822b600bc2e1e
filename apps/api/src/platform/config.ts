/** The environment, read once and checked; a wrong value stops the start with a sentence. */

import { availableParallelism } from 'node:os';
import { Country, Email, type PostalAddress } from '@skyberth/shared';
import { z } from 'zod';

/** Each worker holds a cache of passes of up to a hundred megabytes or so. */
const MOST_WORKERS_UNASKED = 4;

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
  /** A list of element sets to keep known spacecraft up to date with; none by default. */
  ELEMENT_FEED_URL: z.url().optional(),
  JOBS: z.enum(['on', 'off']).default('on'),
  /** Threads that compute passes; 0 computes them in this process, which then answers nobody meanwhile. */
  PASS_WORKERS: z.coerce.number().int().min(0).max(32).optional(),
  /** The first staff: invited when they are not there yet. */
  SKYBERTH_ADMIN_EMAIL: Email.optional(),
  SKYBERTH_FINANCE_EMAIL: Email.optional(),
  /** Who sells: printed on every invoice. The defaults are invented. */
  MARKETPLACE_NAME: z.string().min(1).default('Skyberth Harbour Office Oy'),
  MARKETPLACE_LINE1: z.string().min(1).default('Pilot Quay 4'),
  MARKETPLACE_POSTAL_CODE: z.string().default('00990'),
  MARKETPLACE_CITY: z.string().min(1).default('Helsinki'),
  MARKETPLACE_COUNTRY: Country.default('FI'),
  MARKETPLACE_VAT_NUMBER: z.string().default('FI12345671'),
  /** The marketplace's share of a contact, in hundredths of a per cent of its net price. */
  MARKETPLACE_FEE_BASIS_POINTS: z.coerce.number().int().min(0).max(5_000).default(800),
  MARKETPLACE_BILLING_EMAIL: Email.default('billing@skyberth.example'),
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
  readonly elementFeedUrl: string | undefined;
  readonly jobs: boolean;
  readonly passWorkers: number;
  /** Staff who are invited at the first start. */
  readonly firstStaff: readonly { readonly email: string; readonly role: 'admin' | 'finance' }[];
  readonly marketplace: Marketplace;
}

/** The organisation that runs the marketplace, as invoices name it. */
export interface Marketplace {
  readonly name: string;
  readonly address: PostalAddress;
  readonly vatNumber: string | null;
  readonly billingEmail: string;
  readonly feeBasisPoints: number;
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
    elementFeedUrl: env.ELEMENT_FEED_URL,
    jobs: env.JOBS === 'on',
    passWorkers: env.PASS_WORKERS ?? Math.min(MOST_WORKERS_UNASKED, availableParallelism()),
    firstStaff: [
      ...(env.SKYBERTH_ADMIN_EMAIL ? [{ email: env.SKYBERTH_ADMIN_EMAIL, role: 'admin' as const }] : []),
      ...(env.SKYBERTH_FINANCE_EMAIL ? [{ email: env.SKYBERTH_FINANCE_EMAIL, role: 'finance' as const }] : []),
    ],
    marketplace: marketplaceOf(env),
  };
}

function marketplaceOf(env: z.infer<typeof Environment>): Marketplace {
  return {
    name: env.MARKETPLACE_NAME,
    address: {
      line1: env.MARKETPLACE_LINE1,
      line2: '',
      postalCode: env.MARKETPLACE_POSTAL_CODE,
      city: env.MARKETPLACE_CITY,
      country: env.MARKETPLACE_COUNTRY,
    },
    vatNumber: env.MARKETPLACE_VAT_NUMBER || null,
    billingEmail: env.MARKETPLACE_BILLING_EMAIL,
    feeBasisPoints: env.MARKETPLACE_FEE_BASIS_POINTS,
  };
}

export const CONFIG = Symbol('Config');
