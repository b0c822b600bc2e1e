/** Every page that matters, judged by axe-core in both colour schemes, wide and on a phone. Criteria: WCAG 2.2 A and AA. */
import { AxeBuilder } from '@axe-core/playwright';
import { routes } from '@skyberth/shared';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { paths } from '../../apps/web/src/lib/paths.js';
import { must } from '../api/harness/client.js';
import { DESKTOP, type Desk, launchBrowser, openDesk, PHONE } from './harness/browser.js';
import { seen } from './harness/fields.js';
import { type Harbour, startHarbour } from './harness/harbour.js';
import { buyerWithSpacecraft, type Market, openMarket } from './harness/market.js';
import * as buying from './harness/operator-desk.js';
import { signIn } from './harness/people.js';
import { bookingIdIn } from './harness/records.js';
import { step } from './harness/steps.js';

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const LOOKS = [
  { name: 'wide, by day', viewport: DESKTOP, colorScheme: 'light' },
  { name: 'wide, night watch', viewport: DESKTOP, colorScheme: 'dark' },
  { name: 'phone, by day', viewport: PHONE, colorScheme: 'light' },
  { name: 'phone, night watch', viewport: PHONE, colorScheme: 'dark' },
] as const;

const ROLES = ['operator', 'owner', 'admin', 'finance'] as const;
type Role = (typeof ROLES)[number];

interface Screen {
  readonly name: string;
  readonly path: string;
  /** What stands on it once it has loaded. */
  readonly shows: (page: Page) => ReturnType<Page['locator']>;
}

/** Four looks at some fifteen pages; a busy machine takes seconds for each. */
const LOOK_MS = 900_000;

const heading = (name: string | RegExp) => (page: Page) => page.getByRole('heading', { level: 1, name });

const HOME: Screen = { name: 'home', path: paths.home, shows: heading(/^Good to see you/) };
/** A page that is judged by what stands there without any work done on it, empty states included. */
const plain = (title: string | RegExp, path: string): Screen => ({ name: path, path, shows: heading(title) });
const SIGN_IN: Screen = { name: 'sign-in', path: paths.signIn, shows: heading('Sign in') };

describe('for everybody', () => {
  let harbour: Harbour;
  let browser: Browser;
  let market: Market;
  let emails: Readonly<Record<Role, string>>;
  let bookingId: string;
  beforeAll(async () => {
    [harbour, browser] = await Promise.all([startHarbour(), launchBrowser()]);
    market = await openMarket(harbour);
    const buyer = await buyerWithSpacecraft(harbour, 'Whimbrel Orbits', 99_601);
    const [admin, finance] = [await harbour.people.staff('admin'), await harbour.people.staff('finance')];
    emails = { operator: buyer.email, owner: market.owner.email, admin: admin.email, finance: finance.email };
    await waitingStation();
    bookingId = await soldContact(buyer.email);
  });
  afterAll(async () => {
    await browser?.close();
    await harbour?.stop();
  });

  /** Something for the approvals page to show. */
  async function waitingStation(): Promise<void> {
    const as = market.owner;
    const { name: _name, id: _id, ...place } = market.station;
    const { id } = await must(harbour.call(routes.createStation, { body: { ...place, name: 'Skerry' }, as }));
    await must(harbour.call(routes.submitStation, { params: { id }, as }));
  }

  /** One contact that is paid for, one pass that is held. */
  async function soldContact(email: string): Promise<string> {
    const desk = await openDesk(browser);
    return step('buying a contact', desk, async () => {
      const { page } = desk;
      await signIn(page, harbour.url, email);
      await buying.findTime(page);
      await buying.pickPass(page);
      await buying.holdPass(page);
      await buying.tray(page).getByRole('button', { name: 'Pay and confirm' }).click();
      await buying.payByCard(page, buying.GOOD_CARD);
      await seen(page.getByText('Paid and confirmed.'));
      return bookingIdIn(page.url());
    });
  }

  const screens = (): Readonly<Record<Role, readonly Screen[]>> => ({
    operator: [
      {
        name: 'find time',
        path: paths.findTime,
        shows: (page) => page.getByRole('status').filter({ hasText: /for sale of \d+ pass/ }),
      },
      { name: 'bookings', path: paths.bookings, shows: (page) => page.getByText('Confirmed', { exact: true }) },
      {
        name: 'bookings in the calendar',
        path: `${paths.bookings}?view=calendar`,
        shows: (page) => page.getByText('Times in UTC.'),
      },
      {
        name: 'contact',
        path: paths.booking(bookingId),
        shows: (page) => page.getByRole('heading', { name: 'Files' }),
      },
      { name: 'spacecraft', path: paths.spacecraft, shows: (page) => page.getByText('Pipit 99601') },
      plain('Plan', paths.plans),
      plain('Standby', paths.standby),
      plain('Clearances', paths.clearances),
      plain('Messages', paths.messages),
      plain('Monthly account', paths.monthlyAccount),
      plain('Security', paths.security),
      plain('Help', paths.help),
    ],
    owner: [
      { name: 'stations', path: paths.stations, shows: (page) => page.getByText('Skerry') },
      ...['overview', 'mask', 'bands', 'prices', 'hours'].map((tab) => ({
        name: `antenna, ${tab}`,
        path: paths.antennaTab(market.antenna.id, tab),
        shows: heading(market.antenna.name),
      })),
      { name: 'requests', path: paths.requests, shows: heading('Requests') },
      plain(/run sheet/i, paths.runSheet),
      plain('Earnings', paths.invoices),
    ],
    admin: [
      { name: 'approvals', path: paths.approvals, shows: (page) => page.getByText('Skerry') },
      plain('Disputes', paths.disputes),
      plain('Accounts', paths.accounts),
      plain('Audit', paths.audit),
      plain('System', paths.system),
    ],
    finance: [
      { name: 'ledger', path: paths.ledger, shows: (page) => page.getByText('Every account is empty.') },
      plain('Payouts', paths.payouts),
      plain('Reconciliation', paths.reconciliation),
      plain('Tax and fees', paths.taxAndFees),
      plain('Monthly accounts', paths.creditAccounts),
    ],
  });

  it.each(ROLES)(
    'shows nothing serious to an accessibility checker on any page of the %s, in any look',
    async (role) => {
      const found: string[] = [];
      const desk = await openDesk(browser);
      if (role === 'operator') found.push(...(await lookAt(desk, SIGN_IN)));
      await step(`signing in as ${role}`, desk, () => signIn(desk.page, harbour.url, emails[role]));
      for (const screen of [HOME, ...screens()[role]]) found.push(...(await lookAt(desk, screen)));
      await desk.context.close();
      expect([...found, ...desk.faults]).toEqual([]);
    },
    LOOK_MS,
  );

  /** Loads the page once and judges it in every look; the page follows the window and the device's colours by itself. */
  const lookAt = (desk: Desk, screen: Screen) =>
    step(`looking at ${screen.name}`, desk, async () => {
      const { page } = desk;
      const found: string[] = [];
      await page.goto(`${harbour.url}${screen.path}`);
      for (const { name, viewport, colorScheme } of LOOKS) {
        await page.setViewportSize(viewport);
        await page.emulateMedia({ colorScheme });
        await seen(page.locator(`html[data-mantine-color-scheme="${colorScheme}"]`));
        await seen(screen.shows(page));
        found.push(...(await judge(page, `${screen.name}, ${name}`)));
      }
      return found;
    });
});

/** One line for each serious or critical finding, with the first place where it is. */
async function judge(page: Page, where: string): Promise<string[]> {
  // No page has frames, which is all that the other mode is for; this one needs no second page for each judgement.
  const { violations } = await new AxeBuilder({ page }).setLegacyMode().withTags(RULES).analyze();
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(({ id, nodes }) => `${where}: ${id}, ${nodes.length} times, first ${nodes[0]?.html.slice(0, 160)}`);
}
