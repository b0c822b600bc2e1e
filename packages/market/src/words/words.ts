/** How figures stand in the sentences of this package: UTC times, lengths, degrees, amounts. */
const two = (value: number): string => String(value).padStart(2, '0');

/** `9 min 30 s`, `2 h 05 min`, `45 s`; whole seconds, nearest, halves up. */
export function lengthText(milliseconds: number): string {
  const seconds = Math.round(milliseconds / 1000);
  if (seconds < 60) return `${seconds} s`;
  if (seconds < 3600) return `${Math.floor(seconds / 60)} min ${two(seconds % 60)} s`;
  const minutes = Math.round(seconds / 60);
  if (minutes < 2880)
    return minutes % 60 === 0 ? `${minutes / 60} h` : `${Math.floor(minutes / 60)} h ${two(minutes % 60)} min`;
  const hours = Math.round(minutes / 60);
  return hours % 24 === 0 ? `${hours / 24} days` : `${Math.floor(hours / 24)} d ${hours % 24} h`;
}

/** `16:07:50`, or with the date when it is not the day of `besideMs`. UTC, to the second, never later than the instant. */
export function timeText(timeMs: number, besideMs: number): string {
  const iso = new Date(Math.floor(timeMs / 1000) * 1000).toISOString();
  const sameDay = Math.floor(timeMs / 86_400_000) === Math.floor(besideMs / 86_400_000);
  return sameDay ? iso.slice(11, 19) : `${iso.slice(0, 10)} ${iso.slice(11, 19)}`;
}

/** `214.6°`. */
export const degreesText = (degrees: number): string => `${degrees.toFixed(1)}°`;

/** `+20 %`, `−12 %`. */
export const signedPercentText = (percent: number): string =>
  `${percent < 0 ? '\u2212' : '+'}${Math.abs(percent)}\u00a0%`;

/** Writes an amount with its currency; handed in, because this package knows no currencies. */
export type MoneyWriter = (amountMinor: number, currency: string) => string;
