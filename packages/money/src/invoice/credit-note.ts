/**
 * Credit notes: invoices with negative amounts that refer to the one they change (Directive 2006/112/EC Art. 219).
 * However an invoice is credited, in one step or in many, the credits of a rate add up to the VAT it bore, to the cent.
 */
import { sumMinor } from '../amount.js';
import { MoneyError } from '../money-error.js';
import { checkedWhole, percentOf } from '../rounding.js';
import type { InvoiceAmounts, InvoiceLine, VatTotal } from './invoice.js';

export interface CreditNoteInput {
  readonly invoice: InvoiceAmounts;
  /** Net to credit on each line of the invoice, in its order; none negative. */
  readonly creditNetMinor: readonly number[];
  /** Net credited before on each line; zeros for a first credit note. */
  readonly creditedBeforeMinor: readonly number[];
}

/**
 * The amounts of a credit note, all zero or negative; lines without a credit are left out. Throws `bad invoice` when more
 * would be credited than was invoiced, or when the lists don't match the invoice's lines.
 */
export function buildCreditNote({ invoice, creditNetMinor, creditedBeforeMinor }: CreditNoteInput): InvoiceAmounts {
  if (creditNetMinor.length !== invoice.lines.length || creditedBeforeMinor.length !== invoice.lines.length) {
    throw new MoneyError(
      'bad invoice',
      `The invoice has ${invoice.lines.length} lines; the credit names ${creditNetMinor.length}.`,
    );
  }
  invoice.lines.forEach((line, index) => {
    requireCreditable(line, creditNetMinor[index] as number, creditedBeforeMinor[index] as number);
  });
  const lineIndexesOf = (total: VatTotal): number[] =>
    invoice.lines.flatMap((line, index) =>
      line.vatKind === total.vatKind && line.rateBasisPoints === total.rateBasisPoints && line.vatText === total.text
        ? [index]
        : [],
    );
  const vatOfLine = new Map<number, number>();
  const vatTotals: VatTotal[] = [];
  for (const total of invoice.vatTotals) {
    const indexes = lineIndexesOf(total);
    const vats = creditVat(invoice, indexes, creditNetMinor, creditedBeforeMinor);
    for (const [place, index] of indexes.entries()) vatOfLine.set(index, vats[place] as number);
    const netMinor = -sumMinor(indexes.map((index) => creditNetMinor[index] as number));
    if (netMinor !== 0) vatTotals.push({ ...total, netMinor, vatMinor: sumMinor(vats) });
  }
  if (vatTotals.length === 0) throw new MoneyError('bad invoice', 'A credit note must credit something.');
  const lines = invoice.lines.flatMap((line, index): InvoiceLine[] => {
    const credit = creditNetMinor[index] as number;
    return credit === 0
      ? []
      : [{ ...line, discountMinor: 0, netMinor: -credit, vatMinor: vatOfLine.get(index) as number }];
  });
  const netMinor = sumMinor(vatTotals.map((total) => total.netMinor));
  const vatMinor = sumMinor(vatTotals.map((total) => total.vatMinor));
  return {
    currency: invoice.currency,
    rounding: invoice.rounding,
    lines,
    vatTotals,
    netMinor,
    vatMinor,
    grossMinor: netMinor + vatMinor,
  };
}

/** A share of each line, by basis points, halves away from zero; what a part refund credits. */
export function creditShare(invoice: InvoiceAmounts, basisPoints: number): number[] {
  return invoice.lines.map((line) => percentOf(line.netMinor, basisPoints));
}

function requireCreditable(line: InvoiceLine, credit: number, before: number): void {
  const left = checkedWhole(line.netMinor, 'A line') - checkedWhole(before, 'A credit');
  if (checkedWhole(credit, 'A credit') < 0 || before < 0 || line.netMinor < 0)
    throw new MoneyError(
      'bad invoice',
      `“${line.description}” cannot be credited by ${credit}: only amounts above zero are credited.`,
    );
  if (credit > left)
    throw new MoneyError(
      'bad invoice',
      `“${line.description}” has ${left} minor units left to credit, not ${credit}.`,
      { left, credit },
    );
}

/** VAT is taken on what was left before and after, so the steps telescope to the VAT of the whole. */
function creditVat(
  invoice: InvoiceAmounts,
  indexes: readonly number[],
  credit: readonly number[],
  before: readonly number[],
): number[] {
  const rate = invoice.lines[indexes[0] as number]?.rateBasisPoints ?? 0;
  const netOf = (index: number) => (invoice.lines[index] as InvoiceLine).netMinor;
  const onLine = (index: number): number => {
    const left = netOf(index) - (before[index] as number);
    return percentOf(left - (credit[index] as number), rate) - percentOf(left, rate);
  };
  const vats = indexes.map(onLine);
  if (invoice.rounding === 'line') return vats;
  const left = sumMinor(indexes.map((index) => netOf(index) - (before[index] as number)));
  const credited = sumMinor(indexes.map((index) => credit[index] as number));
  const exact = percentOf(left - credited, rate) - percentOf(left, rate);
  const first = indexes.findIndex((index) => (credit[index] as number) > 0);
  if (first >= 0) vats[first] = (vats[first] as number) + exact - sumMinor(vats);
  return vats.map((vat) => (vat === 0 ? 0 : vat));
}
