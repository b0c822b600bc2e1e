/** Short readings of a station, shared by its pages. */
import type { Station } from '@skyberth/shared';
import { formatNumber } from '../../ui/format.js';

const COORDINATE_DECIMALS = 3;

/** `54.470° N 2.610° W, 318 m` */
export function positionText(place: Pick<Station, 'latitudeDeg' | 'longitudeDeg' | 'altitudeM'>): string {
  const { latitudeDeg, longitudeDeg, altitudeM } = place;
  const part = (angleDeg: number, plus: string, minus: string) =>
    `${formatNumber(Math.abs(angleDeg), COORDINATE_DECIMALS)}°\u00a0${angleDeg < 0 ? minus : plus}`;
  return `${part(latitudeDeg, 'N', 'S')} ${part(longitudeDeg, 'E', 'W')}, ${formatNumber(altitudeM)}\u00a0m`;
}

/** `Norway`; the code itself where the browser knows no name. */
export function countryName(code: string): string {
  try {
    return new Intl.DisplayNames('en', { type: 'region' }).of(code) ?? code;
  } catch {
    return code;
  }
}

/** What stands between a station and approval or sale, in one sentence; empty where nothing does. */
export function nextStep(station: Pick<Station, 'state' | 'antennas' | 'stateNote'>): string {
  if (station.antennas.length === 0) return 'Add its first antenna.';
  if (station.state === 'draft') return 'Ask for approval when it is described truthfully.';
  if (station.state === 'waiting') return 'Skyberth looks at it; you hear by mail.';
  if (station.state === 'refused') return 'Read why, mend it, and ask again.';
  if (station.state === 'suspended') return 'Nothing new is sold here.';
  const unfinished = station.antennas.filter((antenna) => antenna.missing.length > 0).length;
  if (unfinished > 0) return `${unfinished} ${unfinished === 1 ? 'antenna is' : 'antennas are'} not yet complete.`;
  const resting = station.antennas.filter((antenna) => antenna.state !== 'on sale').length;
  if (resting > 0) return `${resting} ${resting === 1 ? 'antenna is' : 'antennas are'} complete and not on sale.`;
  return '';
}
