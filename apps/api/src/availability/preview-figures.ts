/** The arithmetic of a preview: what served contacts would cost by another card, and what sold ones would lose. */
import { type Interval, lengthText, quote, subtractIntervals, totalMs, volumeMonth } from '@skyberth/market';
import { formatMoney } from '@skyberth/money';
import type { SaleAntenna } from '../stations/antenna-catalogue.js';
import type { ServedContact, SoldContact } from './availability.repository.js';

/** Below this a loss is only the rounding of times to milliseconds. */
const LEAST_MS = 500;

/** What an antenna is open for in a period, and what closes it again. */
export interface Times {
  readonly open: readonly Interval[];
  readonly blackouts: readonly Interval[];
}

/** Open and not blacked out. */
export const freeTimes = ({ open, blackouts }: Times): Interval[] => subtractIntervals(open, blackouts);

/**
 * What each contact would cost by a card, bought as long before as it was; volume is counted over the whole station.
 * `contacts` in the order they were bought, of the whole station; only those of the antenna are priced.
 */
export function pricesBy(
  antenna: Pick<SaleAntenna, 'id' | 'price' | 'timeZone'>,
  contacts: readonly ServedContact[],
): number[] {
  const minutes = new Map<string, number>();
  return contacts.flatMap((contact) => {
    const month = `${contact.operatorId} ${volumeMonth(contact.aosMs, antenna.timeZone).fromMs}`;
    const soFar = minutes.get(month) ?? 0;
    minutes.set(month, soFar + (contact.losMs - contact.aosMs) / 60_000);
    if (contact.antennaId !== antenna.id) return [];
    const { totalMinor } = quote(
      {
        card: antenna.price,
        fromMs: contact.aosMs,
        toMs: contact.losMs,
        buyMs: Math.min(contact.boughtMs, contact.aosMs),
        monthlyMinutesSoFar: soFar,
        timeZone: antenna.timeZone,
      },
      writeMoney,
    );
    return [totalMinor];
  });
}

export const sum = (amounts: readonly number[]): number => amounts.reduce((total, each) => total + each, 0);

/** Why a change of hours or blackouts touches a contact, in a sentence; null where it loses nothing that it had. */
export function timesTouch(contact: SoldContact, before: Times, after: Times): string | null {
  const pass: Interval[] = [{ fromMs: contact.aosMs, toMs: contact.losMs }];
  const closedMs = totalMs(subtractIntervals(pass, after.open)) - totalMs(subtractIntervals(pass, before.open));
  if (closedMs > LEAST_MS) return `${lengthText(closedMs)} of it would lie outside the opening hours.`;
  const guard: Interval[] = [{ fromMs: contact.guardFromMs, toMs: contact.guardToMs }];
  const left = (times: Times): number => totalMs(subtractIntervals(guard, times.blackouts));
  const blockedMs = left(before) - left(after);
  if (blockedMs <= LEAST_MS) return null;
  return `A blackout would lie over ${lengthText(blockedMs)} of it, set-up and teardown included.`;
}

/** Why a change of mask touches a contact; `visibleMs` is how much of it is above the mask, before and after. */
export function maskTouch(contact: SoldContact, visibleMs: { readonly before: number; readonly after: number }) {
  const lostMs = visibleMs.before - visibleMs.after;
  if (lostMs <= LEAST_MS) return null;
  if (visibleMs.after <= 0) return 'The new mask would hide all of it.';
  return `The new mask would hide ${lengthText(lostMs)} of its ${lengthText(contact.losMs - contact.aosMs)}.`;
}

/** What the buyer has in hand when the owner changes something under a sold contact. */
export const buyerGets = ({ toPayMinor, currency }: SoldContact): string =>
  `It stays sold at its price. If you cancel it, all of ${writeMoney(toPayMinor, currency)} goes back to the buyer.`;

const writeMoney = (amountMinor: number, currency: string): string => formatMoney({ amountMinor, currency });
