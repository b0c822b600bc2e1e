/** Figures as they stand in the planner's sentences. */

/** Minutes rounded up: an allowance that is given in them then suffices. */
export function hoursText(lengthMs: number): string {
  const minutes = Math.ceil(lengthMs / 60_000);
  const [hours, rest] = [Math.floor(minutes / 60), minutes % 60];
  if (hours === 0) return `${rest} min`;
  return rest === 0 ? `${hours} h` : `${hours} h ${rest} min`;
}

export const instantText = (timeMs: number): string =>
  `${new Date(timeMs).toISOString().slice(0, 16).replace('T', ' ')} UTC`;

/** Decimal units of bytes, rounded down to three figures: what is said to be had can then be had. */
export function volumeText(bits: number): string {
  const bytes = bits / 8;
  const units = ['B', 'kB', 'MB', 'GB', 'TB'];
  const step = Math.min(units.length - 1, Math.max(0, Math.floor(Math.log10(Math.max(1, bytes)) / 3)));
  const value = bytes / 1000 ** step;
  const decimals = value >= 100 ? 0 : value >= 10 ? 1 : 2;
  return `${(Math.floor(value * 10 ** decimals + 1e-9) / 10 ** decimals).toFixed(decimals)} ${units[step]}`;
}
