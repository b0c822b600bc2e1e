/** The whole path with two people and a third: described, approved, found, paid, invoiced, and sold only once. */
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Desk, launchBrowser, openDesk } from './harness/browser.js';
import { aMinuteAgo, elementSetOf } from './harness/element-sets.js';
import { pick, seen } from './harness/fields.js';
import { ADMIN_EMAIL, type Harbour, startHarbour } from './harness/harbour.js';
import * as buying from './harness/operator-desk.js';
import * as selling from './harness/owner-desk.js';
import { goToPage } from './harness/pages.js';
import { pdfText } from './harness/pdf.js';
import { comeByInvitation, type Newcomer, signIn, signUp } from './harness/people.js';
import { bookingIdIn, bookingOf, tryToHold } from './harness/records.js';
import { step } from './harness/steps.js';

const WALK_MS = 600_000;
const OWNER: Newcomer = {
  kind: 'owner',
  name: 'Ines Skog',
  email: 'ines@heron-point.example',
  organisation: 'Heron Point Earth Stations',
  country: 'NO',
};
const OPERATOR: Newcomer = {
  kind: 'operator',
  name: 'Tariq Bell',
  email: 'tariq@kittiwake.example',
  organisation: 'Kittiwake Orbits',
  country: 'FI',
};
const THIRD: Newcomer = {
  kind: 'operator',
  name: 'Maud Ferreira',
  email: 'maud@fulmar.example',
  organisation: 'Fulmar Sensing',
  country: 'PT',
};

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

  it(
    'walks the whole path with two people and a third',
    async () => {
      const owner = await openDesk(browser);
      const admin = await openDesk(browser);
      const operator = await openDesk(browser);
      const third = await openDesk(browser);
      const epochMs = aMinuteAgo();
      await describeAntenna(owner);
      await approve(admin);
      await putOnSale(owner);
      await bringSpacecraft(operator, OPERATOR, { name: 'KITTIWAKE 1', catalogNumber: 99_301, epochMs });
      const { id, price } = await buy(operator);
      await seePapers(operator, id, price);
      await readMails(price);
      await seeSale(owner, id, operator);
      await bringSpacecraft(third, THIRD, { name: 'FULMAR 1', catalogNumber: 99_302, epochMs });
      await findItTaken(third, await bookingOf(operator.context, harbour.url, id));
      expect([owner, admin, operator, third].flatMap((desk) => desk.faults)).toEqual([]);
    },
    WALK_MS,
  );

  async function describeAntenna(owner: Desk): Promise<void> {
    const { page } = owner;
    await step('the owner signs up', owner, () => signUp(page, harbour.url, OWNER));
    await step('the owner describes a station', owner, () => selling.describeStation(page, 'Europe/Oslo'));
    await step('the owner describes an antenna', owner, () => selling.describeAntenna(page));
    await step('the owner uploads the mask', owner, () => selling.publishMask(page));
    await step('the owner adds an S band', owner, () => selling.addReceiveBand(page, selling.S_BAND));
    await step('the owner sets prices', owner, () => selling.setPrices(page));
    await step('the owner opens it round the clock', owner, () => selling.openRoundTheClock(page));
    await step('the owner asks for approval', owner, async () => {
      await page.getByRole('link', { name: selling.STATION }).click();
      await selling.askForApproval(page);
    });
  }

  async function approve(admin: Desk): Promise<void> {
    const { page } = admin;
    await step('the admin comes by invitation', admin, async () => {
      await comeByInvitation(page, await harbour.mail.linkFor(ADMIN_EMAIL));
      await signIn(page, harbour.url, ADMIN_EMAIL);
    });
    await step('the admin approves', admin, async () => {
      await page.getByRole('link', { name: selling.STATION }).click();
      await page.getByRole('textbox', { name: 'Reason, read by the owner' }).fill('Mask and position agree.');
      await page.getByRole('button', { name: /^Approve/ }).click();
      await seen(page.getByText('Approved', { exact: true }));
    });
  }

  const putOnSale = (owner: Desk) =>
    step('the owner puts it on sale', owner, async () => {
      await owner.page.reload();
      await seen(owner.page.getByText('Approved', { exact: true }));
      await owner.page.getByRole('link', { name: selling.ANTENNA }).click();
      await selling.putOnSale(owner.page);
    });

  async function bringSpacecraft(desk: Desk, who: Newcomer, orbit: Parameters<typeof elementSetOf>[0]) {
    const { page } = desk;
    await step(`${who.name} signs up`, desk, () => signUp(page, harbour.url, who));
    await step(`${who.name} pastes an element set`, desk, async () => {
      await page.getByRole('link', { name: 'Paste element sets' }).click();
      await buying.pasteElements(page, elementSetOf(orbit));
    });
    await step(`${who.name} adds a downlink radio`, desk, () => buying.addDownlinkRadio(page, orbit.name));
  }

  async function buy(operator: Desk): Promise<{ id: string; price: string }> {
    const { page } = operator;
    await step('the operator finds passes', operator, () => buying.findTime(page));
    await step('the operator picks one on the board', operator, () => buying.pickPass(page));
    const price = await step('the operator holds it', operator, () => buying.holdPass(page));
    await step('the operator pays on the payment page', operator, async () => {
      await buying.tray(page).getByRole('button', { name: 'Pay and confirm' }).click();
      await buying.payByCard(page, buying.GOOD_CARD);
    });
    await step('the contact page says that it is confirmed', operator, async () => {
      await page.waitForURL(/\/bookings\/.+paid=1/);
      await seen(page.getByText('Paid and confirmed.'));
      await seen(page.getByText('Confirmed', { exact: true }));
      await buying.tray(page).waitFor({ state: 'hidden' });
    });
    return { id: bookingIdIn(page.url()), price };
  }

  /** List, calendar, invoice and its PDF. */
  async function seePapers(operator: Desk, id: string, price: string): Promise<void> {
    const { page, context } = operator;
    const booking = await bookingOf(context, harbour.url, id);
    expect(booking).toMatchObject({ state: 'confirmed', payment: { state: 'authorised' } });
    await step('the operator sees it in the list and the calendar', operator, () =>
      buying.seeInBookings(page, booking),
    );
    await step('the operator opens the invoice', operator, async () => {
      await goToPage(page, 'Invoices');
      await page.getByRole('link', { name: booking.invoiceNumber ?? 'no number' }).click();
      await seen(page.getByRole('heading', { level: 1, name: `Invoice ${booking.invoiceNumber}` }));
      await seen(page.getByRole('row', { name: /^Total/ }).getByText(price));
    });
    await step('the operator reads the PDF', operator, async () => {
      const href = await page.getByRole('link', { name: 'Open as PDF' }).getAttribute('href');
      const answer = await context.request.get(new URL(href ?? '', harbour.url).href);
      expect(answer.headers()['content-type']).toBe('application/pdf');
      expectInvoice(await answer.body(), { number: booking.invoiceNumber ?? '', price });
    });
  }

  function expectInvoice(file: Buffer, { number, price }: { number: string; price: string }): void {
    const text = pdfText(file);
    for (const words of [number, OPERATOR.organisation, selling.ANTENNA, 'VAT', price.replace(/[^\d.,]/g, '')])
      expect(text).toContain(words);
  }

  async function readMails(price: string): Promise<void> {
    const confirmed = await harbour.mail.letterTo(OPERATOR.email, /^Confirmed: KITTIWAKE 1/);
    expect(confirmed.attachments).toMatchObject([{ contentType: expect.stringContaining('text/calendar') }]);
    const invoice = await harbour.mail.letterTo(OPERATOR.email, /^Invoice /);
    expect(invoice.attachments).toMatchObject([{ contentType: 'application/pdf' }]);
    const number = /^Invoice (\S+):/.exec(invoice.subject)?.[1] ?? 'no number';
    expectInvoice(await invoice.attachment(0), { number, price });
    const sold = await harbour.mail.letterTo(OWNER.email, /^Sold: KITTIWAKE 1/);
    expect(sold.text).toContain(OPERATOR.organisation);
  }

  async function seeSale(owner: Desk, id: string, operator: Desk): Promise<void> {
    const { number } = await bookingOf(operator.context, harbour.url, id);
    await step('the owner sees the booking', owner, async () => {
      const { page } = owner;
      await goToPage(page, 'Bookings');
      const row = page.getByRole('row').filter({ hasText: OPERATOR.organisation });
      await seen(row.getByText('Confirmed'));
      await row.getByRole('link', { name: String(number), exact: true }).click();
      await seen(page.getByRole('heading', { level: 1, name: `KITTIWAKE 1 at ${selling.ANTENNA}` }));
      await seen(page.getByText(`For ${OPERATOR.organisation}.`));
    });
  }

  async function findItTaken(third: Desk, sold: Awaited<ReturnType<typeof bookingOf>>): Promise<void> {
    const { page, context } = third;
    const spacecraftId = /\/spacecraft\/([\w-]+)/.exec(page.url())?.[1] ?? '';
    await step('the third finds the same time taken', third, async () => {
      await buying.findTime(page);
      await pick(page, 'View', 'Table');
      const row = page.getByRole('row').filter({ hasText: sold.aosUtc.slice(11, 19) });
      await seen(row.getByText('taken', { exact: true }));
      await row.getByRole('button').click();
      await seen(
        page.getByRole('region', { name: 'Why it is not for sale' }).getByText('Another contact keeps the antenna'),
      );
      expect(await page.getByRole('button', { name: /^Hold/ }).count()).toBe(0);
    });
    const { status, contentType, problem } = await tryToHold(context, harbour.url, { ...sold, spacecraftId });
    expect({ status, code: problem.code }).toEqual({ status: 409, code: 'berth-taken' });
    expect(contentType).toContain('application/problem+json');
  }
});
