/** What may go wrong between the hold and the money: a refused card, a hold let go, a payment page that is left. */
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Desk, launchBrowser, openDesk } from './harness/browser.js';
import { seen } from './harness/fields.js';
import { type Harbour, startHarbour } from './harness/harbour.js';
import { buyerWithSpacecraft, openMarket } from './harness/market.js';
import * as buying from './harness/operator-desk.js';
import { signIn } from './harness/people.js';
import { bookingIdIn, bookingOf } from './harness/records.js';
import { step } from './harness/steps.js';

describe('between the hold and the money', () => {
  let harbour: Harbour;
  let browser: Browser;
  beforeAll(async () => {
    [harbour, browser] = await Promise.all([startHarbour(), launchBrowser()]);
    await openMarket(harbour);
  });
  afterAll(async () => {
    await browser?.close();
    await harbour?.stop();
  });

  /** An operator of this test's own, who holds the first pass for sale. Answers what its button said, without the state. */
  async function holdFirstPass(organisation: string, catalogNumber: number): Promise<{ desk: Desk; pass: string }> {
    const buyer = await buyerWithSpacecraft(harbour, organisation, catalogNumber);
    const desk = await openDesk(browser);
    const words = await step(`${organisation} holds a pass`, desk, async () => {
      await signIn(desk.page, harbour.url, buyer.email);
      await buying.findTime(desk.page);
      const picked = await buying.pickPass(desk.page);
      await buying.holdPass(desk.page);
      return picked;
    });
    return { desk, pass: words.split(', for sale')[0] ?? words };
  }

  it('lets a refused card be followed by a good one', async () => {
    const { desk } = await holdFirstPass('Dunlin Orbits', 99_401);
    const { page, context } = desk;
    await step('paying with a card that is refused', desk, async () => {
      await buying.tray(page).getByRole('button', { name: 'Pay and confirm' }).click();
      await buying.payByCard(page, buying.DECLINED_CARD);
      await seen(page.getByRole('alert').filter({ hasText: 'Your card was declined.' }));
    });
    await step('paying with a good card', desk, async () => {
      await buying.payByCard(page, buying.GOOD_CARD);
      await page.waitForURL(/\/bookings\/.+paid=1/);
      await seen(page.getByText('Paid and confirmed.'));
    });
    const booking = await bookingOf(context, harbour.url, bookingIdIn(page.url()));
    expect(booking).toMatchObject({
      state: 'confirmed',
      payment: { state: 'authorised', card: expect.stringContaining('4242') },
    });
    expect(desk.faults).toEqual([]);
  });

  it('puts a pass back on sale when its hold is let go', async () => {
    const { desk, pass } = await holdFirstPass('Sanderling Orbits', 99_402);
    const { page } = desk;
    await step('letting the hold go', desk, async () => {
      await seen(page.getByRole('button', { name: `${pass}, held by you` }));
      await buying.tray(page).getByRole('button', { name: 'Let it go' }).click();
      await buying.tray(page).waitFor({ state: 'hidden' });
      await seen(page.getByRole('button', { name: `${pass}, for sale` }));
    });
    await step('holding the same pass again', desk, async () => {
      await buying.holdPass(page);
      await seen(page.getByRole('button', { name: `${pass}, held by you` }));
    });
    expect(desk.faults).toEqual([]);
  });

  it('keeps the hold, and charges nothing, when the payment page is left', async () => {
    const { desk } = await holdFirstPass('Knot Orbits', 99_403);
    const { page, context } = desk;
    await step('leaving the payment page', desk, async () => {
      await buying.tray(page).getByRole('button', { name: 'Pay and confirm' }).click();
      await page.getByRole('link', { name: 'Back without paying' }).click();
      await page.waitForURL(/\/bookings\//);
      await seen(page.getByText('Held', { exact: true }));
      await seen(page.getByText('The payment was begun and not finished; nothing is charged.'));
    });
    const id = bookingIdIn(page.url());
    expect(await bookingOf(context, harbour.url, id)).toMatchObject({
      state: 'held',
      invoiceId: null,
      payment: { state: 'waiting for the buyer', capturedMinor: 0 },
    });
    await step('letting it go from the contact page', desk, async () => {
      await page.getByRole('button', { name: 'Let the hold go' }).click();
      await seen(page.getByText('Cancelled', { exact: true }));
      await seen(page.getByText('The hold was let go.'));
    });
    expect(await harbour.mail.subjectsTo('knot.orbits@people.example')).not.toContainEqual(
      expect.stringMatching(/Confirmed|Invoice/),
    );
    expect(desk.faults).toEqual([]);
  });
});
