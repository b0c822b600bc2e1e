import { describe, expect, it } from 'vitest';
import { type Bench, bench, pay } from './testing.js';

const BACK = 'http://127.0.0.1:9/checkout?booking=12';

function submit(
  { service }: Bench,
  path: string,
  fields: Record<string, string>,
  headers: Record<string, string> = {},
): Promise<Response> {
  return fetch(`${service.url}${path}`, {
    method: 'POST',
    body: new URLSearchParams(fields),
    headers,
    redirect: 'manual',
  });
}

async function openPayment(tools: Bench): Promise<{ id: string; path: string }> {
  const intent = await tools.stripe.paymentIntents.create({
    amount: 12_345,
    currency: 'eur',
    capture_method: 'manual',
    allowed_payment_method_types: ['card'],
    description: 'Contact <b>7</b>',
  });
  return { id: intent.id, path: `/pay/${intent.client_secret}?return_url=${encodeURIComponent(BACK)}` };
}

describe('the card page', () => {
  it('says what it is, shows the amount, and has no scripts', async () => {
    const tools = await bench();
    const { path } = await openPayment(tools);
    const response = await fetch(`${tools.service.url}${path}`);
    const text = await response.text();
    expect(text).toContain('No real money moves here');
    expect(text).toContain('123.45 EUR');
    expect(text).toContain('Contact &#60;b&#62;7');
    expect(text).not.toContain('<script');
    expect(response.headers.get('content-security-policy')).toContain("default-src 'none'");
    expect((await fetch(`${tools.service.url}/pay/pi_x_secret_y`)).status).toBe(404);
  });

  it('takes a typed card and sends the payer back with the result', async () => {
    const tools = await bench();
    const { id, path } = await openPayment(tools);
    const response = await submit(tools, path, {
      number: '4242 4242 4242 4242',
      expiry: '12/34',
      cvc: '123',
      name: 'A. Lind',
    });
    const target = new URL(response.headers.get('location') ?? '');
    expect([response.status, target.origin, target.searchParams.get('booking')]).toEqual([
      303,
      'http://127.0.0.1:9',
      '12',
    ]);
    expect(target.searchParams.get('redirect_status')).toBe('succeeded');
    expect(target.searchParams.get('payment_intent')).toBe(id);
    expect((await tools.stripe.paymentIntents.retrieve(id)).status).toBe('requires_capture');
  });

  it('says what the bank said and lets the payer try another card', async () => {
    const tools = await bench();
    const { id, path } = await openPayment(tools);
    const refused = await submit(tools, path, { token: 'pm_card_chargeDeclinedInsufficientFunds' });
    expect(await refused.text()).toContain('Your card has insufficient funds.');
    expect(
      await (await submit(tools, path, { number: '4242424242424241', expiry: '12/34', cvc: '123' })).text(),
    ).toContain('number is incorrect');
    expect(
      await (await submit(tools, path, { number: '4242424242424242', expiry: 'soon', cvc: '123' })).text(),
    ).toContain('expiration');
    expect((await submit(tools, path, { token: 'pm_card_visa' })).status).toBe(303);
    expect((await tools.stripe.paymentIntents.retrieve(id)).status).toBe('requires_capture');
  });

  it.each([
    ['approve', 'requires_capture', 'succeeded'],
    ['refuse', 'requires_payment_method', 'failed'],
  ])('leads over the confirmation: %s', async (answer, status, result) => {
    const tools = await bench();
    const { id, path } = await openPayment(tools);
    const toBank = await submit(tools, path, { token: 'pm_card_authenticationRequired' });
    const confirmPath = toBank.headers.get('location') ?? '';
    expect(confirmPath).toMatch(/^\/confirm\//);
    expect(await (await fetch(`${tools.service.url}${confirmPath}`)).text()).toContain('Your bank asks');
    const back = await submit(tools, confirmPath, { answer });
    expect(new URL(back.headers.get('location') ?? '').searchParams.get('redirect_status')).toBe(result);
    expect((await tools.stripe.paymentIntents.retrieve(id)).status).toBe(status);
  });

  it.each([
    'https://elsewhere.example/x',
    'javascript:alert(1)',
    'http://127.0.0.1@elsewhere.example/',
    '//elsewhere.example',
  ])('does not send anybody to %s', async (returnUrl) => {
    const tools = await bench();
    const { path } = await openPayment(tools);
    const response = await submit(tools, `${path.split('?')[0]}?return_url=${encodeURIComponent(returnUrl)}`, {
      token: 'pm_card_visa',
    });
    expect([response.status, response.headers.get('location')]).toEqual([200, null]);
  });

  it('saves a card for a customer', async () => {
    const tools = await bench();
    const customer = await tools.stripe.customers.create({});
    const setup = await tools.stripe.setupIntents.create({
      customer: customer.id,
      allowed_payment_method_types: ['card'],
    });
    await submit(tools, `/pay/${setup.client_secret}`, { token: 'pm_card_mastercard' });
    expect((await tools.stripe.customers.listPaymentMethods(customer.id)).data).toMatchObject([
      { card: { brand: 'mastercard' } },
    ]);
  });

  it('takes no form from another page, and answers to no other name', async () => {
    const tools = await bench();
    const { path } = await openPayment(tools);
    expect((await submit(tools, path, { token: 'pm_card_visa' }, { origin: 'http://elsewhere.example' })).status).toBe(
      403,
    );
    const hook = await fetch(`${tools.service.url}/_test/clock`, {
      method: 'POST',
      headers: { origin: 'http://elsewhere.example' },
    });
    expect(hook.status).toBe(403);
  });
});

describe('the other pages', () => {
  it('let an owner finish their account', async () => {
    const tools = await bench();
    const account = await tools.stripe.accounts.create({
      type: 'express',
      capabilities: { transfers: { requested: true } },
    });
    const link = await tools.stripe.accountLinks.create({
      account: account.id,
      type: 'account_onboarding',
      return_url: BACK,
      refresh_url: BACK,
    });
    const path = new URL(link.url).pathname;
    expect((await submit(tools, path, {})).headers.get('location')).toBe(BACK);
    const after = await tools.stripe.accounts.retrieve(account.id);
    expect(after).toMatchObject({
      details_submitted: true,
      payouts_enabled: true,
      capabilities: { transfers: 'active' },
    });
    expect((await submit(tools, path, {})).status).toBe(410);
  });

  it('show what is held', async () => {
    const tools = await bench();
    await tools.stripe.customers.create({ name: '<img src=x>' });
    const paid = await pay(tools.stripe, { amount: 1000, currency: 'jpy' });
    const text = await (await fetch(tools.service.url)).text();
    expect(text).toContain('&#60;img src=x&#62;');
    expect(text).toContain(paid.id);
    expect(text).toContain('1000 JPY');
    expect(await (await fetch(`${tools.service.url}/health`)).json()).toEqual({ status: 'ok' });
  });
});
