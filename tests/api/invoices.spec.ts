import { routes } from '@skyberth/shared';
import { extractText, getDocumentProxy } from 'unpdf';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openShop, type Shop } from './harness/shop.js';
import { must } from './harness.js';

let shop: Shop;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 }, buyer: { country: 'FI' } });
});
afterAll(() => shop?.stop());

const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);
const pass = (index: number) => {
  const leastMs = shop.skyberth.clock.nowMs() + 30 * 3_600_000;
  const found = shop.passes.filter((each) => Date.parse(each.geometry.aosUtc) > leastMs)[index];
  if (!found) throw new Error('There are not so many passes.');
  return found;
};
const textOf = async (file: Buffer) =>
  (await extractText(await getDocumentProxy(new Uint8Array(file)), { mergePages: true })).text.replaceAll(
    '\u00a0',
    ' ',
  );
const pdfOf = async (id: string) =>
  (await must(call(routes.invoicePdf, { params: { id }, as: shop.operator }))) as unknown as Buffer;

describe('an invoice', () => {
  it('is issued on confirmation, adds up, and has all that Directive 2006/112/EC Art. 226 asks for', async () => {
    const booking = await shop.buy(pass(0));
    const invoice = await must(call(routes.getInvoice, { params: { id: booking.invoiceId ?? '' }, as: shop.operator }));
    // Art. 226, points as listed in published-values.md section j: (1) date, (2) number, (3) supplier's VAT number,
    // (5) names and addresses, (6) what was supplied, (7) date of supply, (8) taxable amount, (9) rate, (10) VAT.
    expect(invoice.number).toMatch(/^SKB-\d{4}-000001$/);
    expect(Date.parse(invoice.issuedUtc)).toBeGreaterThan(0);
    expect(invoice.supplier).toMatchObject({
      name: 'Skyberth Harbour Office Oy',
      vatNumber: 'FI12345671',
      address: { city: 'Helsinki' },
    });
    expect(invoice.customer.address).toMatchObject({ line1: 'Lock Street 1', country: 'FI' });
    expect(invoice.subject).toContain(booking.spacecraftName);
    expect(invoice.suppliedOnUtc).toBe(booking.losUtc);
    expect(invoice.lines.reduce((sum, line) => sum + line.amountMinor, 0)).toBe(invoice.netMinor);
    // Finland's standard rate since 2024-09-01 is 25.5 % (kept in packages/money with its sources).
    expect(invoice.vatRatePercent).toBe(25.5);
    expect(invoice.vatMinor).toBe(Math.floor((invoice.netMinor * 255 + 500) / 1000));
    expect(invoice.grossMinor).toBe(booking.toPayMinor);
    expect(invoice.bookingNumber).toBe(booking.number);
  });

  it('is a PDF of the same bytes each time, and is mailed with it', async () => {
    const [summary] = (await must(call(routes.listInvoices, { query: {}, as: shop.operator }))).items;
    const id = summary?.id ?? '';
    const file = await pdfOf(id);
    await shop.advance(60_000);
    expect((await pdfOf(id)).equals(file)).toBe(true);
    const text = await textOf(file);
    const invoice = await must(call(routes.getInvoice, { params: { id }, as: shop.operator }));
    for (const words of [
      invoice.number,
      invoice.customer.name,
      'VAT 25.5 %',
      'FI12345671',
      invoice.subject.slice(0, 30),
    ]) {
      expect(text).toContain(words);
    }
    const gross = (invoice.grossMinor / 100).toFixed(2).replace(/\B(?=(\d{3})+\.)/g, ' ');
    expect(text).toContain(`€${gross}`);
    const mail = shop.skyberth.mail.received.find((each) => each.subject.startsWith(`Invoice ${invoice.number}`));
    expect(mail?.attachments).toHaveLength(1);
    expect(mail?.attachments[0]?.fileName).toBe(`${invoice.number}.pdf`);
    expect(mail?.attachments[0]?.content.equals(file)).toBe(true);
  });

  it('is read by its buyer and by finance, and by nobody else', async () => {
    const [summary] = (await must(call(routes.listInvoices, { query: {}, as: shop.operator }))).items;
    const params = { id: summary?.id ?? '' };
    const { people } = shop.skyberth;
    const finance = await people.staff('finance');
    expect((await must(call(routes.listInvoices, { query: {}, as: finance }))).total).toBeGreaterThan(0);
    expect((await must(call(routes.getInvoice, { params, as: finance }))).id).toBe(params.id);
    for (const as of [await people.operator(), await people.owner(), shop.owner]) {
      expect((await must(call(routes.listInvoices, { query: {}, as }))).total).toBe(0);
      expect((await call(routes.getInvoice, { params, as })).problem?.code).toBe('not-found');
      expect((await call(routes.invoicePdf, { params, as })).problem?.code).toBe('not-found');
    }
    expect((await call(routes.getInvoice, { params, as: await people.staff('admin') })).problem?.code).toBe(
      'not-allowed',
    );
  });

  it('is credited when the contact is cancelled, by a note that refers to it and leaves what was kept', async () => {
    const booking = await shop.buy(pass(1));
    const expectedRefundMinor = booking.refundNowMinor ?? 0;
    await must(
      call(routes.cancelBooking, { params: { id: booking.id }, body: { expectedRefundMinor }, as: shop.operator }),
    );
    await shop.settle();
    const { items } = await must(call(routes.listInvoices, { query: {}, as: shop.operator }));
    const [note, invoice] = ['credit note', 'invoice'].map((kind) =>
      items.find((each) => each.bookingId === booking.id && each.kind === kind),
    );
    expect(note).toMatchObject({ grossMinor: -expectedRefundMinor });
    expect(note?.number).toMatch(/^SKC-\d{4}-000001$/);
    const kept = (invoice?.grossMinor ?? 0) + (note?.grossMinor ?? 0);
    expect((await shop.booking(booking.id)).payment.capturedMinor).toBe(kept);
    const full = await must(call(routes.getInvoice, { params: { id: note?.id ?? '' }, as: shop.operator }));
    // Art. 219: a document that changes an invoice refers to it.
    expect(full.creditsNumber).toBe(invoice?.number);
    expect(await textOf(await pdfOf(full.id))).toContain(`Credit note ${full.number}`);
  });

  it('bears no VAT for a business elsewhere in the EU, and says “Reverse charge”', async () => {
    // Art. 226(11a), published-values.md section j. The VAT number is of reference/data/money/vat-number-check-digits.csv.
    const buyer = await shop.skyberth.people.operator({ country: 'DE', vatNumber: 'DE118411974' });
    const { passesForSale, spacecraftWithElements, wishFor } = await import('./harness/shop.js');
    const craft = await spacecraftWithElements(shop.skyberth, buyer, 70_150);
    const wish = { as: buyer, spacecraftId: craft.id, days: 4 };
    const [first] = (await passesForSale(shop.skyberth, wish)).slice(-1);
    if (!first) throw new Error('There is no pass for sale.');
    const body = await wishFor(shop.skyberth, first, buyer);
    const { id } = await must(call(routes.holdBerth, { body, as: buyer }));
    await shop.payments.payOnPage(await shop.openPage(id, { as: buyer }), 'pm_card_visa');
    await shop.settle();
    const { invoiceId } = await shop.booking(id, buyer);
    const invoice = await must(call(routes.getInvoice, { params: { id: invoiceId ?? '' }, as: buyer }));
    expect(invoice).toMatchObject({
      vatMinor: 0,
      vatRatePercent: 0,
      vatNote: 'Reverse charge',
      customer: { vatNumber: 'DE118411974' },
    });
  });
});
