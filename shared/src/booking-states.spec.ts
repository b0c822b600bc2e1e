import { describe, expect, it } from 'vitest';
import {
  BOOKING_ACTORS,
  BOOKING_CAUSES,
  BOOKING_STATE_FACTS,
  BOOKING_STATES,
  BOOKING_TRANSITIONS,
  bookingMoves,
  bookingTransition,
  OCCUPYING_STATES,
  occupiesAntenna,
} from './booking-states.js';

describe('the booking state table', () => {
  it('leads each cause from a state to one state only', () => {
    const keys = BOOKING_TRANSITIONS.map((move) => `${move.from}|${move.event}`);
    expect(new Set(keys).size).toBe(keys.length);
  });

  it('reaches every state from a hold, and uses every cause', () => {
    const reached = new Set<string>(['held']);
    for (let before = -1; before !== reached.size; ) {
      before = reached.size;
      for (const move of BOOKING_TRANSITIONS) if (move.from !== null && reached.has(move.from)) reached.add(move.to);
    }
    expect([...reached].sort()).toEqual([...BOOKING_STATES].sort());
    expect(new Set(BOOKING_TRANSITIONS.map((move) => move.event))).toEqual(new Set(BOOKING_CAUSES));
  });

  it('lets every open state end without a person, or through the one whose turn it is', () => {
    for (const state of BOOKING_STATES.filter((each) => BOOKING_STATE_FACTS[each].open)) {
      expect(
        BOOKING_TRANSITIONS.some((move) => move.from === state),
        state,
      ).toBe(true);
    }
    for (const state of ['lapsed', 'declined', 'cancelled'] as const) {
      expect(
        BOOKING_TRANSITIONS.some((move) => move.from === state),
        state,
      ).toBe(false);
    }
  });

  it('never takes a beam back once it was freed', () => {
    for (const move of BOOKING_TRANSITIONS) {
      if (move.from !== null && !occupiesAntenna(move.from)) expect(occupiesAntenna(move.to)).toBe(false);
    }
    expect(OCCUPYING_STATES).not.toContain('lapsed');
    expect(OCCUPYING_STATES).toContain('held');
  });

  it('refuses a move by someone who may not make it', () => {
    expect(bookingTransition('awaiting owner', 'owner accepts', 'owner')?.to).toBe('confirmed');
    expect(bookingTransition('awaiting owner', 'owner accepts', 'operator')).toBeUndefined();
    expect(bookingTransition('under way', 'cancel', 'operator')).toBeUndefined();
    expect(bookingTransition(null, 'hold', 'operator')?.to).toBe('held');
  });

  it('lists what a page may offer', () => {
    expect(bookingMoves('confirmed', 'operator').map((move) => move.event)).toEqual(['cancel']);
    expect(bookingMoves('awaiting owner', 'owner').map((move) => move.event)).toEqual([
      'owner accepts',
      'owner declines',
    ]);
    expect(BOOKING_ACTORS.flatMap((actor) => bookingMoves('lapsed', actor))).toEqual([]);
  });
});
