/**
 * The local payment service of a test, and the wire between it and the server: by itself the wire passes every event on, but
 * a test can keep events back, and send them again, late, or in another order.
 */
import { createServer, type IncomingHttpHeaders } from 'node:http';
import type { AddressInfo } from 'node:net';
import { type RunningPayments, start } from '@skyberth/payments-standin';
import Stripe from 'stripe';
import type { Skyberth } from '../harness.js';

export interface Delivery {
  readonly type: string;
  readonly body: string;
  readonly signature: string;
}

export interface Payments {
  readonly url: string;
  /** The provider's own SDK with the secret key, to look at what it holds. */
  readonly stripe: Stripe;
  /** For the server's environment. */
  readonly environment: Readonly<Record<string, string>>;
  /** Everything that was sent, whether it was passed on or not. */
  readonly sent: readonly Delivery[];
  /** Where events go from now on. */
  connect(skyberth: Skyberth): void;
  /** Events of these types are kept back (answered as taken); none: everything passes. */
  keepBack(...types: string[]): void;
  /** Brings one event to the server; answers its status. */
  deliver(delivery: Delivery): Promise<number>;
  /** What a buyer does on the provider's page: `pm_card_visa` and the like. Answers where the browser is sent. */
  payOnPage(pageUrl: string, card: string): Promise<{ status: number; location: string | null; text: string }>;
  /** Answers the bank's question. */
  answerBank(confirmUrl: string, answer: 'approve' | 'refuse'): Promise<void>;
  /** A hook of the stand-in's own, see its README. */
  hook(path: string, body?: object): Promise<void>;
  settled(): Promise<void>;
  stop(): Promise<void>;
}

const WEBHOOK_SECRET = 'whsec_of_the_tests_0123456789';
const SECRET_KEY = 'sk_test_skyberth_local';
/** Events are sent again after so long; a test that needs a repeat sends it itself. */
const RETRY_MS = 50;

export async function startPayments(): Promise<Payments> {
  const sent: Delivery[] = [];
  let target: string | null = null;
  let kept: readonly string[] = [];
  const post = async (delivery: Delivery): Promise<number> => {
    if (target === null) throw new Error('No server is connected.');
    const headers = { 'content-type': 'application/json', 'stripe-signature': delivery.signature };
    return (await fetch(target, { method: 'POST', body: delivery.body, headers })).status;
  };
  const wire = createServer((request, response) => {
    const chunks: Buffer[] = [];
    request.on('data', (chunk: Buffer) => chunks.push(chunk));
    request.on('end', () => {
      const delivery = deliveryOf(Buffer.concat(chunks).toString('utf8'), request.headers);
      sent.push(delivery);
      if (kept.includes(delivery.type)) response.end();
      else {
        post(delivery).then(
          (status) => response.writeHead(status).end(),
          () => response.destroy(),
        );
      }
    });
  });
  await new Promise<void>((resolve) => wire.listen(0, '127.0.0.1', resolve));
  const wireUrl = `http://127.0.0.1:${(wire.address() as AddressInfo).port}/`;
  const service: RunningPayments = await start({
    webhook: { url: wireUrl, secret: WEBHOOK_SECRET },
    retryDelaysMs: [RETRY_MS, RETRY_MS],
    slowAnswerMs: 15_000,
  });
  const { hostname, port } = new URL(service.url);
  return {
    url: service.url,
    stripe: new Stripe(SECRET_KEY, { host: hostname, port, protocol: 'http', telemetry: false }),
    environment: {
      PAYMENTS_URL: service.url,
      STRIPE_SECRET_KEY: SECRET_KEY,
      STRIPE_WEBHOOK_SECRET: WEBHOOK_SECRET,
    },
    sent,
    connect: (skyberth) => {
      target = `${skyberth.url}/api/payments/events`;
    },
    keepBack: (...types) => {
      kept = types;
    },
    deliver: post,
    payOnPage: async (pageUrl, card) => {
      const body = new URLSearchParams({ token: card });
      const response = await fetch(pageUrl, { method: 'POST', body, redirect: 'manual' });
      return { status: response.status, location: response.headers.get('location'), text: await response.text() };
    },
    answerBank: async (confirmUrl, answer) => {
      await fetch(confirmUrl, { method: 'POST', body: new URLSearchParams({ answer }), redirect: 'manual' });
    },
    hook: (path, body = {}) => callHook(service.url, path, body),
    settled: () => service.deliveriesSettled(),
    stop: async () => {
      await service.close();
      wire.closeAllConnections();
      await new Promise((resolve) => wire.close(resolve));
    },
  };
}

async function callHook(url: string, path: string, body: object): Promise<void> {
  const headers = { 'content-type': 'application/json' };
  const response = await fetch(`${url}/_test/${path}`, { method: 'POST', headers, body: JSON.stringify(body) });
  if (!response.ok) throw new Error(`The hook ${path} answered ${response.status}: ${await response.text()}`);
}

function deliveryOf(body: string, headers: IncomingHttpHeaders): Delivery {
  const { type } = JSON.parse(body) as { type: string };
  return { type, body, signature: String(headers['stripe-signature']) };
}

/** Signs an event as the provider would. */
export function signEvent(
  event: { type: string; [field: string]: unknown },
  timestampS: number,
  secret = WEBHOOK_SECRET,
): Delivery {
  const body = JSON.stringify(event);
  const signature = Stripe.webhooks.generateTestHeaderString({ payload: body, secret, timestamp: timestampS });
  return { type: event.type, body, signature };
}
