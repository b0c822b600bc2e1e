/** Starts the server with the local stand-ins around it, for `npm start`, `npm run dev` and the browser tests. */
import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { freePort, ROOT, startNode, stopAll, waitFor } from './toolbox.mjs';

const script = (room) => join(ROOT, room, 'dist/main.js');

/** Keys of this installation, made once and kept readable by its owner only. */
function secretsIn(dataDir) {
  const file = join(dataDir, 'secrets.json');
  if (existsSync(file)) return JSON.parse(readFileSync(file, 'utf8'));
  const secret = () => randomBytes(32).toString('hex');
  const made = {
    tokenSecret: secret(),
    paymentKey: `sk_test_${secret()}`,
    paymentPublicKey: `pk_test_${secret()}`,
    webhookSecret: `whsec_${secret()}`,
  };
  writeFileSync(file, JSON.stringify(made, null, 2), { mode: 0o600 });
  return made;
}

/** Settings that the server and the demo loader share. */
export function serverEnvironment({ dataDir, port, payments, smtpPort, mailPort, elementsPort, secrets }) {
  return {
    PORT: String(port),
    SKYBERTH_DATA_DIR: dataDir,
    SKYBERTH_WEB_DIR: join(ROOT, 'apps/web/dist'),
    SKYBERTH_TOKEN_SECRET: secrets.tokenSecret,
    PAYMENTS_URL: `http://127.0.0.1:${payments}`,
    STRIPE_SECRET_KEY: secrets.paymentKey,
    STRIPE_WEBHOOK_SECRET: secrets.webhookSecret,
    SMTP_URL: `smtp://127.0.0.1:${smtpPort}`,
    ELEMENT_FEED_URL: `http://127.0.0.1:${elementsPort}/elements/omm.json`,
    STAND_IN_HEALTH_URLS: [payments, mailPort, elementsPort].map((one) => `http://127.0.0.1:${one}/health`).join(','),
  };
}

/**
 * Starts everything and waits until it is healthy. Throws when a part ends early.
 * `api: false` leaves the server to the caller (hot reload) and returns its environment.
 */
export async function startStack({ port, dataDir: given, api = true, demo = true, log = () => {} }) {
  const dataDir = resolve(ROOT, given);
  mkdirSync(dataDir, { recursive: true });
  const secrets = secretsIn(dataDir);
  const [payments, smtpPort, mailPort, elementsPort] = [
    await freePort(),
    await freePort(),
    await freePort(),
    await freePort(),
  ];
  const children = [];
  const environment = serverEnvironment({ dataDir, port, payments, smtpPort, mailPort, elementsPort, secrets });
  const standIns = {
    PAYMENTS_PORT: String(payments),
    PAYMENTS_DATA_DIR: join(dataDir, 'payments'),
    PAYMENTS_SECRET_KEY: secrets.paymentKey,
    PAYMENTS_PUBLISHABLE_KEY: secrets.paymentPublicKey,
    PAYMENTS_WEBHOOK_URL: `http://127.0.0.1:${port}/api/payments/events`,
    PAYMENTS_WEBHOOK_SECRET: secrets.webhookSecret,
    SMTP_PORT: String(smtpPort),
    MAIL_PORT: String(mailPort),
    MAIL_DATA_DIR: join(dataDir, 'mail'),
    ELEMENTS_PORT: String(elementsPort),
    ELEMENTS_DATA_DIR: join(dataDir, 'elements'),
  };
  keepFeedFile(standIns.ELEMENTS_DATA_DIR);
  const stop = () => stopAll(children);
  try {
    if (demo && !existsSync(join(dataDir, 'demo-loaded.json'))) await loadDemo({ dataDir, environment, standIns, log });
    const parts = [
      ['payments', 'infra/payments', payments],
      ['mail', 'infra/mail', mailPort],
      ['elements', 'infra/elements', elementsPort],
    ];
    for (const [name, room] of parts) children.push(startNode(name, script(room), standIns, { quiet: true }));
    await Promise.all(
      parts.map(([, , at], index) => waitFor(`http://127.0.0.1:${at}/health`, children[index], 20_000)),
    );
    if (api) {
      const server = startNode('skyberth', script('apps/api'), environment, { quiet: true });
      children.push(server);
      await waitFor(`http://127.0.0.1:${port}/api/health`, server, 30_000);
    }
  } catch (error) {
    await stop();
    throw error;
  }
  const address = (at) => `http://127.0.0.1:${at}`;
  return {
    children,
    environment,
    stop,
    urls: { app: address(port), payments: address(payments), mail: address(mailPort), elements: address(elementsPort) },
  };
}

/** The element feed serves what stands in its file; without the demo that is nothing yet. */
function keepFeedFile(folder) {
  mkdirSync(folder, { recursive: true });
  const file = join(folder, 'elements.json');
  if (!existsSync(file)) writeFileSync(file, '[]');
}

/** Plays the invented scenario into the empty data folder; interrupted, it begins again from nothing. */
async function loadDemo({ environment, standIns, log }) {
  log('Loading the demo scenario (the first time only) ...');
  const child = startNode('demo', script('infra/demo'), { ...environment, ...standIns }, { quiet: false });
  const code = await new Promise((done) => child.once('exit', (status) => done(status ?? 1)));
  if (code !== 0) throw new Error('The demo scenario could not be loaded; what went wrong stands above.');
}

/** The sign-ins that the demo made, as it wrote them down. */
export function demoSignIns(dataDir) {
  const file = join(resolve(ROOT, dataDir), 'demo-loaded.json');
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')).signIns : [];
}
