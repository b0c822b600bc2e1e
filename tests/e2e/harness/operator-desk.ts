/** What an operator does in the pages: elements, a radio, a pass, a hold, a card. */
import type { Booking } from '@skyberth/shared';
import type { Locator, Page } from 'playwright-core';
import { choose, fill, pick, press, seen, textBox } from './fields.js';
import { goToPage } from './pages.js';

/** Pastes as a person does, through the clipboard; the page then reads the text by itself. */
export async function pasteElements(page: Page, text: string): Promise<void> {
  await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
  await page.evaluate(`navigator.clipboard.writeText(${JSON.stringify(text)})`);
  await textBox(page, 'Element sets').click();
  await page.keyboard.press('Control+v');
  await seen(page.getByText('1 element set can be used'));
  await press(page, 'Save 1 element set');
  await seen(page.getByText('1 element set is saved.'));
}

/** From the note that the elements were saved to a downlink radio at S band. */
export async function addDownlinkRadio(page: Page, spacecraft: string): Promise<void> {
  await page.getByRole('link', { name: spacecraft, exact: true }).click();
  await page.getByRole('link', { name: 'Add a radio' }).click();
  await press(page, 'Add a downlink');
  const radio = page.getByRole('group', { name: 'Radio 1' });
  await choose(radio, 'Band', 'S');
  await choose(radio, 'Polarisation', 'right-hand circular');
  await fill(radio, {
    'Centre frequency': '2245',
    Bandwidth: '2000',
    Modulation: 'OQPSK',
    Coding: 'CCSDS convolutional 1/2',
    'Data rate': '1000',
    EIRP: '3',
    'Eb/N0 needed': '5',
    Name: 'Payload',
  });
  await press(page, 'Save the changes');
  await seen(page.getByRole('heading', { name: 'Payload' }));
}

/** Opens the search and waits for its answer. */
export async function findTime(page: Page): Promise<void> {
  await goToPage(page, 'Find time');
  await seen(page.getByRole('status').filter({ hasText: /for sale of \d+ pass/ }));
}

/** Passes on the board, by the words that their buttons are called by. */
export const passes = (page: Page, words: RegExp): Locator =>
  page.locator('[data-hump]').and(page.getByRole('button', { name: words }));

/** Picks the first pass for sale on the board. Answers what its button said. */
export async function pickPass(page: Page): Promise<string> {
  const pass = passes(page, /, for sale/).first();
  const words = (await pass.getAttribute('aria-label')) ?? '';
  await pass.click();
  await seen(page.getByRole('button', { name: /^Hold for 10 minutes/ }));
  return words;
}

/** Holds the picked pass. Answers the price on the button. */
export async function holdPass(page: Page): Promise<string> {
  const hold = page.getByRole('button', { name: /^Hold for 10 minutes/ });
  const price = /[€$£][\d.,]+|[\d.,]+\s?[A-Z]{3}/.exec((await hold.textContent()) ?? '')?.[0] ?? '';
  await hold.click();
  await seen(tray(page));
  return price;
}

/** What the page shows of a contact that was paid for, in the list and in the calendar. */
export async function seeInBookings(page: Page, booking: Pick<Booking, 'number' | 'aosUtc' | 'antennaName'>) {
  await goToPage(page, 'Bookings');
  const row = page
    .getByRole('row')
    .filter({ has: page.getByRole('link', { name: String(booking.number), exact: true }) });
  await seen(row.getByText('Confirmed'));
  await pick(page, 'View', 'Calendar');
  await page.waitForURL(/view=calendar/);
  // The month of the contact may be the next one.
  await page.goto(`${page.url()}&day=${booking.aosUtc.slice(0, 10)}`);
  const time = booking.aosUtc.slice(11, 16);
  await seen(page.getByText(new RegExp(`${time} .*${booking.antennaName}, Confirmed`)));
}

export const tray = (page: Page): Locator => page.getByRole('region', { name: 'Held by you' });

/** Published test numbers of the payment service's documentation (from memory): one that is good, one that is refused. */
export const GOOD_CARD = '4242 4242 4242 4242';
export const DECLINED_CARD = '4000 0000 0000 0002';

/** On the payment page. Answers to what was on its button. */
export async function payByCard(page: Page, number: string): Promise<void> {
  await page.waitForURL(/\/checkout\//);
  await fill(page, {
    'Card number': number,
    'Expires (MM/YY)': '12/34',
    'Security code': '123',
    'Name on the card': 'Tariq Bell',
  });
  await page.getByRole('button', { name: /^Pay / }).click();
}
