import { describe, expect, it } from 'vitest';
import { openHoursAWeek, openSpans } from './hours-words.js';

describe('weekly hours', () => {
  it('adds them up, counting what two rules share once', () => {
    expect(openHoursAWeek([{ days: [1, 2, 3, 4, 5, 6, 7], fromLocal: '00:00', toLocal: '24:00' }])).toBe(168);
    expect(
      openHoursAWeek([
        { days: [1], fromLocal: '08:00', toLocal: '12:00' },
        { days: [1], fromLocal: '10:00', toLocal: '13:30' },
      ]),
    ).toBe(5.5);
  });

  it('lets Sunday night run into Monday', () => {
    expect(openSpans([{ days: [7], fromLocal: '22:00', toLocal: '06:00' }])).toEqual([
      { fromMin: 0, toMin: 360 },
      { fromMin: 6 * 1440 + 1320, toMin: 7 * 1440 },
    ]);
  });

  it('opens nothing for times that cannot be read', () => {
    expect(openSpans([{ days: [1], fromLocal: '', toLocal: '06:00' }])).toEqual([]);
  });
});
