/** An outage on demand: tests of a caller need a service that is down, slow, or gone in the middle of an answer. */
export type FaultMode = 'answer' | 'cut_before' | 'cut_after' | 'delay';
export const FAULT_MODES: readonly FaultMode[] = ['answer', 'cut_before', 'cut_after', 'delay'];

export interface Fault {
  mode: FaultMode;
  /** "POST /v1/payment_intents" style; the path is a beginning. Empty text fits every call. */
  match: string;
  times: number;
  /** For `answer`. */
  status: number;
  body: string;
  /** For `answer`: kept under the idempotency key, as the real service keeps a 500 that happened during the work. */
  kept: boolean;
  /** For `delay`: the work is done first, the answer comes later. */
  delayMs: number;
}

/** Kept in memory only; a restart is healthy. */
export class Faults {
  list: Fault[] = [];

  add(fault: Fault): void {
    this.list.push(fault);
  }

  clear(): void {
    this.list = [];
  }

  /** The fault that strikes this call, if any; one of its turns is used up. */
  strike(method: string, path: string): Fault | undefined {
    const fault = this.list.find((candidate) => `${method} ${path}`.startsWith(candidate.match));
    if (!fault) return undefined;
    fault.times -= 1;
    if (fault.times <= 0) this.list = this.list.filter((candidate) => candidate !== fault);
    return fault;
  }
}
