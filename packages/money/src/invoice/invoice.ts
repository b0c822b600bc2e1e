/**
 * Invoice arithmetic. VAT is rounded half up, by one of two stated rules: `total` (the default) rounds once for each rate,
 * on the sum of its lines; `line` rounds each line. No EU rule prescribes either (CJEU C-484/06, 10 July 2008), so the
 * rule is kept on the invoice.
 */
import { allocateMinor, sumMinor } from '../amount.js';
import { currencyExponent } from '../currencies.js';
import { MoneyError } from '../money-error.js';
import { checkedWhole, percentOf } from '../rounding.js';
import type { VatKind, VatTreatment } from '../tax/treatment.js';

export type VatRounding = 'total' | 'line';

export interface InvoiceLineInput {
  readonly description: string;
  /** As it is printed, such as `9 min 30 s`. */
  readonly quantity: string;
  /** Net price of one unit, where there is one. */
  readonly unitNetMinor: number | null;
  /** Net of this line after any discount. */
  readonly netMinor: number;
  /** Already taken off `netMinor`; printed because Art. 226(8) asks for it. */
  readonly discountMinor?: number | undefined;
  /** Where this line is taxed otherwise than the invoice. */
  readonly treatment?: VatTreatment | undefined;
}

export interface InvoiceLine {
  readonly description: string;
  readonly quantity: string;
  readonly unitNetMinor: number | null;
  readonly discountMinor: number;
  readonly netMinor: number;
  readonly rateBasisPoints: number;
  readonly vatKind: VatKind;
  /** Words that the treatment of this line puts on the invoice. */
  readonly vatText: string | null;
  /** Its part of the VAT; the parts add up to the invoice's VAT under both rules. */
  readonly vatMinor: number;
}

export interface VatTotal {
  readonly vatKind: VatKind;
  readonly rateBasisPoints: number;
  readonly netMinor: number;
  readonly vatMinor: number;
  readonly text: string | null;
}

export interface InvoiceAmounts {
  readonly currency: string;
  readonly rounding: VatRounding;
  readonly lines: readonly InvoiceLine[];
  readonly vatTotals: readonly VatTotal[];
  readonly netMinor: number;
  readonly vatMinor: number;
  readonly grossMinor: number;
}

/** Builds lines and totals. Throws `bad invoice` without lines or with an unnamed one. */
export function buildInvoice(input: {
  readonly currency: string;
  readonly lines: readonly InvoiceLineInput[];
  readonly treatment: VatTreatment;
  readonly rounding?: VatRounding | undefined;
}): InvoiceAmounts {
  currencyExponent(input.currency);
  if (input.lines.length === 0) throw new MoneyError('bad invoice', 'An invoice needs at least one line.');
  const rounding = input.rounding ?? 'total';
  const groups = new Map<string, { treatment: VatTreatment; members: number[] }>();
  input.lines.forEach((line, index) => {
    if (line.description.trim() === '') throw new MoneyError('bad invoice', `Line ${index + 1} has no description.`);
    checkedWhole(line.netMinor, `The net amount of line ${index + 1}`);
    const treatment = line.treatment ?? input.treatment;
    const key = `${treatment.kind}|${treatment.rateBasisPoints}|${treatment.invoiceText ?? ''}`;
    const group = groups.get(key) ?? { treatment, members: [] };
    group.members.push(index);
    groups.set(key, group);
  });
  const vatOfLine = new Array<number>(input.lines.length).fill(0);
  const vatTotals = [...groups.values()].map(({ treatment, members }) => {
    const nets = members.map((index) => (input.lines[index] as InvoiceLineInput).netMinor);
    const vats = vatOfGroup(nets, treatment.rateBasisPoints, rounding);
    members.forEach((index, place) => {
      vatOfLine[index] = vats[place] as number;
    });
    return {
      vatKind: treatment.kind,
      rateBasisPoints: treatment.rateBasisPoints,
      netMinor: sumMinor(nets),
      vatMinor: sumMinor(vats),
      text: treatment.invoiceText,
    };
  });
  const lines = input.lines.map((line, index): InvoiceLine => {
    const treatment = line.treatment ?? input.treatment;
    return {
      description: line.description,
      quantity: line.quantity,
      unitNetMinor: line.unitNetMinor,
      discountMinor: line.discountMinor ?? 0,
      netMinor: line.netMinor,
      rateBasisPoints: treatment.rateBasisPoints,
      vatKind: treatment.kind,
      vatText: treatment.invoiceText,
      vatMinor: vatOfLine[index] as number,
    };
  });
  const netMinor = sumMinor(lines.map((line) => line.netMinor));
  const vatMinor = sumMinor(vatTotals.map((total) => total.vatMinor));
  return {
    currency: input.currency,
    rounding,
    lines,
    vatTotals,
    netMinor,
    vatMinor,
    grossMinor: sumMinor([netMinor, vatMinor]),
  };
}

/** VAT of lines at one rate, in their order, adding up to what the rule says for the group. */
function vatOfGroup(nets: readonly number[], rateBasisPoints: number, rounding: VatRounding): number[] {
  const each = nets.map((net) => percentOf(net, rateBasisPoints));
  if (rounding === 'line') return each;
  const difference = percentOf(sumMinor(nets), rateBasisPoints) - sumMinor(each);
  if (difference === 0) return each;
  const shares = allocateMinor(
    difference,
    nets.map((net) => Math.max(1, Math.abs(net))),
  );
  return each.map((vat, index) => vat + (shares[index] as number));
}
