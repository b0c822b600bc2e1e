import { DEFAULT_SETTINGS } from './core/settings.js';
import { start } from './index.js';

/** One number from the environment, or the default. */
function numberFrom(name: string, fallback: number): number {
  const text = process.env[name];
  if (text === undefined || text === '') return fallback;
  const value = Number(text);
  if (!Number.isInteger(value) || value < 0) throw new Error(`${name} must be a whole number >= 0, not "${text}"`);
  return value;
}

const webhookUrl = process.env.PAYMENTS_WEBHOOK_URL;
const webhookSecret = process.env.PAYMENTS_WEBHOOK_SECRET;

const service = await start({
  port: numberFrom('PAYMENTS_PORT', 4242),
  dataDir: process.env.PAYMENTS_DATA_DIR ?? 'var/payments',
  secretKey: process.env.PAYMENTS_SECRET_KEY ?? DEFAULT_SETTINGS.secretKey,
  publishableKey: process.env.PAYMENTS_PUBLISHABLE_KEY ?? DEFAULT_SETTINGS.publishableKey,
  settlementDays: numberFrom('PAYMENTS_SETTLEMENT_DAYS', DEFAULT_SETTINGS.settlementDays),
  trustedHosts: (process.env.PAYMENTS_TRUSTED_HOSTS ?? '').split(',').filter((host) => host !== ''),
  webhook: webhookUrl && webhookSecret ? { url: webhookUrl, secret: webhookSecret } : undefined,
});
console.log(`Local payment service (no real money) at ${service.url}`);

let stopping = false;
for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.on(signal, () => {
    if (stopping) return;
    stopping = true;
    service.close().then(
      () => process.exit(0),
      (error: unknown) => {
        console.error(error);
        process.exit(1);
      },
    );
  });
}
