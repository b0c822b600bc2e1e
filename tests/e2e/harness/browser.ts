/** The browser of the machine: headless Chromium, one for a whole file of tests. */
import { spawnSync } from 'node:child_process';
import { type Browser, type BrowserContext, type BrowserContextOptions, chromium, type Page } from 'playwright-core';

const ARGUMENTS = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
/** How long one act may take on a busy machine before the test calls it broken. */
export const PATIENCE_MS = 60_000;
export const DESKTOP = { width: 1440, height: 900 };
export const PHONE = { width: 390, height: 844 };

/** Throws where the machine has no Chromium; a browser test without a browser has failed. */
export async function launchBrowser(): Promise<Browser> {
  const found = spawnSync('sh', ['-c', 'command -v chromium'], { encoding: 'utf8' });
  const executablePath = found.stdout.trim();
  if (!executablePath) {
    throw new Error('Chromium is not on the PATH. Install it (Debian: apt-get install chromium) and run this again.');
  }
  return chromium.launch({ executablePath, args: ARGUMENTS });
}

/** Somebody's browser: cookies of their own, and the faults that the page's own code threw. */
export interface Desk {
  readonly context: BrowserContext;
  readonly page: Page;
  readonly faults: readonly string[];
}

export async function openDesk(browser: Browser, options: BrowserContextOptions = {}): Promise<Desk> {
  const context = await browser.newContext({ viewport: DESKTOP, reducedMotion: 'reduce', ...options });
  context.setDefaultTimeout(PATIENCE_MS);
  const page = await context.newPage();
  const faults: string[] = [];
  page.on('pageerror', (error) => faults.push(`${page.url()}: ${error.message}`));
  return { context, page, faults };
}
