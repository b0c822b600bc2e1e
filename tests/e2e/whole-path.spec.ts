/** The whole path with two people and a third: described, approved, found, paid, invoiced, and sold only once. */
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchBrowser, openDesk } from './harness/browser.js';
import { seen } from './harness/fields.js';
import { ADMIN_EMAIL, type Harbour, startHarbour } from './harness/harbour.js';
import {
  ANTENNA,
  addReceiveBand,
  askForApproval,
  describeAntenna,
  describeStation,
  openRoundTheClock,
  publishMask,
  putOnSale,
  STATION,
  setPrices,
} from './harness/owner-desk.js';
import { comeByInvitation, signIn, signUp } from './harness/people.js';
import { step } from './harness/steps.js';

describe('from an empty marketplace to a sold contact', () => {
  let harbour: Harbour;
  let browser: Browser;
  beforeAll(async () => {
    [harbour, browser] = await Promise.all([startHarbour(), launchBrowser()]);
  });
  afterAll(async () => {
    await browser?.close();
    await harbour?.stop();
  });

  it('walks the whole path with two people and a third', async () => {
    const { url } = harbour;
    const owner = await openDesk(browser);
    const { page } = owner;
    await step('the owner signs up', owner, () =>
      signUp(page, url, {
        kind: 'owner',
        name: 'Ines Skog',
        email: 'ines@heron-point.example',
        organisation: 'Heron Point Earth Stations',
        country: 'NO',
      }),
    );
    await step('the owner describes a station', owner, () => describeStation(page, 'Europe/Oslo'));
    await step('the owner describes an antenna', owner, () => describeAntenna(page));
    await step('the owner uploads the mask', owner, () => publishMask(page));
    await step('the owner adds an S band', owner, () =>
      addReceiveBand(page, {
        band: 'S',
        fromMhz: '2200',
        toMhz: '2300',
        gOverTDbK: '16.5',
        polarisations: ['right', 'left'],
      }),
    );
    await step('the owner sets prices', owner, () => setPrices(page));
    await step('the owner opens it round the clock', owner, () => openRoundTheClock(page));
    await step('the owner asks for approval', owner, async () => {
      await page.getByRole('link', { name: STATION }).click();
      await askForApproval(page);
    });
    const admin = await openDesk(browser);
    await step('the admin comes by invitation and approves', admin, async () => {
      await comeByInvitation(admin.page, await harbour.mail.linkFor(ADMIN_EMAIL));
      await signIn(admin.page, url, ADMIN_EMAIL);
      await admin.page.getByRole('link', { name: STATION }).click();
      await admin.page
        .getByRole('textbox', { name: 'Reason, read by the owner' })
        .fill('Position and mask agree with the survey.');
      await admin.page.getByRole('button', { name: /^Approve/ }).click();
      await seen(admin.page.getByText('Approved', { exact: true }));
    });
    await step('the owner puts it on sale', owner, async () => {
      await page.reload();
      await seen(page.getByText('Approved', { exact: true }));
      await page.getByRole('link', { name: ANTENNA }).click();
      await putOnSale(page);
    });
    expect([...owner.faults, ...admin.faults]).toEqual([]);
  });
});
