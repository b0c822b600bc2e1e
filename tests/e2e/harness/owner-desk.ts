/** What a station owner does in the pages, from nothing to an antenna on sale. */
import type { Page } from 'playwright-core';
import { choose, fill, pick, press, seen } from './fields.js';

export const STATION = 'Grey Heron Point';
export const ANTENNA = 'Cliff dish';

/** A hill in the south and a mast in the west, as a surveyor would hand it over. */
export const MASK_CSV = 'azimuth,elevation\n0,3\n60,4\n140,9.5\n180,12\n220,8\n270,4\n280,6\n290,4\n';

export async function describeStation(page: Page, timeZone: string): Promise<void> {
  await page.getByRole('link', { name: 'Add a station' }).click();
  await fill(page, {
    Name: STATION,
    Description: 'On a bare headland; one crew by day, fibre to the mainland.',
    Latitude: '69.66',
    Longitude: '18.94',
    Altitude: '120',
    Country: 'NO',
    'Contact person': 'Ines Skog',
    Telephone: '+47 555 0100',
  });
  await choose(page, 'Time zone', timeZone);
  await press(page, 'Save and add an antenna');
  await seen(page.getByRole('heading', { level: 1, name: STATION }));
}

export async function describeAntenna(page: Page): Promise<void> {
  await page.getByRole('link', { name: 'Add an antenna' }).click();
  await fill(page, {
    Name: ANTENNA,
    Diameter: '5.4',
    'Turns in azimuth': '12',
    'Turns in elevation': '6',
    'Set-up before AOS': '90',
    'Least notice': '20',
    'Bookable ahead': '21',
  });
  await choose(page, 'Mount', 'X over Y');
  await pick(page, 'How a booking is confirmed', 'At once');
  await press(page, 'Save and describe its horizon');
  await seen(page.getByRole('heading', { level: 1, name: ANTENNA }));
}

/** Uploads the mask as a file, reads what it became, and publishes it with its reason. */
export async function publishMask(page: Page): Promise<void> {
  await press(page, 'CSV');
  const desk = page.getByRole('dialog');
  const chooser = page.waitForEvent('filechooser');
  await press(desk, 'Upload a file');
  await (await chooser).setFiles({ name: 'horizon.csv', mimeType: 'text/csv', buffer: Buffer.from(MASK_CSV) });
  await desk.waitFor({ state: 'hidden' });
  await fill(page, { 'Reason, kept in the history': 'surveyed on 28 November' });
  await press(page, 'Publish this mask');
  await seen(page.getByText('The mask is published.'));
}

interface ReceiveBand {
  readonly band: string;
  readonly fromMhz: string;
  readonly toMhz: string;
  readonly gOverTDbK: string;
  readonly polarisations: readonly string[];
}

export const S_BAND: ReceiveBand = {
  band: 'S',
  fromMhz: '2200',
  toMhz: '2300',
  gOverTDbK: '16.5',
  polarisations: ['right', 'left'],
};

export async function addReceiveBand(page: Page, band: ReceiveBand): Promise<void> {
  await page.getByRole('tab', { name: 'Bands' }).click();
  await press(page, 'Add a band');
  const form = page.getByRole('dialog');
  await pick(form, 'Direction', 'Receive');
  await choose(form, 'Band', band.band);
  await fill(form, { From: band.fromMhz, To: band.toMhz, 'G/T': band.gOverTDbK });
  const polarisations = form.getByRole('group', { name: 'Polarisations it can take' });
  for (const one of band.polarisations) await polarisations.getByText(one, { exact: true }).click();
  await press(form, 'Add the band');
  await form.waitFor({ state: 'hidden' });
}

export async function setPrices(page: Page): Promise<void> {
  await page.getByRole('tab', { name: 'Prices' }).click();
  await fill(page, {
    'Each minute': '6.40',
    'Set-up, once a contact': '15',
    'Least charge of a contact': '30',
  });
  await press(page, 'Publish these prices');
  await seen(page.getByText('In force since'));
}

export async function openRoundTheClock(page: Page): Promise<void> {
  await page.getByRole('tab', { name: 'Availability' }).click();
  await press(page, 'Round the clock');
  await press(page, 'Save the hours');
  await seen(page.getByText('The hours are saved.'));
}

export async function askForApproval(page: Page): Promise<void> {
  await press(page, 'Ask for approval');
  await press(page.getByRole('dialog'), 'Ask for approval');
  await seen(page.getByText('Waits for approval'));
}

export async function putOnSale(page: Page): Promise<void> {
  await press(page, 'Put on sale');
  await press(page.getByRole('dialog'), 'Put on sale');
  await seen(page.getByText('On sale', { exact: true }));
}
