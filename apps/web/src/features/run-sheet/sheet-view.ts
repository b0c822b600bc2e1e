/** The run sheet sorted into now, next and later. Pure. */
import type { RunSheet, SheetAntenna, SheetContact } from '@skyberth/shared';
import { formatDegrees, formatDuration } from '../../ui/format.js';

/** What one dish does now, and what it does next. */
export interface DishNow {
  readonly antenna: SheetAntenna;
  /** In set-up, under way or in teardown; with several beams the ones beside it come too. */
  readonly now: readonly SheetContact[];
  readonly next: SheetContact | null;
  readonly isClear: boolean;
}

export interface SheetView {
  readonly dishes: readonly DishNow[];
  readonly next: readonly SheetContact[];
  readonly later: readonly SheetContact[];
  /** Waits for the owner's answer: never shown as sold. */
  readonly asked: readonly SheetContact[];
  readonly transmitting: readonly SheetContact[];
}

const NEXT_SHOWN = 4;
const BUSY: readonly SheetContact['state'][] = ['confirmed', 'under way', 'reporting'];

export function sheetView(sheet: RunSheet, nowMs: number): SheetView {
  const isNow = (contact: SheetContact) =>
    BUSY.includes(contact.state) &&
    Date.parse(contact.setupStartsUtc) <= nowMs &&
    nowMs < Date.parse(contact.teardownEndsUtc);
  const toCome = sheet.contacts.filter((contact) => Date.parse(contact.setupStartsUtc) > nowMs);
  return {
    dishes: sheet.antennas.map((antenna) => ({
      antenna,
      now: sheet.contacts.filter((contact) => contact.antennaId === antenna.id && isNow(contact)),
      next: toCome.find((contact) => contact.antennaId === antenna.id && contact.state === 'confirmed') ?? null,
      isClear: antenna.visits.length === 0 && antenna.stop === null,
    })),
    next: toCome.slice(0, NEXT_SHOWN),
    later: toCome.slice(NEXT_SHOWN),
    asked: toCome.filter((contact) => contact.state === 'awaiting owner'),
    transmitting: sheet.contacts.filter(
      (contact) =>
        contact.need !== 'downlink' && contact.state !== 'awaiting owner' && Date.parse(contact.losUtc) > nowMs,
    ),
  };
}

/** Where the dish turns before a contact, and whether it has the time. */
export function slewWords(contact: SheetContact): string {
  const to = formatDegrees(contact.aosAzimuthDeg, 0);
  if (!contact.slew) return `turns to ${to}`;
  const { fromAzimuthDeg, needS, givenS, fits } = contact.slew;
  const way = `${formatDegrees(fromAzimuthDeg, 0)} to ${to}`;
  if (needS === null) return `${way}: out of the dish’s travel`;
  const turning = `turning ${formatDuration(needS * 1000)}`;
  return fits ? `${way}, ${turning}` : `${way}, ${turning}, has ${formatDuration(givenS * 1000)}`;
}

export const NEED_WORDS: Readonly<Record<SheetContact['need'], string>> = {
  downlink: 'down only',
  uplink: 'up only',
  both: 'up and down',
};
