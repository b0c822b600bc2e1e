/** Who is at a dish when the visitor comes, and what the watch before wrote. */
import { routes } from '@skyberth/shared';
import type { Company } from './settle-in.js';
import type { Stage } from './stage.js';

const NOTES = [
  'De-icer of the large dish trips above 8 A; reset in cabinet 2. Wind 31 km/h, gusts 44; stow at 70.',
  'New feed cover since noon. Watch the first low pass in the north and write down the Eb/N0.',
];

export async function manTheStations(stage: Stage, company: Company): Promise<void> {
  for (const [index, { manager }] of company.owners.entries()) {
    const sheet = await stage.call(manager, routes.runSheet, { query: {} });
    const text = NOTES[index % NOTES.length] ?? '';
    await stage.call(manager, routes.writeHandOver, { params: { id: sheet.station.id }, body: { text } });
    // At the dish that moves last, so that nothing sold is kept waiting for long.
    const firstMs = (antennaId: string) => {
      const [next] = sheet.contacts.filter((contact) => contact.antennaId === antennaId);
      return next ? Date.parse(next.setupStartsUtc) : Number.POSITIVE_INFINITY;
    };
    const [quiet] = sheet.antennas.toSorted((a, b) => firstMs(b.id) - firstMs(a.id));
    if (!quiet || index > 1) continue;
    await stage.call(manager, routes.enterDish, { params: { id: quiet.id }, body: { name: 'Tom Askew' } });
  }
}
