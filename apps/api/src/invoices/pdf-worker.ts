/** Runs in a thread of its own: one invoice in, its PDF out. */
import type { Invoice } from '@skyberth/shared';
import { invoicePdf } from './invoice-pdf.js';

export default async function print(invoice: Invoice): Promise<Uint8Array> {
  const file = await invoicePdf(invoice);
  // A copy of its own length: a buffer may be a window on a larger pool, which cannot be handed over.
  return new Uint8Array(file);
}
