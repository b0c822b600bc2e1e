/** What the books say about one contact after its dispute: read through the API by those who may, to compare. */
import { type Booking, type Dispute, type Invoice, routes } from '@skyberth/shared';
import type Stripe from 'stripe';
import { must } from '../../api/harness/client.js';
import type { Shop } from '../../api/harness/shop.js';

export interface SettledMoney {
  readonly booking: Booking;
  readonly dispute: Dispute;
  readonly invoice: Invoice;
  readonly creditNote: Invoice;
  /** Sums of the journal's postings about this contact, by account; debits positive. */
  readonly accounts: ReadonlyMap<string, number>;
  /** Entries that do not come to nothing; there must be none. */
  readonly lopsided: readonly string[];
  readonly refundsAtProvider: readonly Stripe.Refund[];
}

export async function settledMoney(shop: Shop, bookingId: string, disputeId: string): Promise<SettledMoney> {
  const { call, people } = shop.skyberth;
  const [operator, admin, finance] = [
    await people.signIn(shop.operator.email),
    await people.staff('admin'),
    await people.staff('finance'),
  ];
  const booking = await must(call(routes.getBooking, { params: { id: bookingId }, as: operator }));
  const dispute = await must(call(routes.getDispute, { params: { id: disputeId }, as: admin }));
  const papers = await must(call(routes.listInvoices, { query: {}, as: operator }));
  const paper = async (kind: Invoice['kind']): Promise<Invoice> => {
    const found = papers.items.filter((one) => one.bookingId === bookingId && one.kind === kind);
    const [only] = found;
    if (!only || found.length > 1) throw new Error(`There are ${found.length} papers of the kind ${kind}.`);
    return must(call(routes.getInvoice, { params: { id: only.id }, as: operator }));
  };
  const journal = await must(
    call(routes.journal, { query: { bookingNumber: booking.number, limit: 200 }, as: finance }),
  );
  const accounts = new Map<string, number>();
  for (const { account, amountMinor } of journal.items.flatMap((entry) => entry.postings))
    accounts.set(account, (accounts.get(account) ?? 0) + amountMinor);
  const refunds = await shop.payments.stripe.refunds.list({ limit: 100 });
  return {
    booking,
    dispute,
    invoice: await paper('invoice'),
    creditNote: await paper('credit note'),
    accounts,
    lopsided: journal.items
      .filter(({ postings }) => postings.reduce((sum, { amountMinor }) => sum + amountMinor, 0) !== 0)
      .map(({ cause }) => cause),
    refundsAtProvider: refunds.data,
  };
}
