import Stripe from 'stripe';
import { describe, expect, it } from 'vitest';
import { hasValidCheckDigit, TEST_CARDS } from './cards/test-cards.js';
import { bench, PUBLISHABLE_KEY, pay, refusal, sdk } from './testing.js';

describe('test cards', () => {
  it('all have a valid check digit', () => {
    expect(TEST_CARDS.filter((card) => !hasValidCheckDigit(card.number))).toEqual([]);
    // ISO/IEC 7812-1 annex B worked example, from memory.
    expect(hasValidCheckDigit('79927398713')).toBe(true);
    expect(hasValidCheckDigit('79927398710')).toBe(false);
  });

  // Codes of the published test cards: from memory of the payment API's testing documentation.
  it.each([
    ['pm_card_chargeDeclined', 'card_declined', 'generic_decline'],
    ['pm_card_visa_chargeDeclinedInsufficientFunds', 'card_declined', 'insufficient_funds'],
    ['pm_card_chargeDeclinedExpiredCard', 'expired_card', 'expired_card'],
    ['pm_card_chargeDeclinedIncorrectCvc', 'incorrect_cvc', 'incorrect_cvc'],
    ['pm_card_chargeDeclinedProcessingError', 'processing_error', 'processing_error'],
    ['pm_card_chargeCustomerFail', 'card_declined', 'generic_decline'],
  ])('%s is refused with %s, and the attempt stays on record', async (card, code, declineCode) => {
    const { stripe } = await bench();
    const error = await refusal(pay(stripe, { amount: 900, payment_method: card, capture_method: 'manual' }));
    expect(error).toBeInstanceOf(Stripe.errors.StripeCardError);
    expect(error).toMatchObject({ statusCode: 402, code, decline_code: declineCode });
    const intent = await stripe.paymentIntents.retrieve(error.payment_intent?.id ?? '');
    expect(intent).toMatchObject({
      status: 'requires_payment_method',
      payment_method: null,
      last_payment_error: { code },
    });
    expect(await stripe.charges.retrieve(error.charge ?? '')).toMatchObject({
      status: 'failed',
      paid: false,
      failure_code: code,
    });
    expect((await stripe.balanceTransactions.list()).data).toEqual([]);
    // The same intent can be paid with a better card.
    const paid = await stripe.paymentIntents.confirm(intent.id, { payment_method: 'pm_card_visa' });
    expect(paid).toMatchObject({ status: 'requires_capture', last_payment_error: null });
  });

  it('must be confirmed by the payer when present, and fail when not', async () => {
    const { stripe } = await bench();
    const present = await pay(stripe, {
      amount: 900,
      payment_method: 'pm_card_authenticationRequired',
      return_url: 'http://127.0.0.1:9/back',
    });
    expect(present).toMatchObject({ status: 'requires_action', next_action: { type: 'redirect_to_url' } });
    const customer = await stripe.customers.create({});
    const method = await stripe.paymentMethods.attach('pm_card_authenticationRequired', { customer: customer.id });
    const absent = pay(stripe, { amount: 900, customer: customer.id, payment_method: method.id, off_session: true });
    expect(await refusal(absent)).toMatchObject({
      code: 'authentication_required',
      decline_code: 'authentication_required',
    });
  });

  it('saved with a confirmed SetupIntent need no confirmation later', async () => {
    const { stripe, service } = await bench();
    const customer = await stripe.customers.create({});
    const card = 'pm_card_authenticationRequiredOnSetup';
    const setup = await stripe.setupIntents.create({
      customer: customer.id,
      payment_method: card,
      allowed_payment_method_types: ['card'],
      confirm: true,
    });
    expect(setup.status).toBe('requires_action');
    await fetch(`${service.url}/confirm/${setup.client_secret}`, {
      method: 'POST',
      body: new URLSearchParams({ answer: 'approve' }),
      redirect: 'manual',
    });
    const done = await stripe.setupIntents.retrieve(setup.id);
    expect(done.status).toBe('succeeded');
    const [saved] = (await stripe.customers.listPaymentMethods(customer.id)).data;
    expect(saved?.id).toBe(done.payment_method);
    const paid = await pay(stripe, {
      amount: 900,
      customer: customer.id,
      payment_method: String(saved?.id),
      off_session: true,
    });
    expect(paid.status).toBe('succeeded');
  });

  it('used once without a customer, or detached, cannot be used again', async () => {
    const { stripe } = await bench();
    const first = await pay(stripe, { amount: 900 });
    expect((await refusal(pay(stripe, { amount: 900, payment_method: String(first.payment_method) }))).param).toBe(
      'payment_method',
    );
    const customer = await stripe.customers.create({});
    const method = await stripe.paymentMethods.attach('pm_card_visa', { customer: customer.id });
    expect((await refusal(pay(stripe, { amount: 900, payment_method: method.id }))).param).toBe('payment_method');
    await stripe.paymentMethods.detach(method.id);
    expect((await refusal(pay(stripe, { amount: 900, payment_method: method.id, customer: customer.id }))).param).toBe(
      'payment_method',
    );
    expect((await refusal(stripe.paymentMethods.attach(method.id, { customer: customer.id }))).statusCode).toBe(400);
  });

  it('can be kept for later by the payment itself', async () => {
    const { stripe } = await bench();
    const customer = await stripe.customers.create({});
    await pay(stripe, { amount: 900, customer: customer.id, setup_future_usage: 'off_session' });
    expect((await stripe.paymentMethods.list({ customer: customer.id, type: 'card' })).data).toHaveLength(1);
  });

  it.each([
    [{ number: '4242424242424241', exp_month: 12, exp_year: 2099 }, 'incorrect_number'],
    [{ number: '4242424242424242', exp_month: 13, exp_year: 2040 }, 'invalid_expiry_month'],
    [{ number: '4242424242424242', exp_month: 1, exp_year: 2020 }, 'invalid_expiry_year'],
    [{ number: '4242424242424242', exp_month: 1, exp_year: 2040, cvc: '12' }, 'invalid_cvc'],
    // A number that passes the check digit but is no published test number.
    [{ number: '4929000000006', exp_month: 1, exp_year: 2040 }, 'card_declined'],
  ])('are checked as numbers: %o', async (card, code) => {
    const { service } = await bench();
    const browser = sdk(service.url, PUBLISHABLE_KEY);
    expect(await refusal(browser.paymentMethods.create({ type: 'card', card }))).toMatchObject({
      statusCode: 402,
      code,
    });
  });

  it('can be entered by a browser with the publishable key and the client secret only', async () => {
    const { stripe, service } = await bench();
    const intent = await stripe.paymentIntents.create({
      amount: 900,
      currency: 'eur',
      allowed_payment_method_types: ['card'],
      metadata: { secret: 'x' },
    });
    const call = (path: string, fields: Record<string, string>) =>
      fetch(`${service.url}/v1/${path}`, {
        method: 'POST',
        headers: { authorization: `Bearer ${PUBLISHABLE_KEY}` },
        body: new URLSearchParams(fields),
      });
    const card = {
      'card[number]': '4242 4242 4242 4242',
      'card[exp_month]': '12',
      'card[exp_year]': '2040',
      'card[cvc]': '123',
    };
    const made = await call('payment_methods', { type: 'card', ...card });
    expect(made.headers.get('access-control-allow-origin')).toBe('*');
    const { id } = (await made.json()) as { id: string };
    expect((await call(`payment_intents/${intent.id}/confirm`, { payment_method: id })).status).toBe(404);
    const wrong = { payment_method: id, client_secret: `${intent.id}_secret_wrong` };
    expect((await call(`payment_intents/${intent.id}/confirm`, wrong)).status).toBe(404);
    const right = await call(`payment_intents/${intent.id}/confirm`, {
      payment_method: id,
      client_secret: intent.client_secret ?? '',
    });
    const shown = (await right.json()) as Record<string, unknown>;
    expect(shown).toMatchObject({ id: intent.id, status: 'succeeded' });
    expect(shown).not.toHaveProperty('metadata');
    expect((await call(`payment_intents/${intent.id}/capture`, {})).status).toBe(403);
  });
});
