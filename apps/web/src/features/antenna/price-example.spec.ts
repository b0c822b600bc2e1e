import { describe, expect, it } from 'vitest';
import { type ExampleCard, exampleLines } from './price-example.js';

const card: ExampleCard = {
  perMinuteMinor: 560,
  setupMinor: 1200,
  minimumMinor: 3200,
  busyHours: [{ days: [1, 2, 3, 4, 5], fromLocal: '17:00', toLocal: '21:00', percent: 20 }],
  shortNotice: { underHours: 2, percent: 10 },
};
const contact = { lengthS: 480, day: 2, startLocal: '18:10', boughtHoursBefore: 24 };
const total = (one: ExampleCard, at: typeof contact) =>
  exampleLines(one, at).reduce((sum, line) => sum + line.amountMinor, 0);

describe('the worked example', () => {
  it('adds time, set-up and busy hours', () => {
    // 8 min at 5.60 is 44.80, set-up 12.00, a fifth of 44.80 is 8.96.
    expect(exampleLines(card, contact).map((line) => line.amountMinor)).toEqual([4480, 1200, 896]);
    expect(total(card, contact)).toBe(6576);
  });

  it('counts only the seconds inside the busy hours', () => {
    expect(exampleLines(card, { ...contact, startLocal: '16:56' })[2]?.amountMinor).toBe(448);
    expect(exampleLines(card, { ...contact, day: 6 })).toHaveLength(2);
  });

  it('follows busy hours from Sunday night into Monday', () => {
    const night: ExampleCard = {
      ...card,
      busyHours: [{ days: [7], fromLocal: '22:00', toLocal: '02:00', percent: 50 }],
    };
    expect(exampleLines(night, { ...contact, day: 7, startLocal: '23:56' })[2]?.amountMinor).toBe(2240);
    expect(exampleLines(night, { ...contact, day: 1, startLocal: '01:56' })[2]?.amountMinor).toBe(1120);
  });

  it('adds short notice, and fills up to the least charge', () => {
    expect(exampleLines(card, { ...contact, boughtHoursBefore: 1 }).at(-1)).toMatchObject({
      label: 'Short notice',
      amountMinor: 448,
    });
    expect(total(card, { ...contact, lengthS: 60, day: 6 })).toBe(3200);
  });
});
