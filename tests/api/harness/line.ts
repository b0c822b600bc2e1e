/** A group and a place in a line written straight into the database, for tests about who may reach them. */
import { randomUUID } from 'node:crypto';
import { bookingGroups, openDatabase, standbyEntries } from '@skyberth/drizzle';
import type { Person, Skyberth } from '../harness.js';

/** Adds a group that is over, and a place in the line for a pass of tomorrow. */
export function addGroupAndPlace(
  skyberth: Skyberth,
  { operator, antennaId, spacecraftId }: { operator: Person; antennaId: string; spacecraftId: string },
): { group: string; place: string } {
  const nowMs = skyberth.clock.nowMs();
  const [group, place] = [randomUUID(), randomUUID()];
  const own = { operatorId: operator.organisationId };
  const aosMs = nowMs + 86_400_000;
  const losMs = aosMs + 480_000;
  const db = openDatabase(skyberth.databaseFile);
  try {
    db.insert(bookingGroups)
      .values({ ...own, id: group, createdBy: operator.personId, createdMs: nowMs, holdEndsMs: nowMs })
      .run();
    db.insert(standbyEntries)
      .values({
        ...own,
        id: place,
        place: 1,
        personId: operator.personId,
        antennaId,
        spacecraftId,
        need: 'downlink',
        bands: [],
        aosMs,
        losMs,
        guardFromMs: aosMs,
        guardToMs: losMs,
        state: 'waiting',
        note: '',
        joinedMs: nowMs,
        changedMs: nowMs,
      })
      .run();
  } finally {
    db.$client.close();
  }
  return { group, place };
}
