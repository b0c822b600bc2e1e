import type { RunSheet, SheetContact } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { sheetView, slewWords } from './sheet-view.js';

const START_MS = Date.parse('2026-12-01T14:00:00Z');
const at = (minutes: number): string => new Date(START_MS + minutes * 60_000).toISOString();

const contact = (number: number, fromMin: number, change: Partial<SheetContact> = {}): SheetContact => ({
  bookingId: `00000000-0000-7000-8000-00000000${number}`,
  number,
  antennaId: 'east',
  beam: 1,
  state: 'confirmed',
  spacecraftName: 'Whimbrel 5',
  operatorName: 'Saltmarsh Observation',
  need: 'downlink',
  setupStartsUtc: at(fromMin),
  aosUtc: at(fromMin + 2),
  tcaUtc: at(fromMin + 6),
  losUtc: at(fromMin + 10),
  teardownEndsUtc: at(fromMin + 11),
  answerByUtc: null,
  maxElevationDeg: 60,
  aosAzimuthDeg: 358,
  losAzimuthDeg: 180,
  slew: null,
  reported: { acquiredUtc: null, lostUtc: null, bytes: null, bytesUtc: null, ebN0Db: null, note: null },
  ...change,
});
const antenna = (id: string) => ({
  id,
  name: id,
  slewAzimuthDegPerS: 3,
  slewElevationDegPerS: 3,
  visits: [],
  stop: null,
});
const sheet = (contacts: SheetContact[]): RunSheet => ({
  asOfUtc: at(0),
  station: { id: 's', name: 'Tarnwick', timeZone: 'Europe/London' },
  stations: [],
  antennas: [antenna('east'), antenna('west')],
  contacts,
  conflicts: [],
  notes: [],
});

describe('the run sheet', () => {
  it('has a contact as now from its set-up to the end of its teardown, and no longer', () => {
    const one = sheet([contact(1, 0)]);
    const nowAt = (minutes: number) => sheetView(one, START_MS + minutes * 60_000).dishes[0]?.now.length;
    expect([nowAt(-0.01), nowAt(0), nowAt(10.9), nowAt(11)]).toEqual([0, 1, 1, 0]);
  });

  it('shows four as next and the rest as later, and never an asked one as what a dish does next', () => {
    const contacts = [5, 20, 35, 50, 65].map((from, index) =>
      contact(index, from, { antennaId: 'west', state: index === 0 ? 'awaiting owner' : 'confirmed' }),
    );
    const view = sheetView(sheet(contacts), START_MS);
    expect(view.next.map((one) => one.number)).toEqual([0, 1, 2, 3]);
    expect(view.later.map((one) => one.number)).toEqual([4]);
    expect(view.dishes[1]?.next?.number).toBe(1);
    expect(view.asked.map((one) => one.number)).toEqual([0]);
  });

  it('has a dish as not clear while somebody is there or it is kept still', () => {
    const busy = sheet([]);
    const visits = [{ id: 'v', name: 'Tom Askew', cameUtc: at(-40) }];
    const stop = { reason: 'ice', sinceUtc: at(-3), byName: 'Jess' };
    const view = sheetView(
      {
        ...busy,
        antennas: [
          { ...antenna('east'), visits },
          { ...antenna('west'), stop },
        ],
      },
      START_MS,
    );
    expect(view.dishes.map((dish) => dish.isClear)).toEqual([false, false]);
  });
});

describe('the way of a dish', () => {
  it('is told with the time that it takes, and with the time it has where that is too short', () => {
    const slew = { fromAzimuthDeg: 180, needS: 59, givenS: 400, fits: true };
    expect(slewWords(contact(1, 0, { slew }))).toBe('180° to 358°, turning 59\u00a0s');
    const short = { ...slew, givenS: 30, fits: false };
    expect(slewWords(contact(1, 0, { slew: short }))).toContain('has 30\u00a0s');
    expect(slewWords(contact(1, 0, { slew: { ...slew, needS: null, fits: false } }))).toContain(
      'out of the dish’s travel',
    );
  });
});
