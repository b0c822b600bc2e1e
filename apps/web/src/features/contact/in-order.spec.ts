import { describe, expect, it } from 'vitest';
import { atMinute, booking, detail } from './contact-fixture.js';
import { countdown, inOrder } from './in-order.js';

describe('everything in order', () => {
  it('stands by time, with now between what was and what is to come', () => {
    const entries = inOrder(booking(), detail(), atMinute(4));
    expect(entries.map((entry) => entry.title)).toEqual([
      'Held.',
      'Set-up begins',
      'AOS predicted',
      'Now',
      'Highest',
      'LOS predicted',
      'Tear-down ends',
    ]);
    expect(entries.filter((entry) => entry.isToCome).map((entry) => entry.title)).toEqual([
      'Highest',
      'LOS predicted',
      'Tear-down ends',
    ]);
  });

  it('takes in what the station reports live, where it happened', () => {
    const acquired = {
      seq: 7,
      bookingId: booking().id,
      kind: 'acquired' as const,
      atUtc: new Date(atMinute(3)).toISOString(),
      happenedUtc: new Date(atMinute(3)).toISOString(),
      value: null,
      sentence: 'Acquired, 4.0 s after the predicted AOS',
      by: 'Jess Birkett',
    };
    const entries = inOrder(booking(), detail(), atMinute(4), [acquired, { ...acquired, seq: 8, kind: 'diary' }]);
    const titles = entries.map((entry) => entry.title);
    expect(titles.filter((title) => title.startsWith('Acquired'))).toHaveLength(1);
    expect(titles.indexOf('AOS predicted')).toBeLessThan(titles.indexOf(acquired.sentence));
    expect(titles.indexOf(acquired.sentence)).toBeLessThan(titles.indexOf('Now'));
  });

  it('predicts nothing of a contact that was called off, and has no now once all is past', () => {
    expect(inOrder(booking({ state: 'cancelled' }), detail(), atMinute(4)).map((one) => one.title)).toEqual(['Held.']);
    expect(inOrder(booking(), detail(), atMinute(30)).some((one) => one.kind === 'now')).toBe(false);
  });

  it('leaves out a highest point outside the part that was bought', () => {
    const part = booking({ aosUtc: new Date(atMinute(7)).toISOString() });
    expect(inOrder(part, undefined, atMinute(4)).some((one) => one.title === 'Highest')).toBe(false);
  });
});

describe('the one countdown', () => {
  it('goes to the end of a hold, then to AOS, then to LOS, then away', () => {
    const held = booking({ state: 'held', holdEndsUtc: new Date(atMinute(-20)).toISOString() });
    expect(countdown(held, atMinute(-25))).toMatchObject({ label: 'left on the hold', text: '5:00' });
    expect(countdown(booking(), atMinute(0))).toMatchObject({ label: 'until AOS', text: '2:00' });
    expect(countdown(booking(), atMinute(4))).toMatchObject({ label: 'until LOS', text: '6:00' });
    expect(countdown(booking(), atMinute(10))).toBeNull();
    expect(countdown(booking({ state: 'declined' }), atMinute(0))).toBeNull();
  });

  it('says days apart', () => {
    expect(countdown(booking(), atMinute(2 - 1441))?.text).toBe('1 d 1:00');
  });
});
