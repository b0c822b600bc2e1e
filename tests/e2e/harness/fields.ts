/** Filling in forms as a person does: by the label that stands beside the field. */
import type { Locator, Page } from 'playwright-core';

type Place = Page | Locator;

/** Types into text and number fields, by label. */
export async function fill(place: Place, values: Readonly<Record<string, string>>): Promise<void> {
  for (const [label, value] of Object.entries(values)) await textBox(place, label).fill(value);
}

export const textBox = (place: Place, name: string): Locator => place.getByRole('textbox', { name, exact: true });

/** Chooses from a list that opens, by the first words of an entry; what is typed narrows it. */
export async function choose(place: Place, label: string, option: string): Promise<void> {
  const page = 'page' in place ? place.page() : place;
  const box = place.getByRole('combobox', { name: label, exact: true });
  await box.click();
  if (await box.isEditable()) await box.fill(option);
  const words = option.replaceAll(/[.*+?^${}()|[\]\\]/g, '\\$&');
  await page.getByRole('option', { name: new RegExp(`^${words}(,|$)`) }).click();
}

/** One of a few that stand side by side. */
export async function pick(place: Place, group: string, option: string): Promise<void> {
  await place.getByRole('radiogroup', { name: group }).getByText(option, { exact: true }).click();
}

export const press = (place: Place, name: string | RegExp): Promise<void> =>
  place.getByRole('button', { name, exact: typeof name === 'string' }).click();

/** Waits until something is seen. */
export const seen = (locator: Locator): Promise<void> => locator.first().waitFor({ state: 'visible' });
