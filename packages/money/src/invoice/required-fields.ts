/**
 * What an invoice must carry: Directive 2006/112/EC Art. 226, points as numbered there (points 9 to 11a from memory), and
 * Art. 219 for documents that change an invoice.
 */
import { checkVatNumber } from '../tax/vat-number.js';
import type { InvoiceAmounts } from './invoice.js';

export interface InvoiceParty {
  readonly name: string;
  readonly addressLines: readonly string[];
  readonly country: string;
  readonly vatNumber: string | null;
}

export interface InvoiceDocument {
  readonly kind: 'invoice' | 'credit note' | 'self-billed statement';
  readonly number: string;
  readonly issuedMs: number | null;
  /** Day of the supply, or of the payment on account. */
  readonly suppliedMs: number | null;
  readonly supplier: InvoiceParty;
  readonly customer: InvoiceParty;
  readonly amounts: InvoiceAmounts;
  /** Every statement printed on it, such as the reverse-charge words. */
  readonly texts: readonly string[];
  /** Number of the invoice that a credit note changes. */
  readonly changesNumber: string | null;
}

export interface MissingField {
  /** Article and point. */
  readonly rule: string;
  readonly field: string;
  readonly sentence: string;
}

/** Every required field that is absent, in the order of the article; empty when the invoice is complete. */
export function missingInvoiceFields(invoice: InvoiceDocument): MissingField[] {
  const { amounts, supplier, customer } = invoice;
  const kinds = new Set(amounts.vatTotals.map((total) => total.vatKind));
  const checks: readonly (readonly [missing: boolean, rule: string, field: string, sentence: string])[] = [
    [!Number.isFinite(invoice.issuedMs), 'Art. 226(1)', 'issuedMs', 'The date of issue is missing.'],
    [invoice.number.trim() === '', 'Art. 226(2)', 'number', 'The sequential number is missing.'],
    [
      (kinds.has('domestic') || kinds.has('reverse charge')) && blank(supplier.vatNumber),
      'Art. 226(3)',
      'supplier.vatNumber',
      'The supplier’s VAT number is missing.',
    ],
    [
      kinds.has('reverse charge') && !validVatNumber(customer.vatNumber),
      'Art. 226(4)',
      'customer.vatNumber',
      'The customer owes the tax, so a valid VAT number of the customer is needed.',
    ],
    [!hasAddress(supplier), 'Art. 226(5)', 'supplier', 'The supplier’s full name and address are missing.'],
    [!hasAddress(customer), 'Art. 226(5)', 'customer', 'The customer’s full name and address are missing.'],
    [
      amounts.lines.some((line) => line.description.trim() === '' || line.quantity.trim() === ''),
      'Art. 226(6)',
      'lines',
      'A line does not say what was supplied and how much.',
    ],
    [!Number.isFinite(invoice.suppliedMs), 'Art. 226(7)', 'suppliedMs', 'The date of supply is missing.'],
    [
      amounts.vatTotals.length === 0,
      'Art. 226(8)',
      'vatTotals',
      'The taxable amount for each rate or exemption is missing.',
    ],
    [
      kinds.has('domestic') &&
        amounts.vatTotals.some((total) => total.vatKind === 'domestic' && total.rateBasisPoints <= 0),
      'Art. 226(9)',
      'rateBasisPoints',
      'The VAT rate applied is missing.',
    ],
    [
      amounts.vatMinor !== amounts.vatTotals.reduce((sum, total) => sum + total.vatMinor, 0),
      'Art. 226(10)',
      'vatMinor',
      'The VAT payable does not add up.',
    ],
    [
      kinds.has('exempt') && lacksText(invoice, 'exempt'),
      'Art. 226(11)',
      'texts',
      'The ground of the exemption is not stated.',
    ],
    [
      kinds.has('reverse charge') && !invoice.texts.some((text) => /reverse charge/i.test(text)),
      'Art. 226(11a)',
      'texts',
      'The words “Reverse charge” are missing.',
    ],
    [
      invoice.kind === 'self-billed statement' && !invoice.texts.some((text) => /self-billing/i.test(text)),
      'Art. 226(10a)',
      'texts',
      'The word “Self-billing” is missing.',
    ],
    [
      invoice.kind === 'credit note' && blank(invoice.changesNumber),
      'Art. 219',
      'changesNumber',
      'A credit note must refer to the invoice that it changes.',
    ],
  ];
  return checks.filter(([missing]) => missing).map(([, rule, field, sentence]) => ({ rule, field, sentence }));
}

const blank = (text: string | null): boolean => text === null || text.trim() === '';
const hasAddress = (party: InvoiceParty): boolean =>
  !blank(party.name) && !blank(party.country) && party.addressLines.some((line) => !blank(line));
const validVatNumber = (text: string | null): boolean => text !== null && checkVatNumber(text).ok;

function lacksText(invoice: InvoiceDocument, kind: string): boolean {
  return invoice.amounts.vatTotals.some(
    (total) => total.vatKind === kind && (blank(total.text) || !invoice.texts.includes(total.text ?? '')),
  );
}
