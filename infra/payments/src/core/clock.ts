import type { Store } from './store.js';

/**
 * The service's time: the machine's clock plus an offset that tests may push forward.
 * The offset is stored, so that a restart does not send the service back in time.
 */
export class Clock {
  #offsetMs: number;

  constructor(
    private readonly store: Store,
    startOffsetMs = 0,
    private readonly machineNowMs: () => number = Date.now,
  ) {
    this.#offsetMs = Number(store.readNote('clock_offset_ms') ?? startOffsetMs);
  }

  nowMs(): number {
    return this.machineNowMs() + this.#offsetMs;
  }

  /** Whole Unix seconds, the unit of every time on this API. */
  nowS(): number {
    return Math.floor(this.nowMs() / 1000);
  }

  /** Moves time forward only: money that has settled cannot become unsettled. */
  advance(byMs: number): void {
    if (!Number.isSafeInteger(byMs) || byMs < 0)
      throw new RangeError(`advance takes whole milliseconds >= 0, not ${byMs}`);
    this.#offsetMs += byMs;
    this.store.writeNote('clock_offset_ms', String(this.#offsetMs));
  }
}
