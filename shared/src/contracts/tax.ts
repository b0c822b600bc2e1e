/** Tax rates and the marketplace's fee as data, and questions about a customer's VAT. */
import { z } from 'zod';
import { Country, Currency } from '../primitives.js';
import { defineRoute } from '../route.js';

const Day = z.iso.date();
const tag = 'money';
export const taxRoutes = {
  taxTable: defineRoute({
    name: 'taxTable',
    method: 'GET',
    path: '/api/tax',
    summary: 'Standard VAT rates by country and day, VAT number forms, rounding, fee and minor units',
    tag,
    access: 'tax.read',
    data: 'all',
    response: z.object({
      seller: z.object({ name: z.string(), country: Country, vatNumber: z.string().nullable() }),
      feeBasisPoints: z.int(),
      rounding: z.string(),
      rates: z.array(z.object({ country: Country, steps: z.array(z.object({ fromDay: Day, basisPoints: z.int() })) })),
      vatNumbers: z.array(z.object({ prefix: z.string(), form: z.string(), checksDigits: z.boolean() })),
      currencies: z.array(z.object({ currency: Currency, decimals: z.int() })),
    }),
  }),
  taxTreatment: defineRoute({
    name: 'taxTreatment',
    method: 'GET',
    path: '/api/tax/treatment',
    summary: 'What an invoice to such a customer would bear on a day, and why',
    tag,
    access: 'tax.read',
    data: 'all',
    query: z.object({ country: Country, vatNumber: z.string().max(40).optional(), day: Day }),
    response: z.object({
      kind: z.string(),
      rateBasisPoints: z.int(),
      taxCountry: z.string().nullable(),
      invoiceText: z.string().nullable(),
      caution: z.string().nullable(),
      vatNumber: z.object({ ok: z.boolean(), sentence: z.string() }).nullable(),
    }),
    errors: ['bad-input'],
  }),
} as const;
