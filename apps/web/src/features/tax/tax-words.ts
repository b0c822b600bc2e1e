/** Words of the page about tax. */
import { formatNumber } from '../../ui/format.js';

/** `25.5 %`, `8 %`: basis points as people write them. */
export function rateText(basisPoints: number): string {
  const decimals = basisPoints % 100 === 0 ? 0 : basisPoints % 10 === 0 ? 1 : 2;
  return `${formatNumber(basisPoints / 100, decimals)}\u00a0%`;
}

/** `25.5 % from 2024-09-01, before 24 %`; the first day that is kept is not worth telling. */
export function stepsText(steps: readonly { readonly fromDay: string; readonly basisPoints: number }[]): string {
  const newest = [...steps].reverse();
  return newest
    .map((step, index) => {
      const isFirst = index === newest.length - 1;
      const words = isFirst ? rateText(step.basisPoints) : `${rateText(step.basisPoints)} from ${step.fromDay}`;
      return index === 0 ? words : `before ${words}`;
    })
    .join(', ');
}

/** The question in the address; a country that is none is not asked for. */
export function readQuestion(search: URLSearchParams, today: string) {
  const country = search.get('country') ?? '';
  const day = search.get('day') ?? '';
  return {
    country: /^[A-Z]{2}$/.test(country) ? country : '',
    vatNumber: search.get('vatNumber')?.slice(0, 40) || undefined,
    day: /^\d{4}-\d{2}-\d{2}$/.test(day) ? day : today,
  };
}
