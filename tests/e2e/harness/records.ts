/** What stands in the books: read through the API with the cookies of the browser, to compare a page with it. */
import { randomUUID } from 'node:crypto';
import { Booking, fillPath, IDEMPOTENCY_HEADER, Problem, routes } from '@skyberth/shared';
import type { BrowserContext } from 'playwright-core';

/** The id in the address of a contact's page. */
export function bookingIdIn(address: string): string {
  const id = /\/bookings\/([\w-]+)/.exec(address)?.[1];
  if (!id) throw new Error(`${address} is not the page of a contact.`);
  return id;
}

export async function bookingOf(context: BrowserContext, url: string, id: string): Promise<Booking> {
  const answer = await context.request.get(`${url}${fillPath(routes.getBooking.path, { id })}`);
  return Booking.parse(await answer.json());
}

/** The same time for another spacecraft, asked of the API itself, past everything that the page would hold back. */
export async function tryToHold(
  context: BrowserContext,
  url: string,
  wish: Pick<Booking, 'antennaId' | 'aosUtc' | 'losUtc' | 'toPayMinor'> & { readonly spacecraftId: string },
): Promise<{ status: number; contentType: string; problem: Problem }> {
  const { antennaId, spacecraftId, aosUtc, losUtc, toPayMinor } = wish;
  const answer = await context.request.post(`${url}${routes.holdBerth.path}`, {
    headers: { [IDEMPOTENCY_HEADER]: randomUUID() },
    data: { antennaId, spacecraftId, need: 'downlink', aosUtc, losUtc, expectedToPayMinor: toPayMinor },
  });
  const contentType = answer.headers()['content-type'] ?? '';
  return { status: answer.status(), contentType, problem: Problem.parse(await answer.json()) };
}
