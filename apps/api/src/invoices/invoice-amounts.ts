/** From a frozen price to the amounts of its invoice, and of the credit note when part of it is given back. */
import {
  allocateMinor,
  buildCreditNote,
  buildInvoice,
  creditShare,
  type InvoiceAmounts,
  type InvoiceLineInput,
  percentOf,
  type VatTreatment,
} from '@skyberth/money';
import type { Quote } from '@skyberth/shared';

/** The treatment as far as sums need it: the rate that the buyer saw. */
export function frozenTreatment(quote: Quote): VatTreatment {
  const rateBasisPoints = Math.round(quote.vat.ratePercent * 100);
  return {
    kind: rateBasisPoints > 0 ? 'domestic' : 'outside scope',
    rateBasisPoints,
    taxCountry: null,
    invoiceText: null,
    customerVatNumberRequired: false,
    caution: null,
  };
}

/**
 * The lines of a price as invoice lines. Reductions are no lines of their own but discounts on the lines before them, since
 * an invoice states the taxable amount after discounts (Directive 2006/112/EC Art. 226(8)).
 */
export function invoiceLines(quote: Quote): InvoiceLineInput[] {
  let reductionMinor = quote.lines.reduce((sum, line) => sum - Math.min(0, line.amountMinor), 0);
  return quote.lines
    .filter((line) => line.amountMinor > 0 || quote.lines.length === 1)
    .map((line) => {
      const discountMinor = Math.min(reductionMinor, line.amountMinor);
      reductionMinor -= discountMinor;
      return {
        description: line.detail ? `${line.label}, ${line.detail}` : line.label,
        quantity: '1',
        unitNetMinor: null,
        netMinor: line.amountMinor - discountMinor,
        discountMinor,
      };
    });
}

/** The amounts of the invoice of a price, VAT rounded once on the total. Throws where they are not what the buyer saw. */
export function amountsOf(quote: Quote, treatment: VatTreatment = frozenTreatment(quote)): InvoiceAmounts {
  const amounts = buildInvoice({ currency: quote.currency, lines: invoiceLines(quote), treatment });
  if (amounts.netMinor !== quote.totalMinor || amounts.vatMinor !== quote.vat.amountMinor) {
    throw new Error(
      `An invoice of ${amounts.netMinor} + ${amounts.vatMinor} would not be the price shown, ${quote.totalMinor} + ${quote.vat.amountMinor}.`,
    );
  }
  return amounts;
}

/** The credit note that gives `refundPercent` of an invoice back, or null where that is nothing. Its amounts are negative. */
export function creditOf(invoice: InvoiceAmounts, refundPercent: number): InvoiceAmounts | null {
  const creditMinor = percentOf(invoice.netMinor, refundPercent * 100);
  if (creditMinor === 0) return null;
  const nets = invoice.lines.map((line) => line.netMinor);
  return buildCreditNote({
    invoice,
    creditNetMinor: allocateMinor(creditMinor, nets),
    creditedBeforeMinor: nets.map(() => 0),
  });
}

/** The next step of crediting an invoice, from one share of it to a larger one; null where that is nothing. */
export function creditStepOf(
  invoice: InvoiceAmounts,
  fromBasisPoints: number,
  toBasisPoints: number,
): InvoiceAmounts | null {
  const before = creditShare(invoice, fromBasisPoints);
  const step = creditShare(invoice, toBasisPoints).map((net, index) => net - (before[index] ?? 0));
  if (step.every((net) => net === 0)) return null;
  return buildCreditNote({ invoice, creditNetMinor: step, creditedBeforeMinor: before });
}

/** What `refundPercent` of a price is, net, VAT and together. */
export function refundOf(
  quote: Quote,
  refundPercent: number,
): { netMinor: number; vatMinor: number; grossMinor: number } {
  const credit = creditOf(amountsOf(quote), refundPercent);
  if (!credit) return { netMinor: 0, vatMinor: 0, grossMinor: 0 };
  return {
    netMinor: -credit.netMinor,
    vatMinor: credit.vatMinor === 0 ? 0 : -credit.vatMinor,
    grossMinor: -credit.grossMinor,
  };
}
