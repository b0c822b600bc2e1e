/** What both sides and an admin do in the pages around a contact: report it live, report how it went, dispute it, decide. */
import type { Booking, Dispute } from '@skyberth/shared';
import type { Locator, Page } from 'playwright-core';
import { choose, fill, pick, press, seen } from './fields.js';
import { goToPage } from './pages.js';

/** `14:07:12`, as forms take the times of a contact and as figures show them. */
export const clockText = (timeMs: number): string => new Date(timeMs).toISOString().slice(11, 19);

/** What the station reported live, on either side's page. */
export const fromTheStation = (page: Page): Locator => page.getByRole('region', { name: 'From the station' });

/** The value beside a label among the figures of a region, once it has come. */
export const figure = (place: Locator, label: string, value: string | RegExp): Locator =>
  place
    .locator('dt')
    .filter({ hasText: new RegExp(`^${label}$`) })
    .locator('xpath=following-sibling::dd')
    .filter({ hasText: value });

export async function openContact(page: Page, { id, spacecraftName }: Booking): Promise<void> {
  await page.goto(new URL(`/bookings/${id}`, page.url()).href);
  await seen(page.getByRole('heading', { level: 1, name: new RegExp(`^${spacecraftName} at`) }));
}

export const reportAcquired = (page: Page): Promise<void> => press(fromTheStation(page), /^Acquired/);

export async function reportBytes(page: Page, megabytes: number, ebN0Db: number): Promise<void> {
  await press(fromTheStation(page), /^Bytes/);
  const form = page.getByRole('dialog');
  await fill(form, { 'Received so far, MB': String(megabytes), 'Eb/N0, dB': String(ebN0Db) });
  await press(form, 'Send');
  await form.waitFor({ state: 'hidden' });
}

export async function reportFade(page: Page): Promise<void> {
  await press(fromTheStation(page), /^Lost/);
  const form = page.getByRole('dialog');
  await press(form, 'It faded, we keep on it');
  await form.waitFor({ state: 'hidden' });
}

export interface BadOutcome {
  readonly acquiredMs: number;
  readonly lostMs: number;
  readonly megabytes: number;
  readonly note: string;
}

/** The station's own report: degraded, and the station was the cause. */
export async function reportDegraded(page: Page, outcome: BadOutcome): Promise<void> {
  const form = page.getByRole('form', { name: 'Report the contact' });
  await pick(form, 'How it went', 'Degraded');
  await choose(form, 'Cause', 'station');
  await fill(form, {
    'Acquired at, UTC': clockText(outcome.acquiredMs),
    'Lost at, UTC': clockText(outcome.lostMs),
    Received: String(outcome.megabytes),
    'Note; the buyer reads it': outcome.note,
  });
  await press(form, /^Report it and settle/);
  await seen(page.getByRole('heading', { name: /report: degraded/ }));
}

/** From the contact's page into an open dispute. */
export async function openDispute(page: Page, gap: { fromMs: number; toMs: number }, words: string): Promise<void> {
  await page.getByRole('link', { name: 'Dispute this contact' }).click();
  await choose(page, 'What was wrong', 'The signal broke off');
  await fill(page, {
    'What happened, in your words; the station and the marketplace read them': words,
    'No data from, UTC': clockText(gap.fromMs),
    'to, UTC': clockText(gap.toMs),
  });
  await press(page, 'Open the dispute');
  await page.waitForURL(/\/disputes\//);
  await seen(page.getByRole('heading', { name: 'Not decided yet' }));
}

export async function answerDispute(page: Page, words: string): Promise<void> {
  await page.getByRole('link', { name: 'Evidence, statements and what comes next' }).click();
  await fill(page, { "What your side says; it can't be changed later": words });
  await press(page, 'Put it on the record');
  await seen(page.getByRole('listitem').filter({ hasText: words }));
}

/** From anywhere to the dispute, by the list of those that wait. */
export async function findDispute(page: Page, { number }: Pick<Dispute, 'number'>): Promise<void> {
  await goToPage(page, 'Disputes');
  await page.getByRole('link', { name: String(number), exact: true }).click();
  await seen(page.getByRole('heading', { name: 'Your decision' }));
}

/** Half of the price goes back, borne by the station. Answers the sum that was on the button, in minor units. */
export async function refundHalf(page: Page, reasons: string): Promise<number> {
  const desk = page.getByRole('region', { name: 'Your decision' });
  await desk.getByRole('radio', { name: /^Part/ }).check();
  await fill(desk, { 'Share of the price': '50', 'Reasons, read by both sides': reasons });
  // The button takes its words when the sums of the newest share have come.
  await seen(desk.getByRole('button', { name: /^Refund €/ }).and(desk.locator('button:enabled')));
  const button = desk.getByRole('button', { name: /^Refund €/ });
  const words = (await button.textContent()) ?? '';
  await button.click();
  await seen(page.getByRole('heading', { name: 'Decision: 50 % back' }));
  return Math.round(Number(words.replaceAll(/[^\d.]/g, '')) * 100);
}
