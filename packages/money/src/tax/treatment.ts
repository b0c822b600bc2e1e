/**
 * Which VAT a service between two businesses bears: Directive 2006/112/EC Art. 44 (it is taxed where the customer is
 * established), Art. 196 (then the customer owes it, if the supplier is not established there), Art. 226(11) and (11a)
 * (what the invoice must say). Article numbers 196 and 226(11a) are from memory. Special territories, reduced rates and the
 * tax of countries outside the EU are not known here, and the answer says so in `caution`.
 */
import { isEuCountry, standardRateBasisPoints } from './rates.js';
import { checkVatNumber } from './vat-number.js';

export interface TaxParty {
  /** ISO 3166 of the establishment that takes part. */
  readonly country: string;
  readonly vatNumber: string | null;
}

export interface TaxSupplier extends TaxParty {
  /** The legal ground, as it must stand on the invoice, where the supplier charges no VAT at all. */
  readonly exemption?: string | undefined;
}

export type VatKind = 'domestic' | 'reverse charge' | 'exempt' | 'outside scope';

export interface VatTreatment {
  readonly kind: VatKind;
  /** Charged on the invoice; 0 for every kind but `domestic`. */
  readonly rateBasisPoints: number;
  /** Country whose VAT it is; `null` outside the EU. */
  readonly taxCountry: string | null;
  /** Words that the invoice must carry; `null` where none are required. */
  readonly invoiceText: string | null;
  readonly customerVatNumberRequired: boolean;
  /** What a person must look at, since the rules here do not cover it; `null` where nothing. */
  readonly caution: string | null;
}

/** The words of Art. 226(11a). */
export const REVERSE_CHARGE_TEXT = 'Reverse charge';

const none = { rateBasisPoints: 0, customerVatNumberRequired: false, caution: null } as const;

/** Decides for a service supplied on the UTC day of `dateMs`. Throws `no rate` where a rate is needed and not kept. */
export function vatTreatment({
  supplier,
  customer,
  dateMs,
}: {
  readonly supplier: TaxSupplier;
  readonly customer: TaxParty;
  readonly dateMs: number;
}): VatTreatment {
  const supplierInEu = isEuCountry(supplier.country);
  const customerInEu = isEuCountry(customer.country);
  if (supplier.exemption !== undefined) {
    return {
      ...none,
      kind: 'exempt',
      taxCountry: supplierInEu ? supplier.country : null,
      invoiceText: supplier.exemption,
    };
  }
  if (!customerInEu) {
    return {
      ...none,
      kind: 'outside scope',
      taxCountry: null,
      invoiceText: supplierInEu
        ? 'Outside the scope of EU VAT: the place of supply is the customer’s country (Directive 2006/112/EC, Article 44).'
        : null,
      caution:
        supplier.country === customer.country
          ? `Both sides are in ${customer.country}, whose own tax is not kept here: it may have to be charged.`
          : null,
    };
  }
  const customerIsTaxable = isTaxablePerson(customer);
  if (supplier.country === customer.country || (supplierInEu && !customerIsTaxable)) {
    return {
      ...none,
      kind: 'domestic',
      rateBasisPoints: standardRateBasisPoints(supplier.country, dateMs),
      taxCountry: supplier.country,
      invoiceText: null,
      caution:
        supplier.country === customer.country
          ? null
          : 'The customer gave no valid VAT number of an EU country, so the supplier’s VAT is charged as to a private person.',
    };
  }
  return {
    kind: 'reverse charge',
    rateBasisPoints: 0,
    taxCountry: customer.country,
    invoiceText: REVERSE_CHARGE_TEXT,
    customerVatNumberRequired: true,
    caution: customerIsTaxable
      ? null
      : 'The customer gave no valid VAT number of an EU country; ask for it before invoicing.',
  };
}

/** A VAT number that is well formed and of an EU member stands as the proof of being in business. */
function isTaxablePerson(customer: TaxParty): boolean {
  if (customer.vatNumber === null) return false;
  const check = checkVatNumber(customer.vatNumber);
  return check.ok && isEuCountry(check.country);
}
