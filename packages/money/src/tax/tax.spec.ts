import { describe, expect, it } from 'vitest';
import { EU_COUNTRIES, standardRateBasisPoints } from './rates.js';
import { vatTreatment } from './treatment.js';
import { checkVatNumber } from './vat-number.js';

const dateMs = Date.UTC(2026, 11, 1);
const DE = { country: 'DE', vatNumber: 'DE118411974' };
const FI = { country: 'FI', vatNumber: 'FI52405712' };
const NO = { country: 'NO', vatNumber: null };

describe('VAT treatment of a service between businesses (Directive 2006/112/EC Art. 44, 196, 226)', () => {
  it('charges the country’s own rate at home', () => {
    expect(vatTreatment({ supplier: FI, customer: FI, dateMs })).toMatchObject({
      kind: 'domestic',
      rateBasisPoints: 2550,
      taxCountry: 'FI',
      invoiceText: null,
    });
  });

  it('leaves the tax to a customer in business in another member state, with the required words', () => {
    expect(vatTreatment({ supplier: DE, customer: FI, dateMs })).toEqual({
      kind: 'reverse charge',
      rateBasisPoints: 0,
      taxCountry: 'FI',
      invoiceText: 'Reverse charge',
      customerVatNumberRequired: true,
      caution: null,
    });
  });

  it('charges the supplier’s VAT when the customer shows no valid number, and says so', () => {
    for (const vatNumber of [null, 'FI52405713', 'NO966026782MVA']) {
      const result = vatTreatment({ supplier: DE, customer: { country: 'FI', vatNumber }, dateMs });
      expect(result).toMatchObject({ kind: 'domestic', rateBasisPoints: 1900, taxCountry: 'DE' });
      expect(result.caution).toContain('no valid VAT number');
    }
  });

  it('is outside the scope for a customer outside the EU', () => {
    const result = vatTreatment({ supplier: DE, customer: NO, dateMs });
    expect(result).toMatchObject({ kind: 'outside scope', rateBasisPoints: 0, taxCountry: null, caution: null });
    expect(result.invoiceText).toContain('Article 44');
  });

  it('warns that another country’s own tax is not known', () => {
    expect(vatTreatment({ supplier: NO, customer: NO, dateMs })).toMatchObject({
      kind: 'outside scope',
      invoiceText: null,
      caution: 'Both sides are in NO, whose own tax is not kept here: it may have to be charged.',
    });
  });

  it('lets a supplier outside the EU reverse-charge, and asks for a missing number', () => {
    expect(vatTreatment({ supplier: NO, customer: FI, dateMs }).kind).toBe('reverse charge');
    expect(vatTreatment({ supplier: NO, customer: { ...FI, vatNumber: null }, dateMs })).toMatchObject({
      kind: 'reverse charge',
      customerVatNumberRequired: true,
      caution: expect.stringContaining('ask for it'),
    });
  });

  it('prints the ground of an exemption', () => {
    expect(
      vatTreatment({ supplier: { ...DE, exemption: 'Small enterprise, no VAT charged' }, customer: DE, dateMs }),
    ).toMatchObject({ kind: 'exempt', invoiceText: 'Small enterprise, no VAT charged' });
  });
});

describe('rates', () => {
  it('has 27 members and none outside', () => {
    expect(EU_COUNTRIES).toHaveLength(27);
    expect(() => standardRateBasisPoints('NO', dateMs)).toThrow('No standard VAT rate is kept for NO on 2026-12-01');
    expect(() => standardRateBasisPoints('toString', dateMs)).toThrow('No standard VAT rate');
    expect(() => standardRateBasisPoints('DE', Date.UTC(2019, 0, 1))).toThrow('2019-01-01');
  });
});

describe('VAT numbers', () => {
  it('does not mind spaces and marks, and knows Greece by both prefixes', () => {
    expect(checkVatNumber('de 118.411-974')).toEqual({
      ok: true,
      country: 'DE',
      number: 'DE118411974',
      checked: 'check digits',
    });
    expect(checkVatNumber('GR 016019805')).toMatchObject({ ok: true, country: 'GR', number: 'EL016019805' });
    expect(checkVatNumber('CHE-971.992.154 MWST')).toMatchObject({
      ok: true,
      country: 'CH',
      number: 'CHE971992154MWST',
    });
  });

  it('says that only the form was looked at where no check digit is known here', () => {
    expect(checkVatNumber('RO1234567')).toMatchObject({ ok: true, checked: 'form only' });
  });

  it.each([
    ['', 'does not begin with a country'],
    ['XX123', 'does not begin with a country'],
    ['DE12', 'does not have the form of a VAT number there: DE and 9 digits'],
    ['DE118411975', 'check digits of “DE118411975” do not agree'],
  ])('refuses “%s”', (text, why) => {
    const check = checkVatNumber(text);
    expect(check.ok ? '' : check.sentence).toContain(why);
  });
});
