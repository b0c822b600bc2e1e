/** How instants, lengths and money stand in diaries and mails. */
import { formatMoney } from '@skyberth/money';

const DAY_MS = 86_400_000;

/** `2026-335 14:05:09 UTC`, the day of the year as the trade counts; to the second, never later than the instant. */
export function utcText(timeMs: number): string {
  const whole = new Date(Math.floor(timeMs / 1000) * 1000);
  const day = Math.floor((whole.getTime() - Date.UTC(whole.getUTCFullYear(), 0, 1)) / DAY_MS) + 1;
  return `${whole.getUTCFullYear()}-${String(day).padStart(3, '0')} ${whole.toISOString().slice(11, 19)} UTC`;
}

/** `9 min 30 s`. */
export function lengthText(milliseconds: number): string {
  const seconds = Math.round(milliseconds / 1000);
  const rest = String(seconds % 60).padStart(2, '0');
  return seconds < 60 ? `${seconds} s` : `${Math.floor(seconds / 60)} min ${rest} s`;
}

export const moneyText = (amountMinor: number, currency: string): string => formatMoney({ amountMinor, currency });
