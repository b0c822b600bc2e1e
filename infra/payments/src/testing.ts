import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import Stripe from 'stripe';
import { onTestFinished } from 'vitest';
import { type RunningPayments, type Settings, start } from './index.js';

export const SECRET_KEY = 'sk_test_skyberth_local';
export const PUBLISHABLE_KEY = 'pk_test_skyberth_local';

export interface Bench {
  service: RunningPayments;
  /** The real SDK, pointed at the stand-in. */
  stripe: Stripe;
  hook(path: string, body?: object): Promise<Record<string, unknown>>;
}

/** The SDK as the product would set it up, but for the address. */
export function sdk(
  url: string,
  key = SECRET_KEY,
  options: { timeout?: number; maxNetworkRetries?: number } = {},
): Stripe {
  const { hostname, port } = new URL(url);
  return new Stripe(key, {
    host: hostname,
    port,
    protocol: 'http',
    telemetry: false,
    maxNetworkRetries: 0,
    ...options,
  });
}

export async function bench(settings: Partial<Settings> = {}): Promise<Bench> {
  const service = await start(settings);
  onTestFinished(() => service.close());
  return {
    service,
    stripe: sdk(service.url),
    hook: async (path, body = {}) => {
      const response = await fetch(`${service.url}/_test/${path}`, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify(body),
      });
      const answer = (await response.json()) as Record<string, unknown>;
      if (!response.ok) throw new Error(`the hook ${path} answered ${response.status}: ${JSON.stringify(answer)}`);
      return answer;
    },
  };
}

export interface Receiver {
  url: string;
  received: { body: string; signature: string }[];
  /** Statuses for the next requests; 200 once they are used up. */
  answers: number[];
}

/** A webhook receiver that keeps what it gets. */
export async function receiver(): Promise<Receiver> {
  const result: Receiver = { url: '', received: [], answers: [] };
  const server = createServer((request, response) => {
    let body = '';
    request.setEncoding('utf8');
    request.on('data', (chunk: string) => {
      body += chunk;
    });
    request.on('end', () => {
      result.received.push({ body, signature: String(request.headers['stripe-signature']) });
      response.writeHead(result.answers.shift() ?? 200).end();
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  result.url = `http://127.0.0.1:${(server.address() as AddressInfo).port}/hooks`;
  onTestFinished(
    () =>
      new Promise<void>((resolve) => {
        server.closeAllConnections();
        server.close(() => resolve());
      }),
  );
  return result;
}

/** The SDK's error of a call that must be refused. */
export async function refusal(call: Promise<unknown>): Promise<Stripe.errors.StripeError> {
  try {
    await call;
  } catch (error) {
    if (error instanceof Stripe.errors.StripeError) return error;
    throw error;
  }
  throw new Error('the call was not refused');
}

/** A captured or authorised payment, in one call. */
export async function pay(
  stripe: Stripe,
  given: Partial<Stripe.PaymentIntentCreateParams> & { amount: number },
): Promise<Stripe.PaymentIntent> {
  return stripe.paymentIntents.create({
    currency: 'eur',
    payment_method: 'pm_card_visa',
    allowed_payment_method_types: ['card'],
    confirm: true,
    ...given,
  });
}
