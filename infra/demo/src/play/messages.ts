/** A few words between the two sides of contacts to come and of those that were flown. */
import { type BookingSummary, routes } from '@skyberth/shared';
import type { Actor } from './client.js';
import type { Company } from './settle-in.js';
import type { Stage } from './stage.js';

const QUESTIONS = [
  [
    'Please record the raw frames as well this time; we look for a bit slip.',
    'We will. The file comes with the report.',
  ],
  ['The beacon is on a spare transmitter, about 4 kHz low.', 'Noted on the run sheet. Thank you.'],
  ['Could you begin the recording a minute before AOS?', null],
] as const;

/** The operator asks, the station answers; the last question of each is new to the station. */
export async function writeToEachOther(stage: Stage, company: Company): Promise<void> {
  for (const { manager } of company.operators.slice(0, 3)) {
    const coming = await bookingsOf(stage, manager, 'confirmed', 'aos');
    const flown = await bookingsOf(stage, manager, 'settled', '-aos');
    const [first, second, third] = [coming[0], flown[0], coming[1]];
    for (const [index, booking] of [first, second, third].entries()) {
      const [question, answer] = QUESTIONS[index] ?? [null, null];
      const owner = booking && company.ownerOf.get(booking.antennaId);
      if (!booking || !owner || question === null) continue;
      const params = { id: booking.id };
      await stage.call(manager, routes.sendMessage, { params, body: { text: question } });
      if (answer !== null) await stage.call(owner, routes.sendMessage, { params, body: { text: answer } });
    }
  }
  await stage.settle();
}

async function bookingsOf(
  stage: Stage,
  operator: Actor,
  state: string,
  sort: 'aos' | '-aos',
): Promise<readonly BookingSummary[]> {
  const { items } = await stage.call(operator, routes.listBookings, { query: { state, sort, pageSize: 5 } });
  return items;
}
