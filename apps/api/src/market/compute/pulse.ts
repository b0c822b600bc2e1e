/** How a running search and its asker keep in touch: two cells of shared memory, one to stop it and one that counts. */

const STOP = 0;
const DONE = 1;
const CELLS = 2;

/** Thrown where the asker has gone; nothing computed so far is lost, since days are remembered one by one. */
export class SearchStopped extends Error {}

/** Memory for one search, to be shared with the threads that work on it. */
export const newPulseMemory = (): SharedArrayBuffer => new SharedArrayBuffer(CELLS * Int32Array.BYTES_PER_ELEMENT);

export const askToStop = (memory: SharedArrayBuffer): void => {
  Atomics.store(new Int32Array(memory), STOP, 1);
};

/** Antenna days that are done, over all threads. */
export const daysDone = (memory: SharedArrayBuffer): number => Atomics.load(new Int32Array(memory), DONE);

/** The worker's end: says how far it is, and learns whether to go on. */
export class Pulse {
  private readonly cells: Int32Array | null;
  private spent = 0;

  /** @param eachDays antenna days that one spacecraft counts for, however many are looked at for it */
  constructor(
    memory: SharedArrayBuffer | null,
    private readonly eachDays: number,
  ) {
    this.cells = memory === null ? null : new Int32Array(memory);
  }

  /** After a day of so many antennas. Throws `SearchStopped`. */
  beat(days: number): void {
    if (this.cells === null) return;
    if (Atomics.load(this.cells, STOP) !== 0) throw new SearchStopped();
    this.count(Math.min(days, this.eachDays - this.spent));
  }

  /** After a spacecraft, whatever was remembered of it. Throws `SearchStopped`. */
  craftDone(): void {
    this.beat(this.eachDays);
    this.spent = 0;
  }

  private count(days: number): void {
    if (this.cells !== null) Atomics.add(this.cells, DONE, days);
    this.spent += days;
  }
}
