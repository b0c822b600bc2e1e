/** Pointing and frequency table of a contact, for the station's antenna control. */
import { dopplerHz, uplinkFrequencyHz } from '../radio/doppler.js';
import type { LookAngles } from '../types.js';
import { csvLine } from './csv.js';

export interface PointingRow extends LookAngles {
  /** Where to listen and what to send, Hz; undefined where the contact has no such link. */
  readonly downlinkHz: number | undefined;
  readonly uplinkHz: number | undefined;
}

/** Stands above the table, because a table like this is what makes a dish move and a transmitter radiate. */
export const POINTING_CAUTION: readonly string[] = [
  'A dish following this table moves without warning. Clear and lock the area before it is loaded.',
  'Do not radiate without a licence and clearance for this link, and only where nobody stands in or near the beam.',
  'Check the distance to the Sun: a receive chain pointed at it can be damaged.',
  'Local codes, the licence and the licensed practitioner in charge come first. This table replaces no interlock.',
];

const COLUMNS = [
  'time_utc',
  'azimuth_deg',
  'elevation_deg',
  'range_km',
  'range_rate_km_s',
  'receive_hz',
  'transmit_hz',
];

/** Adds the shifted frequencies to a track: received after Doppler, sent before it. */
export function pointingRows(
  track: readonly LookAngles[],
  link: { downlinkHz?: number; uplinkHz?: number },
): PointingRow[] {
  return track.map((look) => ({
    ...look,
    downlinkHz:
      link.downlinkHz === undefined ? undefined : link.downlinkHz + dopplerHz(link.downlinkHz, look.rangeRateKmPerS),
    uplinkHz: link.uplinkHz === undefined ? undefined : uplinkFrequencyHz(link.uplinkHz, look.rangeRateKmPerS),
  }));
}

/**
 * Writes the table. Digits: time to the millisecond, angles to a millionth of a degree, range to the millimetre, range
 * rate to a micrometre a second, frequencies to a thousandth of a hertz. Lines beginning with # are the caution.
 */
export function pointingCsv(rows: readonly PointingRow[]): string {
  const caution = POINTING_CAUTION.map((line) => `# ${line}\r\n`).join('');
  return caution + csvLine(COLUMNS) + rows.map(pointingLine).join('');
}

function pointingLine(row: PointingRow): string {
  return csvLine([
    new Date(Math.round(row.timeMs)).toISOString(),
    row.azimuthDeg.toFixed(6),
    row.elevationDeg.toFixed(6),
    row.rangeKm.toFixed(6),
    row.rangeRateKmPerS.toFixed(9),
    row.downlinkHz?.toFixed(3) ?? '',
    row.uplinkHz?.toFixed(3) ?? '',
  ]);
}

/** Reads such a table back; undefined where it is not one. */
export function parsePointingCsv(text: string): PointingRow[] | undefined {
  const lines = text.split('\r\n').filter((line) => line !== '' && !line.startsWith('#'));
  if (lines[0] !== COLUMNS.join(',')) return undefined;
  const rows: PointingRow[] = [];
  for (const line of lines.slice(1)) {
    const [time = '', ...cells] = line.split(',');
    const [azimuthDeg, elevationDeg, rangeKm, rangeRateKmPerS, downlinkHz, uplinkHz] = cells.map((cell) =>
      cell === '' ? undefined : Number(cell),
    );
    const needed = [Date.parse(time), azimuthDeg, elevationDeg, rangeKm, rangeRateKmPerS];
    if (cells.length !== 6 || needed.some((value) => value === undefined || Number.isNaN(value))) return undefined;
    rows.push({
      timeMs: needed[0]!,
      azimuthDeg: azimuthDeg!,
      elevationDeg: elevationDeg!,
      rangeKm: rangeKm!,
      rangeRateKmPerS: rangeRateKmPerS!,
      downlinkHz,
      uplinkHz,
    });
  }
  return rows;
}
