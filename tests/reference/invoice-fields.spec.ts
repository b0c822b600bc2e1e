/**
 * What an invoice must say, held against the printed page. Source: Directive 2006/112/EC Art. 226, points 1 to 8 as read there,
 * content of points 9 to 11a as read in two VAT guides (point numbers from memory); Art. 219 for credit notes.
 */
import type { Invoice } from '@skyberth/shared';
import { extractText, getDocumentProxy } from 'unpdf';
import { describe, expect, it } from 'vitest';
import { invoicePdf } from '../../apps/api/src/invoices/invoice-pdf.js';

const address = (line1: string, city: string, country: string) => ({
  line1,
  line2: '',
  postalCode: '10115',
  city,
  country,
});
const DOMESTIC: Invoice = {
  id: '0197a3f0-0000-7000-8000-000000000001',
  number: 'SKB-2026-000042',
  kind: 'invoice',
  issuedUtc: '2026-12-01T14:05:09.000Z',
  customerName: 'Tidewater Oy',
  bookingNumber: 4127,
  bookingId: '0197a3f0-0000-7000-8000-000000000002',
  currency: 'EUR',
  netMinor: 10_000,
  vatMinor: 2_550,
  grossMinor: 12_550,
  supplier: { name: 'Harbour Office Oy', address: address('Pilot Quay 4', 'Helsinki', 'FI'), vatNumber: 'FI12345671' },
  customer: { name: 'Tidewater Oy', address: address('Lock Street 1', 'Turku', 'FI'), vatNumber: 'FI20774740' },
  suppliedOnUtc: '2026-12-03T09:12:00.000Z',
  subject: 'Whimbrel 5 at Tarnwick East, 3 December 2026, 09:02:05 to 09:12:00 UTC',
  lines: [
    {
      description: '9 min 55 s, at €12.40 a minute',
      quantity: '1',
      unitMinor: null,
      discountMinor: 250,
      amountMinor: 10_000,
    },
  ],
  vatRatePercent: 25.5,
  vatNote: 'VAT 25.5 %, FI',
  creditsNumber: null,
};
const REVERSED: Invoice = {
  ...DOMESTIC,
  customer: { name: 'Kiel Orbit GmbH', address: address('Förde 9', 'Kiel', 'DE'), vatNumber: 'DE136695976' },
  vatMinor: 0,
  grossMinor: 10_000,
  vatRatePercent: 0,
  vatNote: 'Reverse charge',
};

async function printed(invoice: Invoice): Promise<string> {
  const { text } = await extractText(await getDocumentProxy(new Uint8Array(await invoicePdf(invoice))), {
    mergePages: true,
  });
  return text.replaceAll('\u00a0', ' ');
}

describe('the printed invoice against Directive 2006/112/EC Art. 226', () => {
  it.each([
    ['(1) date of issue', '1 December 2026'],
    ['(2) sequential number', 'SKB-2026-000042'],
    ['(3) VAT number of the supplier', 'VAT FI12345671'],
    ['(5) full name of the supplier', 'Harbour Office Oy'],
    ['(5) address of the supplier', 'Pilot Quay 4'],
    ['(5) full name of the customer', 'Tidewater Oy'],
    ['(5) address of the customer', 'Lock Street 1'],
    ['(6) extent and nature of the service', '9 min 55 s'],
    ['(6) nature of the service', 'Whimbrel 5 at Tarnwick East'],
    ['(7) date of the supply', '3 December 2026'],
    ['(8) taxable amount', '€100.00'],
    ['(8) unit price', 'at €12.40 a minute'],
    ['(8) discount', 'after a reduction of €2.50'],
    ['(9) VAT rate', 'VAT 25.5 %'],
    ['(10) VAT payable', '€25.50'],
  ])('says %s', async (_point, words) => {
    expect(await printed(DOMESTIC)).toContain(words);
  });

  it.each([
    ['(4) VAT number of the customer who owes the tax', 'VAT DE136695976'],
    ['(11a) the words', 'Reverse charge'],
    ['(10) that no VAT is payable', '€0.00'],
  ])('says %s where the customer owes the tax', async (_point, words) => {
    expect(await printed(REVERSED)).toContain(words);
  });

  it('says (11) why there is no VAT outside its scope', async () => {
    const ground = 'Outside the scope of EU VAT: the place of supply is the customer’s country';
    expect((await printed({ ...REVERSED, vatNote: ground })).replace(/\s+/g, ' ')).toContain(ground);
  });

  it('refers to the invoice that it changes, as Art. 219 asks of a credit note', async () => {
    const credit = {
      ...DOMESTIC,
      kind: 'credit note' as const,
      number: 'SKC-2026-000001',
      creditsNumber: DOMESTIC.number,
    };
    const page = await printed(credit);
    expect(page).toContain('SKC-2026-000001');
    expect(page).toContain(DOMESTIC.number);
  });
});
