/** The only place that knows what time it is. */
export interface ClockPort {
  /** UTC milliseconds since 1970. */
  nowMs(): number;
}
export const CLOCK = Symbol('ClockPort');

export const systemClock: ClockPort = { nowMs: () => Date.now() };

/** A clock that tests (and rehearsals of a contact) move by hand; it runs on at the ordinary rate from where it was set. */
export class AdjustableClock implements ClockPort {
  private offsetMs = 0;

  nowMs(): number {
    return Date.now() + this.offsetMs;
  }

  set(timeMs: number): void {
    this.offsetMs = timeMs - Date.now();
  }

  advance(byMs: number): void {
    this.offsetMs += byMs;
  }
}
