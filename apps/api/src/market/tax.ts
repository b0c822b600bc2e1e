/** VAT on what the marketplace sells to an operator, as the card and the booking show it. */
import { percentOf, type VatTreatment, vatTreatment } from '@skyberth/money';

export interface QuotedVat {
  readonly ratePercent: number;
  readonly amountMinor: number;
  /** A few words beside the total. */
  readonly note: string;
}

interface Party {
  readonly country: string;
  readonly vatNumber: string | null;
}

/**
 * VAT of a net total, rounded once on the total, half up, as the invoice will be. `dateMs` is the day of purchase, on which
 * the invoice is written.
 */
export function vatOf(question: { seller: Party; buyer: Party; netMinor: number; dateMs: number }): QuotedVat {
  const { seller, buyer, netMinor, dateMs } = question;
  const treatment = vatTreatment({ supplier: seller, customer: buyer, dateMs });
  return {
    ratePercent: treatment.rateBasisPoints / 100,
    amountMinor: percentOf(netMinor, treatment.rateBasisPoints),
    note: noteOf(treatment),
  };
}

function noteOf(treatment: VatTreatment): string {
  switch (treatment.kind) {
    case 'domestic':
      return `VAT ${treatment.rateBasisPoints / 100}\u00a0%, ${treatment.taxCountry ?? ''}`;
    case 'reverse charge':
      return 'VAT by reverse charge';
    case 'exempt':
      return 'No VAT, the seller is exempt';
    case 'outside scope':
      return 'No VAT, outside its scope';
  }
}
