import type { InvoiceSummary } from '@skyberth/shared';
import { describe, expect, it } from 'vitest';
import { addressLines, byMonth, subjectWords, sumsOf, titleOf, vatWords } from './invoice-words.js';

const invoice = (part: Partial<InvoiceSummary>): InvoiceSummary => ({
  id: '0193d2f0-0000-7000-8000-000000000001',
  number: 'SKB-2026-000001',
  kind: 'invoice',
  issuedUtc: '2026-12-01T10:00:00Z',
  customerName: 'Whimbrel Earth',
  bookingNumber: 1,
  bookingId: '0193d2f0-0000-7000-8000-000000000002',
  currency: 'EUR',
  netMinor: 6_712,
  vatMinor: 1_476,
  grossMinor: 8_188,
  ...part,
});

describe('words of invoices', () => {
  it('names the kind and the number', () => {
    expect(titleOf(invoice({}))).toBe('Invoice SKB-2026-000001');
    expect(titleOf(invoice({ kind: 'credit note', number: 'SKC-2026-000003' }))).toBe('Credit note SKC-2026-000003');
  });

  it('begins a heading with a capital', () => {
    expect(subjectWords('cancelled 2026-335')).toBe('Cancelled 2026-335');
  });

  it('leaves out empty lines of an address', () => {
    expect(
      addressLines({ line1: 'Havnegata 4', line2: '', postalCode: '9008', city: 'Tromsø', country: 'NO' }),
    ).toEqual(['Havnegata 4', '9008 Tromsø', 'Norway']);
  });

  it('writes a rate with the decimals it has', () => {
    expect(vatWords(22)).toBe('VAT 22\u00a0%');
    expect(vatWords(5.5)).toBe('VAT 5.5\u00a0%');
  });
});

describe('sums of invoices', () => {
  it('groups by the month of the UTC date, the order kept', () => {
    const months = byMonth([
      invoice({ issuedUtc: '2026-12-01T00:00:00Z' }),
      invoice({ issuedUtc: '2026-11-30T23:59:59Z' }),
      invoice({ issuedUtc: '2026-11-02T12:00:00Z' }),
    ]);
    expect(months.map((month) => [month.title, month.items.length])).toEqual([
      ['December 2026', 1],
      ['November 2026', 2],
    ]);
  });

  it('adds up each currency for itself, credit notes below zero', () => {
    const sums = sumsOf([
      invoice({}),
      invoice({ currency: 'NOK', netMinor: 100_00, vatMinor: 0, grossMinor: 100_00 }),
      invoice({ kind: 'credit note', netMinor: -6_712, vatMinor: -1_476, grossMinor: -8_188 }),
    ]);
    expect(sums).toEqual([
      { currency: 'EUR', netMinor: 0, vatMinor: 0, grossMinor: 0 },
      { currency: 'NOK', netMinor: 100_00, vatMinor: 0, grossMinor: 100_00 },
    ]);
  });
});
