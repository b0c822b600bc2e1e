import { describe, expect, it } from 'vitest';
import { askToStop, daysDone, newPulseMemory, Pulse, SearchStopped } from './pulse.js';

describe('Pulse', () => {
  it('counts each spacecraft for the same, whether its days were computed or remembered', () => {
    const memory = newPulseMemory();
    const pulse = new Pulse(memory, 21);
    pulse.beat(3);
    pulse.beat(3);
    expect(daysDone(memory)).toBe(6);
    pulse.craftDone();
    expect(daysDone(memory)).toBe(21);
    // A day more on either side is looked at where a pass reaches over the end.
    for (let day = 0; day < 9; day += 1) pulse.beat(3);
    expect(daysDone(memory)).toBe(42);
    pulse.craftDone();
    expect(daysDone(memory)).toBe(42);
  });

  it('adds up what several threads do', () => {
    const memory = newPulseMemory();
    new Pulse(memory, 5).craftDone();
    new Pulse(memory, 7).craftDone();
    expect(daysDone(memory)).toBe(12);
  });

  it('ends the work as soon as it is asked to', () => {
    const memory = newPulseMemory();
    const pulse = new Pulse(memory, 10);
    pulse.beat(1);
    askToStop(memory);
    expect(() => pulse.beat(1)).toThrow(SearchStopped);
    expect(daysDone(memory)).toBe(1);
  });

  it('goes on by itself where nobody shares its memory', () => {
    const pulse = new Pulse(null, 10);
    pulse.beat(1);
    expect(() => pulse.craftDone()).not.toThrow();
  });
});
