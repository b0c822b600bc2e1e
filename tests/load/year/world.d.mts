/** What `world.mjs` exports for tests. */
import type { bookings, openDatabase } from '@skyberth/drizzle';
import type { Quote } from '@skyberth/shared';

interface Operator {
  readonly id: string;
  readonly spacecraftId: string;
  readonly elementSetId: string;
}
interface Owner {
  readonly id: string;
  readonly antennaId: string;
}
export function makeWorld(
  db: ReturnType<typeof openDatabase>,
  startMs: number,
): { personId: string; operators: Operator[]; owners: Owner[] };
export function bookingRow(contact: {
  operator: Operator;
  owner: Owner;
  quote: Quote;
  personId: string;
  id: string;
  number: number;
  aosMs: number;
  nowMs: number;
}): typeof bookings.$inferInsert;
export function quoteOf(price: {
  currency: string;
  netMinor: number;
  vatMinor: number;
  rateBasisPoints: number;
}): Quote;
