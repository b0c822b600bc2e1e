/** From page to page by the head line, as a person goes: what doesn't fit there stands behind `More`. */
import type { Page } from 'playwright-core';

export async function goToPage(page: Page, name: string): Promise<void> {
  const pages = page.getByRole('navigation', { name: 'Pages', exact: true });
  await pages.getByRole('link').first().waitFor();
  const link = pages.getByRole('link', { name });
  if ((await link.count()) > 0) return link.first().click();
  await pages.getByRole('button').click();
  await page.getByRole('menuitem', { name }).click();
}
