/** Words and sums of invoices. Pure. */
import type { Invoice, InvoiceSummary } from '@skyberth/shared';
import { formatNumber } from '../../ui/format.js';

/** `Invoice SKB-2026-000012` */
export function titleOf({ kind, number }: Pick<InvoiceSummary, 'kind' | 'number'>): string {
  return `${kind === 'invoice' ? 'Invoice' : 'Credit note'} ${number}`;
}

/** What was sold or credited, written as the heading that it is here. */
export const subjectWords = (subject: string): string => subject.charAt(0).toUpperCase() + subject.slice(1);

/** `Norway` for `NO`; the code itself where the browser has no name for it. */
export function countryWords(country: string): string {
  return new Intl.DisplayNames('en', { type: 'region', fallback: 'code' }).of(country) ?? country;
}

/** The lines of a postal address, empty ones left out. */
export function addressLines(address: Invoice['customer']['address']): readonly string[] {
  const town = `${address.postalCode} ${address.city}`.trim();
  return [address.line1, address.line2, town, countryWords(address.country)].filter(Boolean);
}

/** `VAT 22 %`, `VAT 5.5 %` */
export function vatWords(ratePercent: number): string {
  const decimals = [0, 1].find((count) => Number(ratePercent.toFixed(count)) === ratePercent) ?? 2;
  return `VAT ${formatNumber(ratePercent, decimals)}\u00a0%`;
}

export interface MonthOfInvoices {
  /** `December 2026` */
  readonly title: string;
  readonly items: readonly InvoiceSummary[];
}

const monthFormat = new Intl.DateTimeFormat('en-GB', { timeZone: 'UTC', month: 'long', year: 'numeric' });

/** Neighbours of one UTC month together, in the order given. */
export function byMonth(items: readonly InvoiceSummary[]): readonly MonthOfInvoices[] {
  const months: { title: string; items: InvoiceSummary[] }[] = [];
  for (const item of items) {
    const title = monthFormat.format(Date.parse(item.issuedUtc));
    const last = months.at(-1);
    if (last?.title === title) last.items.push(item);
    else months.push({ title, items: [item] });
  }
  return months;
}

export interface SumOfInvoices {
  readonly currency: string;
  readonly netMinor: number;
  readonly vatMinor: number;
  readonly grossMinor: number;
}

/** Sums by currency, in the order in which currencies first appear; credit notes count as they are written, below zero. */
export function sumsOf(items: readonly InvoiceSummary[]): readonly SumOfInvoices[] {
  const sums = new Map<string, SumOfInvoices>();
  for (const { currency, netMinor, vatMinor, grossMinor } of items) {
    const before = sums.get(currency) ?? { currency, netMinor: 0, vatMinor: 0, grossMinor: 0 };
    sums.set(currency, {
      currency,
      netMinor: before.netMinor + netMinor,
      vatMinor: before.vatMinor + vatMinor,
      grossMinor: before.grossMinor + grossMinor,
    });
  }
  return [...sums.values()];
}
