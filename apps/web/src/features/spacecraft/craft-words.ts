/** Sentences about spacecraft and their radios. Pure. */
import type { ElementFreshness, Radio, Spacecraft } from '@skyberth/shared';
import { formatNumber } from '../../ui/format.js';

const FRESHNESS_COUNTS: readonly (readonly [ElementFreshness, string])[] = [
  ['fresh', 'fresh'],
  ['ageing', 'ageing'],
  ['stale', 'stale'],
  ['none', 'without elements'],
];

/** `6 spacecraft: 4 with fresh elements, 1 stale, 1 without elements.` */
export function fleetWords(all: readonly Pick<Spacecraft, 'freshness'>[]): string {
  const counts = FRESHNESS_COUNTS.flatMap(([freshness, word]) => {
    const count = all.filter((one) => one.freshness === freshness).length;
    return count > 0 ? [`${count} ${word}`] : [];
  });
  return `${all.length} spacecraft; elements: ${counts.join(', ')}.`;
}

/** `W4 on the board, number 61234, 2026-101A` */
export function identityWords(
  craft: Pick<Spacecraft, 'shortName' | 'catalogNumber' | 'internationalDesignator'>,
): string {
  return [
    `${craft.shortName} on the board`,
    craft.catalogNumber === null ? null : `number ${craft.catalogNumber}`,
    craft.internationalDesignator,
  ]
    .filter(Boolean)
    .join(', ');
}

/** `S down and up, X down`, in the order of the radios; empty without radios. */
export function radioWords(radios: readonly Pick<Radio, 'band' | 'direction'>[]): string {
  const bands = [...new Set(radios.map((radio) => radio.band))];
  return bands
    .map((band) => {
      const has = (direction: Radio['direction']) =>
        radios.some((radio) => radio.band === band && radio.direction === direction);
      const ways = [has('downlink') ? 'down' : null, has('uplink') ? 'up' : null].filter(Boolean);
      return `${band} ${ways.join(' and ')}`;
    })
    .join(', ');
}

const RATE_UNITS = ['bit/s', 'kbit/s', 'Mbit/s', 'Gbit/s'] as const;
const DECIMALS = [0, 1, 2, 3] as const;

/** `9.6 kbit/s`, `150 Mbit/s`: the largest decimal unit that loses no figure of a whole rate within three decimals. */
export function rateWords(rateBps: number): string {
  for (const [index, unit] of [...RATE_UNITS.entries()].reverse()) {
    const value = rateBps / 1_000 ** index;
    const decimals = DECIMALS.find((count) => Number(value.toFixed(count)) === value);
    if (value >= 1 && decimals !== undefined) return `${formatNumber(value, decimals)}\u00a0${unit}`;
  }
  return `${formatNumber(rateBps)}\u00a0bit/s`;
}

const POLARISATION_WORDS: Readonly<Record<Radio['polarisation'], string>> = {
  right: 'right-hand circular',
  left: 'left-hand circular',
  horizontal: 'horizontal',
  vertical: 'vertical',
};

export const polarisationWords = (polarisation: Radio['polarisation']): string => POLARISATION_WORDS[polarisation];

/** Spacecraft whose name, short name, number or designator holds the text. */
export function findCraft<
  T extends Pick<Spacecraft, 'name' | 'shortName' | 'catalogNumber' | 'internationalDesignator'>,
>(all: readonly T[], text: string): readonly T[] {
  const wanted = text.trim().toLowerCase();
  if (!wanted) return all;
  return all.filter((one) =>
    [one.name, one.shortName, one.catalogNumber, one.internationalDesignator].some((field) =>
      String(field ?? '')
        .toLowerCase()
        .includes(wanted),
    ),
  );
}
