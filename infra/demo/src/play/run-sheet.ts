/** Who is at a dish when the visitor comes, and what the watch before wrote. */
import { type RunSheet, routes } from '@skyberth/shared';
import type { Company } from './settle-in.js';
import type { Stage } from './stage.js';

const NOTES = [
  'De-icer of the large dish trips above 8 A; reset in cabinet 2. Wind 31 km/h, gusts 44; stow at 70.',
  'New feed cover since noon. Watch the first low pass in the north and write down the Eb/N0.',
];

const HOUR_MS = 3_600_000;
/** A dish that moves no sooner than this is one to work at. */
const QUIET_MS = 3 * HOUR_MS;

export async function manTheStations(stage: Stage, company: Company): Promise<void> {
  let isAnybodyOut = false;
  for (const [index, { manager }] of company.owners.entries()) {
    const { stations } = await stage.call(manager, routes.runSheet, { query: {} });
    for (const { id } of stations) {
      const sheet = await stage.call(manager, routes.runSheet, { query: { stationId: id } });
      const text = NOTES[index % NOTES.length] ?? '';
      await stage.call(manager, routes.writeHandOver, { params: { id }, body: { text } });
      const quiet = sheet.antennas.find((antenna) => firstMs(sheet, antenna.id) > stage.nowMs() + QUIET_MS);
      if (isAnybodyOut || !quiet) continue;
      await stage.call(manager, routes.enterDish, { params: { id: quiet.id }, body: { name: 'Tom Askew' } });
      isAnybodyOut = true;
    }
  }
}

function firstMs(sheet: RunSheet, antennaId: string): number {
  const next = sheet.contacts.find((contact) => contact.antennaId === antennaId);
  return next ? Date.parse(next.setupStartsUtc) : Number.POSITIVE_INFINITY;
}
