/** The board without a mouse: signed in, a pass found with arrow keys, held. */
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser, openDesk } from './harness/browser.js';
import { seen } from './harness/fields.js';
import { moveFocus, tabTo, walkTo } from './harness/focus.js';
import { type Harbour, PASSWORD, startHarbour } from './harness/harbour.js';
import { buyerWithSpacecraft, openMarket } from './harness/market.js';
import { tray } from './harness/operator-desk.js';
import { step } from './harness/steps.js';

describe('with the keyboard alone', () => {
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

  it('signs in, picks a pass with the arrow keys, and holds it', async () => {
    const buyer = await buyerWithSpacecraft(harbour, 'Curlew Orbits', 99_501);
    const desk = await openDesk(browser);
    const { page } = desk;
    await step('signing in', desk, async () => {
      await page.goto(`${harbour.url}/sign-in`);
      await tabTo(page, /^E-mail/);
      await page.keyboard.type(buyer.email);
      await tabTo(page, /^Password/);
      await page.keyboard.type(PASSWORD);
      await page.keyboard.press('Enter');
      await seen(page.getByRole('heading', { name: /^Good to see you/ }));
      await tabTo(page, /^Find time/);
      await page.keyboard.press('Enter');
      await seen(page.getByRole('status').filter({ hasText: /for sale of \d+ pass/ }));
    });
    await step('picking a pass with the arrow keys', desk, async () => {
      const first = await tabTo(page, / over North dish, /);
      const next = await moveFocus(page, 'ArrowRight');
      expect(next).toMatch(/ over North dish, /);
      expect(await moveFocus(page, 'ArrowLeft')).toBe(first);
      await walkTo(page, 'ArrowRight', / over North dish, .*, for sale/);
      await page.keyboard.press('Space');
      await seen(page.getByRole('button', { name: /^Hold for 10 minutes/ }));
    });
    await step('holding it', desk, async () => {
      await tabTo(page, /^Hold for 10 minutes/);
      await page.keyboard.press('Enter');
      await seen(tray(page));
    });
    expect(desk.faults).toEqual([]);
  });
});
