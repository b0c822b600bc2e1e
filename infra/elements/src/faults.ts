import { epochMsOf, numberOf, type Omm } from './omm.js';

export type FaultMode = 'error' | 'slow' | 'cut' | 'stale' | 'poisoned';
export const FAULT_MODES: readonly FaultMode[] = ['error', 'slow', 'cut', 'stale', 'poisoned'];

/** How poisoned data is wrong: not the format at all, broken off, impossible values, or plausible but false. */
export type Poison = 'web_page' | 'truncated' | 'impossible' | 'bad_check_digit' | 'moved';
export const POISONS: readonly Poison[] = ['web_page', 'truncated', 'impossible', 'bad_check_digit', 'moved'];

export interface Fault {
  mode: FaultMode;
  /** Requests it still strikes; forever, when undefined. */
  times: number | undefined;
  status: number;
  delayMs: number;
  staleDays: number;
  poison: Poison;
}

const DAY_MS = 86_400_000;

/** The element sets as the fault shows them. */
export function spoilElements(list: readonly Omm[], fault: Fault | undefined): readonly Omm[] {
  if (fault?.mode === 'stale') {
    return list.map((omm) => ({
      ...omm,
      EPOCH: new Date(epochMsOf(omm) - fault.staleDays * DAY_MS).toISOString().slice(0, 23),
    }));
  }
  if (fault?.mode !== 'poisoned') return list;
  if (fault.poison === 'moved') {
    return list.map((omm) => ({ ...omm, MEAN_ANOMALY: (numberOf(omm, 'MEAN_ANOMALY') + 40) % 360 }));
  }
  return list;
}

/** The text as the fault shows it. */
export function spoilText(text: string, format: 'json' | 'tle', fault: Fault | undefined): string {
  if (fault?.mode !== 'poisoned') return text;
  switch (fault.poison) {
    case 'web_page':
      return '<!doctype html><title>Please sign in</title><h1>Please sign in to the network</h1>';
    case 'truncated':
      return text.slice(0, Math.floor(text.length * 0.6));
    case 'impossible':
      return format === 'json'
        ? JSON.stringify((JSON.parse(text) as Omm[]).map((omm) => ({ ...omm, ECCENTRICITY: 1.5, MEAN_MOTION: -1 })))
        : text.replace(/^(2 .{5}) .{8}/gm, '$1 999.9999');
    case 'bad_check_digit':
      return text.replace(
        /^([12] .{66})(\d)$/gm,
        (_line, body: string, digit: string) => body + ((Number(digit) + 1) % 10),
      );
    case 'moved':
      return text;
  }
}
