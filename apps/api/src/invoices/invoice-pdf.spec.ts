import type { Invoice } from '@skyberth/shared';
import { extractText, getDocumentProxy } from 'unpdf';
import { describe, expect, it } from 'vitest';
import { invoicePdf } from './invoice-pdf.js';
import { runsOf } from './pdf-pen.js';

const party = {
  name: 'Łódź Orbitálne služby',
  address: { line1: 'Ribniška 4', line2: '', postalCode: '2000', city: 'Maribor', country: 'SI' },
  vatNumber: 'SI12345679',
};
const invoice: Invoice = {
  id: '0197a3f0-0000-7000-8000-000000000001',
  number: 'SKB-2026-000042',
  kind: 'invoice',
  issuedUtc: '2026-12-01T14:05:09.000Z',
  customerName: party.name,
  bookingNumber: 4127,
  bookingId: '0197a3f0-0000-7000-8000-000000000002',
  currency: 'EUR',
  netMinor: 123_450,
  vatMinor: 31_480,
  grossMinor: 154_930,
  supplier: {
    name: 'Harbour Office Oy',
    address: { line1: 'Pilot Quay 4', line2: '', postalCode: '00990', city: 'Helsinki', country: 'FI' },
    vatNumber: 'FI12345671',
  },
  customer: party,
  suppliedOnUtc: '2026-12-03T09:12:00.000Z',
  subject: 'Whimbrel 5 at Tarnwick East, 3 December 2026, 09:02:05 to 09:12:00 UTC',
  lines: [
    {
      description: '9 min 55 s, at €12.40 a minute',
      quantity: '1',
      unitMinor: null,
      discountMinor: 250,
      amountMinor: 123_450,
    },
  ],
  vatRatePercent: 25.5,
  vatNote: 'VAT 25.5 %, FI',
  creditsNumber: null,
};

async function textOf(file: Buffer): Promise<{ pages: string[] }> {
  const { text } = await extractText(await getDocumentProxy(new Uint8Array(file)), { mergePages: false });
  return { pages: text.map((page) => page.replaceAll('\u00a0', ' ')) };
}

describe('the PDF of an invoice', () => {
  it('says everything that the invoice says', async () => {
    const page = (await textOf(await invoicePdf(invoice))).pages[0] ?? '';
    for (const words of [
      'Invoice SKB-2026-000042',
      '1 December 2026',
      '3 December 2026',
      'Łódź Orbitálne služby',
      'VAT SI12345679',
      'VAT FI12345671',
      'Ribniška 4',
      'Whimbrel 5 at Tarnwick East',
      '€1 234.50',
      'after a reduction of €2.50',
      'VAT 25.5 %',
      '€314.80',
      '€1 549.30',
      'page 1 of 1',
    ]) {
      expect(page).toContain(words);
    }
  });

  it('is the same to the byte each time', async () => {
    const [first, second] = [await invoicePdf(invoice), await invoicePdf(structuredClone(invoice))];
    expect(first.equals(second)).toBe(true);
  });

  it('goes on over pages and carries the sum', async () => {
    const [line] = invoice.lines;
    if (!line) throw new Error('The sample has a line.');
    const lines = Array.from({ length: 60 }, () => ({ ...line, amountMinor: 100 }));
    const { pages } = await textOf(
      await invoicePdf({ ...invoice, lines, netMinor: 6000, vatMinor: 0, grossMinor: 6000 }),
    );
    expect(pages.length).toBeGreaterThan(1);
    const carried = /Carried over\s+(€[\d.]+)/.exec(pages[0] ?? '')?.[1];
    expect(carried).toBeDefined();
    expect(pages[1]).toMatch(new RegExp(`Brought over\\s+${carried?.replace('.', '\\.')}`));
    expect(pages.at(-1)).toContain(`page ${pages.length} of ${pages.length}`);
  });

  it('writes each letter in the piece of the font that has it, and a question mark where none has', () => {
    expect(runsOf('Ab Ł Ж ✓').map((run) => [run.script, run.text])).toEqual([
      ['latin', 'Ab '],
      ['latin-ext', 'Ł '],
      ['cyrillic', 'Ж '],
      ['latin', '?'],
    ]);
  });
});
