/** Asks the services beside this one how they are. */
import { Inject, Injectable } from '@nestjs/common';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';

export interface ServiceState {
  readonly name: string;
  readonly ok: boolean;
  readonly detail: string;
}

const ANSWER_WITHIN_MS = 2_000;
/** Anyone may ask for our health; that must not make us ask others as often. */
const REMEMBERED_MS = 1_000;

@Injectable()
export class ServicesWatch {
  private last: { readonly atMs: number; readonly states: Promise<ServiceState[]> } | undefined;

  constructor(
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  /** One state for each configured address, in their order; at most a second old. */
  states(): Promise<ServiceState[]> {
    const nowMs = this.clock.nowMs();
    if (!this.last || Math.abs(nowMs - this.last.atMs) >= REMEMBERED_MS) {
      this.last = { atMs: nowMs, states: Promise.all(this.config.standInHealthUrls.map(ask)) };
    }
    return this.last.states;
  }
}

async function ask(url: string): Promise<ServiceState> {
  const name = new URL(url).host;
  try {
    const response = await fetch(url, { signal: AbortSignal.timeout(ANSWER_WITHIN_MS), redirect: 'error' });
    await response.body?.cancel();
    return { name, ok: response.ok, detail: `answered ${response.status}` };
  } catch (error) {
    return { name, ok: false, detail: error instanceof Error ? error.message : String(error) };
  }
}
