/** Coming in: sign-up and sign-in through the pages. */
import type { Page } from 'playwright-core';
import { fill, pick, press, seen } from './fields.js';
import { PASSWORD } from './harbour.js';

export interface Newcomer {
  readonly kind: 'operator' | 'owner';
  readonly name: string;
  readonly email: string;
  readonly organisation: string;
  readonly country: string;
}

export async function signUp(page: Page, url: string, who: Newcomer): Promise<void> {
  await page.goto(`${url}/sign-in`);
  await page.getByRole('link', { name: 'New here? Open an account' }).click();
  await pick(page, 'What your organisation does', who.kind === 'operator' ? 'We fly spacecraft' : 'We own antennas');
  await fill(page, {
    'Your name': who.name,
    'Your e-mail': who.email,
    Password: PASSWORD,
    Organisation: who.organisation,
    'Street and number': 'Pier Road 7',
    'Postal code': '4005',
    Town: 'Northhaven',
    Country: who.country,
  });
  await press(page, 'Open the account');
  await page.waitForURL((address) => !address.pathname.startsWith('/sign-up'));
}

export async function signIn(page: Page, url: string, email: string): Promise<void> {
  await page.goto(`${url}/sign-in`);
  await fill(page, { 'E-mail': email, Password: PASSWORD });
  await press(page, 'Sign in');
  await page.waitForURL((address) => !address.pathname.startsWith('/sign-in'));
}

/** Follows the link of an invitation and sets the first password. */
export async function comeByInvitation(page: Page, link: string): Promise<void> {
  await page.goto(link);
  await fill(page, { 'New password': PASSWORD });
  await press(page, 'Set the password');
  await seen(page.getByText('The password is set'));
}
