import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { percentOf } from '../rounding.js';
import type { VatTreatment } from '../tax/treatment.js';
import { buildCreditNote, creditShare } from './credit-note.js';
import { buildInvoice, type InvoiceLineInput } from './invoice.js';
import { type InvoiceDocument, missingInvoiceFields } from './required-fields.js';

const domestic: VatTreatment = {
  kind: 'domestic',
  rateBasisPoints: 2550,
  taxCountry: 'FI',
  invoiceText: null,
  customerVatNumberRequired: false,
  caution: null,
};
const reverse: VatTreatment = {
  kind: 'reverse charge',
  rateBasisPoints: 0,
  taxCountry: 'FI',
  invoiceText: 'Reverse charge',
  customerVatNumberRequired: true,
  caution: null,
};
const line = (netMinor: number, treatment?: VatTreatment): InvoiceLineInput => ({
  description: 'Contact 118',
  quantity: '9 min 30 s',
  unitNetMinor: 640,
  netMinor,
  treatment,
});

describe('invoice arithmetic', () => {
  it('rounds VAT once on the total, or on each line, as stated', () => {
    const lines = [line(1), line(1), line(1)];
    const treatment = { ...domestic, rateBasisPoints: 2000 };
    expect(buildInvoice({ currency: 'EUR', lines, treatment })).toMatchObject({
      netMinor: 3,
      vatMinor: 1,
      grossMinor: 4,
      rounding: 'total',
    });
    expect(buildInvoice({ currency: 'EUR', lines, treatment, rounding: 'line' })).toMatchObject({
      netMinor: 3,
      vatMinor: 0,
      grossMinor: 3,
    });
  });

  it('totals each rate by itself', () => {
    const { vatTotals, vatMinor, grossMinor } = buildInvoice({
      currency: 'EUR',
      lines: [line(10_000), line(5_000, reverse), line(333)],
      treatment: domestic,
    });
    expect(vatTotals.map((total) => [total.vatKind, total.netMinor, total.vatMinor])).toEqual([
      ['domestic', 10_333, 2_635],
      ['reverse charge', 5_000, 0],
    ]);
    expect([vatMinor, grossMinor]).toEqual([2_635, 17_968]);
  });

  it('refuses an empty invoice, an unnamed line and parts of a cent', () => {
    expect(() => buildInvoice({ currency: 'EUR', lines: [], treatment: domestic })).toThrow('at least one line');
    expect(() =>
      buildInvoice({ currency: 'EUR', lines: [{ ...line(1), description: ' ' }], treatment: domestic }),
    ).toThrow('Line 1 has no description');
    expect(() => buildInvoice({ currency: 'EUR', lines: [line(0.5)], treatment: domestic })).toThrow('whole number');
  });

  const nets = fc.array(fc.integer({ min: 0, max: 1_000_000 }), { minLength: 1, maxLength: 12 });
  const rates = fc.integer({ min: 0, max: 3000 });
  const roundings = fc.constantFrom('total' as const, 'line' as const);

  it('always adds up: lines to rates, rates to totals, net and VAT to gross', () => {
    fc.assert(
      fc.property(nets, rates, roundings, (all, rateBasisPoints, rounding) => {
        const invoice = buildInvoice({
          currency: 'EUR',
          lines: all.map((net) => line(net)),
          treatment: { ...domestic, rateBasisPoints },
          rounding,
        });
        expect(invoice.lines.reduce((sum, each) => sum + each.vatMinor, 0)).toBe(invoice.vatMinor);
        expect(invoice.netMinor + invoice.vatMinor).toBe(invoice.grossMinor);
        if (rounding === 'total') expect(invoice.vatMinor).toBe(percentOf(invoice.netMinor, rateBasisPoints));
        for (const each of invoice.lines)
          expect(Math.abs(each.vatMinor - percentOf(each.netMinor, rateBasisPoints))).toBeLessThanOrEqual(1);
      }),
    );
  });

  it('credits to the cent, in one step or in many', () => {
    fc.assert(
      fc.property(
        nets.filter((all) => all.some((net) => net > 0)),
        rates,
        roundings,
        fc.array(fc.integer({ min: 0, max: 10_000 }), { maxLength: 4 }),
        (all, rateBasisPoints, rounding, shares) => {
          const invoice = buildInvoice({
            currency: 'EUR',
            lines: all.map((net) => line(net)),
            treatment: { ...domestic, rateBasisPoints },
            rounding,
          });
          let before = all.map(() => 0);
          let credited = 0;
          for (const share of [...shares, 10_000]) {
            const wanted = creditShare(invoice, share).map((net, index) =>
              Math.min(net, (all[index] as number) - (before[index] as number)),
            );
            if (wanted.every((net) => net === 0)) continue;
            const note = buildCreditNote({ invoice, creditNetMinor: wanted, creditedBeforeMinor: before });
            expect(note.lines.reduce((sum, each) => sum + each.vatMinor, 0)).toBe(note.vatMinor);
            expect(note.netMinor).toBeLessThan(0);
            credited += note.grossMinor;
            before = before.map((net, index) => net + (wanted[index] as number));
          }
          expect(credited + invoice.grossMinor).toBe(0);
        },
      ),
    );
  });

  it('refuses to credit more than is left, or nothing', () => {
    const invoice = buildInvoice({ currency: 'EUR', lines: [line(100)], treatment: domestic });
    expect(() => buildCreditNote({ invoice, creditNetMinor: [60], creditedBeforeMinor: [50] })).toThrow(
      'has 50 minor units left to credit, not 60',
    );
    expect(() => buildCreditNote({ invoice, creditNetMinor: [0], creditedBeforeMinor: [0] })).toThrow(
      'must credit something',
    );
    expect(() => buildCreditNote({ invoice, creditNetMinor: [-1], creditedBeforeMinor: [0] })).toThrow(
      'only amounts above zero',
    );
  });
});

describe('required fields (Directive 2006/112/EC Art. 226; points 9 to 11a as numbered from memory)', () => {
  const amounts = buildInvoice({ currency: 'EUR', lines: [line(8188)], treatment: reverse });
  const complete: InvoiceDocument = {
    kind: 'invoice',
    number: '2026-000118',
    issuedMs: Date.UTC(2026, 11, 1),
    suppliedMs: Date.UTC(2026, 11, 1),
    supplier: {
      name: 'Fellside Earth Stations',
      addressLines: ['1 Fell Road'],
      country: 'DE',
      vatNumber: 'DE118411974',
    },
    customer: { name: 'Saltmarsh Observation', addressLines: ['2 Quay'], country: 'FI', vatNumber: 'FI52405712' },
    amounts,
    texts: ['Reverse charge'],
    changesNumber: null,
  };
  const rulesOf = (change: Partial<InvoiceDocument>) =>
    missingInvoiceFields({ ...complete, ...change }).map((each) => each.rule);
  const taxed = buildInvoice({ currency: 'EUR', lines: [line(100)], treatment: domestic });

  it('finds nothing missing in a complete invoice', () => {
    expect(missingInvoiceFields(complete)).toEqual([]);
  });

  it.each<[string, Partial<InvoiceDocument>]>([
    ['Art. 226(1)', { issuedMs: null }],
    ['Art. 226(2)', { number: '' }],
    ['Art. 226(3)', { supplier: { ...complete.supplier, vatNumber: null } }],
    ['Art. 226(4)', { customer: { ...complete.customer, vatNumber: null } }],
    ['Art. 226(5)', { customer: { ...complete.customer, addressLines: [] } }],
    ['Art. 226(6)', { amounts: { ...amounts, lines: amounts.lines.map((each) => ({ ...each, quantity: '' })) } }],
    ['Art. 226(7)', { suppliedMs: null }],
    [
      'Art. 226(9)',
      { amounts: { ...taxed, vatTotals: taxed.vatTotals.map((total) => ({ ...total, rateBasisPoints: 0 })) } },
    ],
    ['Art. 226(10)', { amounts: { ...amounts, vatMinor: 5 } }],
    ['Art. 226(11a)', { texts: [] }],
    ['Art. 226(10a)', { kind: 'self-billed statement' }],
    ['Art. 219', { kind: 'credit note' }],
  ])('%s', (rule, change) => {
    expect(rulesOf(change)).toEqual([rule]);
  });

  it('Art. 226(11): an exemption without its ground', () => {
    const exempt = buildInvoice({
      currency: 'EUR',
      lines: [line(100)],
      treatment: { ...domestic, kind: 'exempt', rateBasisPoints: 0, invoiceText: 'Small enterprise' },
    });
    expect(rulesOf({ amounts: exempt })).toEqual(['Art. 226(11)']);
  });
});
