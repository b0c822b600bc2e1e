/** Invoices and, for finance, the ledger. */
import { z } from 'zod';
import { Currency, Id, IdParams, PageQuery, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { PostalAddress } from './accounts.js';

const Party = z.object({ name: z.string(), address: PostalAddress, vatNumber: z.string().nullable() });

export const InvoiceSummary = z.object({
  id: Id,
  number: z.string(),
  kind: z.enum(['invoice', 'credit note']),
  issuedUtc: UtcTime,
  customerName: z.string(),
  bookingNumber: z.int(),
  bookingId: Id,
  currency: Currency,
  netMinor: z.int(),
  vatMinor: z.int(),
  grossMinor: z.int(),
});
export const Invoice = InvoiceSummary.extend({
  supplier: Party,
  customer: Party,
  suppliedOnUtc: UtcTime,
  /** What was sold, in one line: the contact, its station and its time. */
  subject: z.string(),
  lines: z.array(
    z.object({
      description: z.string(),
      quantity: z.string(),
      unitMinor: z.int().nullable(),
      discountMinor: z.int().describe('already taken off the amount'),
      amountMinor: z.int(),
    }),
  ),
  vatRatePercent: z.number(),
  vatNote: z.string(),
  creditsNumber: z.string().nullable(),
});
export type InvoiceSummary = z.infer<typeof InvoiceSummary>;
export type Invoice = z.infer<typeof Invoice>;

const tag = 'money';
export const invoiceRoutes = {
  listInvoices: defineRoute({
    name: 'listInvoices',
    method: 'GET',
    path: '/api/invoices',
    summary: "The organisation's invoices; for finance all",
    tag,
    access: 'invoices.read',
    data: 'parties',
    query: PageQuery,
    response: pageOf(InvoiceSummary),
  }),
  getInvoice: defineRoute({
    name: 'getInvoice',
    method: 'GET',
    path: '/api/invoices/:id',
    summary: 'One invoice',
    tag,
    access: 'invoices.read',
    data: 'parties',
    params: IdParams,
    response: Invoice,
    errors: ['not-found'],
  }),
  invoicePdf: defineRoute({
    name: 'invoicePdf',
    method: 'GET',
    path: '/api/invoices/:id/pdf',
    summary: 'The invoice as PDF, the same bytes every time',
    tag,
    access: 'invoices.read',
    data: 'parties',
    params: IdParams,
    produces: 'application/pdf',
    errors: ['not-found'],
  }),
} as const;
