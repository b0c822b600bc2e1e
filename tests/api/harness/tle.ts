/** Invented element sets that read well: TLE lines with right columns and checksums (published-values, section b). */

export interface OrbitOptions {
  readonly catalogNumber: number;
  readonly epochMs: number;
  readonly name?: string;
  readonly inclinationDeg?: number;
  readonly raanDeg?: number;
  readonly eccentricity?: number;
  readonly argPerigeeDeg?: number;
  readonly meanAnomalyDeg?: number;
  readonly meanMotionRevPerDay?: number;
  readonly bstar?: string;
}

/** A near-circular orbit over the poles at some 550 km; with a name it is a three-line set. */
export function tleText(options: OrbitOptions): string {
  const { catalogNumber, epochMs, name } = options;
  const number = String(catalogNumber).padStart(5, '0');
  const degrees = (value: number) => value.toFixed(4).padStart(8);
  const eccentricity = (options.eccentricity ?? 0.0012).toFixed(7).slice(2);
  const line1 = `1 ${number}U 26001A   ${epochText(epochMs)}  .00001000  00000+0  ${options.bstar ?? '50000-4'} 0  999`;
  const line2 = [
    `2 ${number}`,
    degrees(options.inclinationDeg ?? 97.6),
    degrees(options.raanDeg ?? 120),
    eccentricity,
    degrees(options.argPerigeeDeg ?? 90),
    degrees(options.meanAnomalyDeg ?? 0),
    `${(options.meanMotionRevPerDay ?? 15.06).toFixed(8).padStart(11)}    1`,
  ].join(' ');
  return [...(name === undefined ? [] : [name]), line1 + checksum(line1), line2 + checksum(line2)].join('\n');
}

/** Two digits of the year, day of the year from 1, eight decimals. */
function epochText(epochMs: number): string {
  const year = new Date(epochMs).getUTCFullYear();
  const day = 1 + (epochMs - Date.UTC(year, 0, 1)) / 86_400_000;
  return `${String(year % 100).padStart(2, '0')}${day.toFixed(8).padStart(12, '0')}`;
}

/** Digits count themselves, a minus counts one, modulo ten. */
export const checksum = (line: string): string =>
  String([...line].reduce((sum, mark) => sum + (mark === '-' ? 1 : /\d/.test(mark) ? Number(mark) : 0), 0) % 10);
