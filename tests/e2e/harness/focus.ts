/** Where the keyboard stands, and walking with it. */
import type { Page } from 'playwright-core';
import { vi } from 'vitest';
import { PATIENCE_MS } from './browser.js';

/** More presses than any page needs to reach what a person came for. */
const MOST_PRESSES = 60;

/** What a screen reader would call the focused control, near enough for a test. */
const NAME = `(() => {
  const at = document.activeElement;
  return at?.getAttribute('aria-label') ?? at?.labels?.[0]?.textContent ?? at?.textContent ?? '';
})()`;

export const focusedName = async (page: Page): Promise<string> => String(await page.evaluate(NAME));

/** Presses Tab until the focus is on something of this name; throws when it is not reached. */
export async function tabTo(page: Page, name: RegExp): Promise<string> {
  const passed: string[] = [];
  for (let count = 0; count < MOST_PRESSES; count += 1) {
    await page.keyboard.press('Tab');
    const now = await focusedName(page);
    if (name.test(now)) return now;
    passed.push(now.slice(0, 40));
  }
  throw new Error(`${MOST_PRESSES} presses of Tab did not lead to ${name}. They passed: ${passed.join(' | ')}`);
}

/** Presses a key that moves the focus, and answers what it came to; the board shows it first where it was out of sight. */
export async function moveFocus(page: Page, key: string): Promise<string> {
  const before = await focusedName(page);
  await page.keyboard.press(key);
  return vi.waitFor(
    async () => {
      const after = await focusedName(page);
      if (after === before) throw new Error(`${key} did not move the focus from ${before}.`);
      return after;
    },
    { timeout: PATIENCE_MS, interval: 50 },
  );
}

/** Walks with a key until the focused control has this name. */
export async function walkTo(page: Page, key: string, name: RegExp): Promise<string> {
  let now = await focusedName(page);
  for (let count = 0; count < MOST_PRESSES && !name.test(now); count += 1) now = await moveFocus(page, key);
  if (!name.test(now)) throw new Error(`${MOST_PRESSES} presses of ${key} did not lead to ${name}.`);
  return now;
}
