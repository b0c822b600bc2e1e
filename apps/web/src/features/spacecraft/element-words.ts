/** What is said of element sets: how old, how far to be trusted, from where. Pure. */
import type { ElementFreshness, ElementSummary, ReadElement } from '@skyberth/shared';
import { formatDuration, formatNumber } from '../../ui/format.js';
import type { BadgeTone } from '../../ui/state-badge.js';

const HOUR_MS = 3_600_000;
const MINUTES_PER_DAY = 1_440;

/** Each freshness as a word with its tone. */
export const FRESHNESS_BADGES: Readonly<Record<ElementFreshness, { readonly tone: BadgeTone; readonly text: string }>> =
  {
    none: { tone: 'waiting', text: 'No elements' },
    fresh: { tone: 'good', text: 'Fresh' },
    ageing: { tone: 'look', text: 'Ageing' },
    stale: { tone: 'bad', text: 'Stale' },
  };

/** `9 h 12 min old`; an epoch still to come is `3 h ahead`. */
export function ageWords(ageH: number): string {
  return ageH < 0 ? `${formatDuration(-ageH * HOUR_MS)} ahead` : `${formatDuration(ageH * HOUR_MS)} old`;
}

/** `±0.42 s`, `±14 s`: two figures that mean something. */
export function errorWords(timingErrorS: number): string {
  const decimals = timingErrorS < 1 ? 2 : timingErrorS < 10 ? 1 : 0;
  return `±${formatNumber(timingErrorS, decimals)}\u00a0s`;
}

/** `518 × 534 km`, one height where perigee and apogee are the same when written. */
export function heightWords({ perigeeKm, apogeeKm }: Pick<ElementSummary, 'perigeeKm' | 'apogeeKm'>): string {
  const [low, high] = [formatNumber(perigeeKm), formatNumber(apogeeKm)];
  return low === high ? low : `${low} × ${high}`;
}

/** Time of one turn in milliseconds, from the mean motion in revolutions per day. */
export const periodMs = (meanMotionRevPerDay: number): number => (MINUTES_PER_DAY / meanMotionRevPerDay) * 60_000;

const FORMATS: Readonly<Record<ElementSummary['format'], string>> = {
  tle: 'TLE',
  'omm-kvn': 'OMM, KVN',
  'omm-xml': 'OMM, XML',
  'omm-json': 'OMM, JSON',
  'omm-csv': 'OMM, CSV',
};

/** `TLE`, `OMM, XML` */
export const formatWords = (format: ElementSummary['format']): string => FORMATS[format];

/** What saving would do with a set that was read. */
export function fateWords({
  fate,
  spacecraftName,
  objectName,
}: Pick<ReadElement, 'fate' | 'spacecraftName' | 'objectName'>): string {
  if (fate === 'new-spacecraft') return `adds ${objectName} as a new spacecraft`;
  if (fate === 'duplicate') return `kept already, nothing to save`;
  if (fate === 'older') return `joins the history of ${spacecraftName ?? objectName}; a newer one stays in force`;
  return `the newest of ${spacecraftName ?? objectName}`;
}

/** What a set that is not fresh means for buying. */
export function trustWords(freshness: ElementFreshness, timingErrorS: number): string {
  const off = `AOS and LOS may be off by about ${errorWords(timingErrorS)}.`;
  if (freshness === 'stale') return `These elements are stale: ${off} Buying asks you to acknowledge it.`;
  return freshness === 'ageing' ? `These elements are ageing: ${off}` : off;
}
