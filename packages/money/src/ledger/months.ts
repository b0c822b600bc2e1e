/** Months of the ledger: `2026-12`, always UTC. */
import { MoneyError } from '../money-error.js';

const MONTH = /^(\d{4})-(0[1-9]|1[0-2])$/;

/** The month in which an instant (UTC milliseconds) lies. */
export const monthOf = (atMs: number): string => new Date(atMs).toISOString().slice(0, 7);

/** The half-open interval of a month, UTC milliseconds. Throws `bad month`. */
export function monthSpan(month: string): { readonly fromMs: number; readonly toMs: number } {
  const match = MONTH.exec(month);
  if (match === null) throw new MoneyError('bad month', `“${month}” is not a month such as 2026-12.`, { month });
  const [year, index] = [Number(match[1]), Number(match[2]) - 1];
  return { fromMs: Date.UTC(year, index), toMs: Date.UTC(year, index + 1) };
}

/** The month after. Throws `bad month`. */
export const monthAfter = (month: string): string => monthOf(monthSpan(month).toMs);
