/** `npm run screenshots`: the pictures of the README, taken from the demo scenario in headless Chromium. */
import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { demoSignIns, startStack } from './stack.mjs';
import { build, freePort, install, ROOT, requireNode } from './toolbox.mjs';

requireNode();
const log = (text) => console.log(text);
if (!install(log) || !build(log)) process.exit(1);

const { chromium } = await import('playwright-core');
const PICTURES = join(ROOT, 'apps/web/pictures');
const DESKTOP = { width: 1440, height: 900 };
const PHONE = { width: 390, height: 844 };

/** Who looks at what. `open` clicks to what cannot be reached by an address alone. */
const SHOTS = [
  { name: 'find-time', as: 'operator', path: '/find-time', size: DESKTOP, open: pickFirst },
  { name: 'find-time-night', as: 'operator', path: '/find-time', size: DESKTOP, dark: true, open: pickFirst },
  { name: 'find-time-phone', as: 'operator', path: '/find-time', size: PHONE },
  { name: 'bookings', as: 'operator', path: '/bookings', size: DESKTOP },
  { name: 'contact', as: 'operator', path: '/bookings', size: DESKTOP, open: openFirstBooking },
  { name: 'antenna', as: 'station owner', path: '/stations', size: DESKTOP, open: openFirstMask },
  { name: 'home', as: 'operator', path: '/', size: DESKTOP },
  { name: 'plan', as: 'operator', path: '/plan', size: DESKTOP, open: openFirstPlan },
  { name: 'run-sheet', as: 'station owner', path: '/run-sheet', size: DESKTOP },
  { name: 'payouts', as: 'finance', path: '/payouts', size: DESKTOP },
  { name: 'ledger', as: 'finance', path: '/ledger', size: DESKTOP },
  { name: 'dispute', as: 'admin', path: '/disputes', size: DESKTOP, open: openBrokenOff },
];

async function pickFirst(page) {
  await page.getByRole('heading', { name: 'Next for sale' }).waitFor({ timeout: 60_000 });
  await page
    .locator('section, aside', { has: page.getByRole('heading', { name: 'Next for sale' }) })
    .last()
    .getByRole('button')
    .first()
    .click();
  await page.waitForLoadState('networkidle');
}
async function openFirstBooking(page) {
  await page.locator('main table a').first().click();
  await page.waitForLoadState('networkidle');
}
async function openFirstPlan(page) {
  await page.locator('main a[href^="/plan/"]').first().click();
  await page.waitForLoadState('networkidle');
}
/** The dispute with a gap in it, which shows the most; else the first. */
async function openBrokenOff(page) {
  const rows = page.locator('main tbody tr');
  const brokenOff = rows.filter({ hasText: 'The signal broke off' });
  const row = (await brokenOff.count()) > 0 ? brokenOff.first() : rows.first();
  await row.getByRole('link').first().click();
  await page.getByRole('heading', { name: 'Geometry' }).waitFor();
  await page.waitForLoadState('networkidle');
}
async function openFirstMask(page) {
  await page.locator('main table a').first().click();
  await page.getByRole('tab', { name: 'Mask' }).click();
  await page.waitForLoadState('networkidle');
}

const dataDir = process.env.SKYBERTH_DATA_DIR ?? mkdtempSync(join(tmpdir(), 'skyberth-pictures-'));
const stack = await startStack({ port: await freePort(), dataDir, log });
const browser = await chromium.launch({
  executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
  args: ['--headless', '--no-sandbox', '--disable-gpu'],
});
try {
  mkdirSync(PICTURES, { recursive: true });
  const signIns = demoSignIns(dataDir);
  for (const shot of SHOTS) {
    const who = signIns.find((one) => one.what.startsWith(shot.as));
    const context = await browser.newContext({
      viewport: shot.size,
      colorScheme: shot.dark ? 'dark' : 'light',
      reducedMotion: 'reduce',
    });
    const page = await context.newPage();
    await page.goto(`${stack.urls.app}/sign-in`);
    await page.getByLabel('E-mail').fill(who.email);
    await page.getByLabel('Password').first().fill(who.password);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
    await page.goto(`${stack.urls.app}${shot.path}`);
    await page.waitForLoadState('networkidle');
    await shot.open?.(page);
    await page.waitForTimeout(600);
    await page.screenshot({ path: join(PICTURES, `${shot.name}.png`) });
    log(`took ${shot.name}`);
    await context.close();
  }
} finally {
  await browser.close();
  await stack.stop();
  if (!process.env.SKYBERTH_DATA_DIR) rmSync(dataDir, { recursive: true, force: true });
}
