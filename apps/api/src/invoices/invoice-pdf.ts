/** An invoice on paper: A4, from the frozen document alone, so that it prints identically for ever. */
import { formatMoney } from '@skyberth/money';
import type { Invoice } from '@skyberth/shared';
import { type Ink, PdfPen } from './pdf-pen.js';

const LEFT = 56;
const RIGHT = 539;
const TOP = 52;
/** Lines go down to here; below stand the sum carried over and the foot. */
const LOWEST = 700;
const FOOT = 792;
const DESCRIPTION_WIDTH = 330;

const PLAIN: Ink = { sizePt: 10 };
const STRONG: Ink = { sizePt: 10, weight: 600 };
const SMALL: Ink = { sizePt: 8.5, colour: '#4E636B' };

/** The PDF file of an invoice or credit note; the same bytes for the same document. */
export async function invoicePdf(invoice: Invoice): Promise<Buffer> {
  const title = `${invoice.kind === 'invoice' ? 'Invoice' : 'Credit note'} ${invoice.number}`;
  const pen = new PdfPen({ title, author: invoice.supplier.name, createdMs: Date.parse(invoice.issuedUtc) });
  pen.doc.addPage();
  const y = writeLines(pen, invoice, writeHead(pen, invoice, title));
  writeTotals(pen, invoice, y);
  writeFeet(pen, invoice, title);
  return pen.finish();
}

const amount = (invoice: Invoice, amountMinor: number): string =>
  formatMoney({ amountMinor, currency: invoice.currency });

/** `1 December 2026`: a date on paper is read by people who don't count days of the year. */
function dateText(utc: string): string {
  const months = 'January February March April May June July August September October November December'.split(' ');
  const date = new Date(utc);
  return `${date.getUTCDate()} ${months[date.getUTCMonth()] ?? ''} ${date.getUTCFullYear()}`;
}

function writeMark(pen: PdfPen): void {
  const { doc } = pen;
  doc.save().translate(LEFT, TOP);
  doc.path('M8 16 C12 16 11 3.2 17 3.2 C23 3.2 22 16 26 16 Z').fill('#0E5A6B');
  doc.moveTo(0.5, 16.2).lineTo(33.5, 16.2).lineWidth(2.4).strokeColor('#14303A').stroke();
  doc.moveTo(7, 21.4).lineTo(18, 21.4).moveTo(21, 21.4).lineTo(26.5, 21.4);
  doc.lineCap('round').strokeColor('#B9862F').stroke().lineCap('butt').restore();
  pen.line('Skyberth', { x: LEFT + 42, y: TOP + 3 }, { sizePt: 15, weight: 600 });
}

/** Everything above the lines; answers where they begin. */
function writeHead(pen: PdfPen, invoice: Invoice, title: string): number {
  writeMark(pen);
  pen.line(title, { x: RIGHT, y: TOP + 3, toLeft: true }, { sizePt: 15, weight: 600 });
  pen.rule(LEFT, RIGHT, TOP + 40);
  const ends = [
    writeParty(pen, { label: 'From', party: invoice.supplier, x: LEFT }),
    writeParty(pen, { label: 'To', party: invoice.customer, x: 230 }),
    writeFacts(pen, invoice),
  ];
  let y = Math.max(...ends) + 26;
  for (const line of pen.wrapped(invoice.subject, RIGHT - LEFT, { sizePt: 11, weight: 600 })) {
    pen.line(line, { x: LEFT, y }, { sizePt: 11, weight: 600 });
    y += 16;
  }
  return writeColumnHeads(pen, invoice, y + 8);
}

function writeParty(pen: PdfPen, block: { label: string; party: Invoice['supplier']; x: number }): number {
  const { party, x } = block;
  const { line1, line2, postalCode, city, country } = party.address;
  let y = TOP + 56;
  pen.line(block.label, { x, y }, SMALL);
  y += 15;
  const lines = [
    line1,
    line2,
    `${postalCode} ${city}`.trim(),
    country,
    party.vatNumber ? `VAT ${party.vatNumber}` : '',
  ];
  for (const name of pen.wrapped(party.name, 160, STRONG)) {
    pen.line(name, { x, y }, STRONG);
    y += 14;
  }
  for (const text of lines.filter(Boolean)) {
    for (const line of pen.wrapped(text, 160, PLAIN)) {
      pen.line(line, { x, y }, PLAIN);
      y += 14;
    }
  }
  return y;
}

function writeFacts(pen: PdfPen, invoice: Invoice): number {
  const facts = [
    ['Issued', dateText(invoice.issuedUtc)],
    ['Date of supply', dateText(invoice.suppliedOnUtc)],
    ['Berth', String(invoice.bookingNumber)],
    ...(invoice.creditsNumber ? [['Credits invoice', invoice.creditsNumber]] : []),
  ] as const;
  let y = TOP + 56;
  for (const [label, value] of facts) {
    pen.line(label ?? '', { x: 392, y }, SMALL);
    pen.line(value ?? '', { x: RIGHT, y, toLeft: true }, PLAIN);
    y += 16;
  }
  return y;
}

function writeColumnHeads(pen: PdfPen, invoice: Invoice, y: number): number {
  pen.line('What', { x: LEFT, y }, SMALL);
  pen.line(`Amount before VAT, ${invoice.currency}`, { x: RIGHT, y, toLeft: true }, SMALL);
  pen.rule(LEFT, RIGHT, y + 16);
  return y + 24;
}

/** The lines, over as many pages as they need, with the sum carried over; answers where they end. */
function writeLines(pen: PdfPen, invoice: Invoice, from: number): number {
  let y = from;
  let carriedMinor = 0;
  for (const line of invoice.lines) {
    const texts = pen.wrapped(line.description, DESCRIPTION_WIDTH, PLAIN);
    const discount = line.discountMinor === 0 ? [] : [`after a reduction of ${amount(invoice, line.discountMinor)}`];
    const height = texts.length * 14 + discount.length * 13 + 6;
    if (y + height > LOWEST) {
      pen.rule(LEFT, RIGHT, y);
      pen.line('Carried over', { x: LEFT, y: y + 6 }, PLAIN);
      pen.line(amount(invoice, carriedMinor), { x: RIGHT, y: y + 6, toLeft: true }, PLAIN);
      pen.doc.addPage();
      y = writeColumnHeads(pen, invoice, TOP);
      pen.line('Brought over', { x: LEFT, y }, PLAIN);
      pen.line(amount(invoice, carriedMinor), { x: RIGHT, y, toLeft: true }, PLAIN);
      y += 22;
    }
    pen.line(amount(invoice, line.amountMinor), { x: RIGHT, y, toLeft: true }, PLAIN);
    texts.forEach((text, index) => {
      pen.line(text, { x: LEFT, y: y + index * 14 }, PLAIN);
    });
    for (const text of discount) pen.line(text, { x: LEFT, y: y + texts.length * 14 }, SMALL);
    y += height;
    carriedMinor += line.amountMinor;
  }
  return y;
}

function writeTotals(pen: PdfPen, invoice: Invoice, from: number): void {
  let y = from + 4;
  pen.rule(LEFT, RIGHT, y);
  y += 10;
  const rate = invoice.vatRatePercent === 0 ? 'VAT' : `VAT ${invoice.vatRatePercent}\u00a0%`;
  const label = invoice.kind === 'invoice' ? 'Total' : 'Total credited';
  for (const [text, value] of [
    ['Net', invoice.netMinor],
    [rate, invoice.vatMinor],
  ] as const) {
    pen.line(text, { x: 330, y }, PLAIN);
    pen.line(amount(invoice, value), { x: RIGHT, y, toLeft: true }, PLAIN);
    y += 17;
  }
  pen.rule(330, RIGHT, y);
  y += 8;
  pen.line(label, { x: 330, y }, { sizePt: 12, weight: 600 });
  pen.line(amount(invoice, invoice.grossMinor), { x: RIGHT, y, toLeft: true }, { sizePt: 12, weight: 600 });
  y += 34;
  for (const line of pen.wrapped(closingWords(invoice), RIGHT - LEFT, PLAIN)) {
    pen.line(line, { x: LEFT, y }, PLAIN);
    y += 14;
  }
}

function closingWords(invoice: Invoice): string {
  const payment =
    invoice.kind === 'invoice'
      ? 'The amount is taken from your card after the contact, or stands on your monthly bill. Nothing else is to be paid.'
      : 'The amount is not taken from your card, or is given back to it.';
  return `${invoice.vatNote}${/[.!]$/.test(invoice.vatNote) ? '' : '.'} ${payment}`;
}

/** The foot of every page, once it is known how many there are. */
function writeFeet(pen: PdfPen, invoice: Invoice, title: string): void {
  const { start, count } = pen.doc.bufferedPageRange();
  for (let page = 0; page < count; page += 1) {
    pen.doc.switchToPage(start + page);
    pen.rule(LEFT, RIGHT, FOOT - 8, 0.4);
    const vat = invoice.supplier.vatNumber ? `, VAT ${invoice.supplier.vatNumber}` : '';
    pen.line(`${invoice.supplier.name}${vat}`, { x: LEFT, y: FOOT }, SMALL);
    pen.line(`${title}, page ${page + 1} of ${count}`, { x: RIGHT, y: FOOT, toLeft: true }, SMALL);
  }
}
