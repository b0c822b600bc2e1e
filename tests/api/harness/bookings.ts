/** Contacts that keep an antenna busy, for tests about what remains. */
import type { Skyberth } from '../harness.js';
import { addSoldContact, type SoldContactOptions } from './sold-contact.js';

type Occupied = Omit<SoldContactOptions, 'aosMs' | 'losMs' | 'guardFromMs' | 'guardToMs'> & {
  readonly guardFromMs: number;
  readonly guardToMs: number;
  /** Parts of the guarded time; none where not given. */
  readonly setupMs?: number;
  readonly teardownMs?: number;
};

/** Sells the guarded time and returns the booking's id. */
export function occupy(skyberth: Skyberth, { setupMs = 0, teardownMs = 0, ...guarded }: Occupied): string {
  const [aosMs, losMs] = [guarded.guardFromMs + setupMs, guarded.guardToMs - teardownMs];
  return addSoldContact(skyberth, { ...guarded, aosMs, losMs }).booking;
}
