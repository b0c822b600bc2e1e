/** Where passes are computed: in this thread, or in worker threads that keep the event loop free. */
import type { EngineJob, OutcomeOf } from './job-types.js';

export interface PassEngine {
  /**
   * Carries a job out. `lane` names what the work is about (an antenna): the same name always reaches the same cache,
   * different names may run at the same time. What is wrong with elements is an outcome. Throws `unavailable` where too
   * many jobs are waiting already.
   */
  run<J extends EngineJob>(job: J, lane: string): Promise<OutcomeOf<J>>;
  /** How many jobs can run at the same time. */
  readonly lanes: number;
  /** Which of the lanes a name belongs to, from 0. */
  laneOf(name: string): number;
  close(): Promise<void>;
}
export const PASS_ENGINE = Symbol('PassEngine');

/** A small hash (FNV-1a, 32 bits) that spreads names over lanes, the same in every process. */
export function laneOf(name: string, lanes: number): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < name.length; i += 1) {
    hash ^= name.charCodeAt(i);
    hash = Math.imul(hash, 0x01000193) >>> 0;
  }
  return lanes <= 1 ? 0 : hash % lanes;
}
