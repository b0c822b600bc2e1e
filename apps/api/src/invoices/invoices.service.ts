/** Invoices and credit notes: issued with the change that causes them, frozen, the same for ever. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import { type InvoiceAmounts, missingInvoiceFields, type VatTreatment, vatTreatment } from '@skyberth/money';
import type { Invoice, InvoiceSummary, Principal, Quote } from '@skyberth/shared';
import { MailAttachments } from '../mail/mail-attachments.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { newId } from '../platform/ids.js';
import type { Db } from '../platform/transaction.js';
import { amountsOf, creditOf, creditStepOf, frozenTreatment } from './invoice-amounts.js';
import { InvoicePress } from './invoice-press.js';
import { InvoiceRepository, type InvoiceRow } from './invoices.repository.js';

/** What an invoice is about: a booking with its frozen price. */
export interface Billed {
  readonly id: string;
  readonly operatorId: string;
  readonly ownerId: string;
  readonly quote: Quote;
  readonly aosMs: number;
  readonly losMs: number;
}

const SERIES = { invoice: 'SKB', 'credit note': 'SKC' } as const;

@Injectable()
export class InvoiceService implements OnModuleInit {
  constructor(
    private readonly repository: InvoiceRepository,
    private readonly attachments: MailAttachments,
    private readonly press: InvoicePress,
    private readonly audit: AuditService,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  onModuleInit(): void {
    this.attachments.register('invoice', (id) => this.press.print(this.repository.byId(id).document));
  }

  /** The invoice of a booking; the one that there is, where it was issued before. */
  issue(tx: Db, booking: Billed, subject: string): InvoiceRow {
    const earlier = this.repository.ofBooking(booking.id, 'invoice', tx);
    if (earlier) return earlier;
    const treatment = this.treatmentOf(tx, booking);
    const amounts = amountsOf(booking.quote, treatment);
    return this.write(tx, booking, { kind: 'invoice', amounts, treatment, subject, credits: null });
  }

  /**
   * Credits part or all of a booking's invoice. Answers null where there is no invoice, nothing to credit, or a credit note
   * already.
   */
  credit(tx: Db, booking: Billed, credit: { refundPercent: number; subject: string }): InvoiceRow | null {
    const invoice = this.repository.ofBooking(booking.id, 'invoice', tx);
    if (!invoice || this.repository.ofBooking(booking.id, 'credit note', tx)) return null;
    const treatment = this.treatmentOf(tx, booking);
    const amounts = creditOf(amountsOf(booking.quote, treatment), credit.refundPercent);
    if (!amounts) return null;
    const { subject } = credit;
    return this.write(tx, booking, { kind: 'credit note', amounts, treatment, subject, credits: invoice });
  }

  /** Credits a booking's invoice from one share of it to a larger one, as disputes and their appeals do. */
  creditStep(
    tx: Db,
    booking: Billed,
    step: { fromBasisPoints: number; toBasisPoints: number; subject: string },
  ): InvoiceRow | null {
    const invoice = this.repository.ofBooking(booking.id, 'invoice', tx);
    if (!invoice) return null;
    const treatment = this.treatmentOf(tx, booking);
    const amounts = creditStepOf(amountsOf(booking.quote, treatment), step.fromBasisPoints, step.toBasisPoints);
    if (!amounts) return null;
    return this.write(tx, booking, {
      kind: 'credit note',
      amounts,
      treatment,
      subject: step.subject,
      credits: invoice,
    });
  }

  /** What crediting a share of a booking's price comes to, net and VAT, both positive. */
  creditAmounts(booking: Billed, basisPoints: number): { netMinor: number; vatMinor: number } {
    const credit = creditStepOf(amountsOf(booking.quote), 0, basisPoints);
    return { netMinor: credit ? -credit.netMinor : 0, vatMinor: credit?.vatMinor ? -credit.vatMinor : 0 };
  }

  /** For those who caused it; who may read it is not asked. */
  byId(invoiceId: string): InvoiceRow {
    return this.repository.byId(invoiceId);
  }

  ofBooking(bookingId: string): InvoiceRow | undefined {
    return this.repository.ofBooking(bookingId, 'invoice');
  }

  /** What a booking's invoice comes to after all its credit notes, VAT included; null where it has none. */
  leftMinor(tx: Db, bookingId: string): number | null {
    return this.repository.ofBooking(bookingId, 'invoice', tx) ? this.repository.sumOf(tx, bookingId) : null;
  }

  creditOfBooking(tx: Db, bookingId: string): InvoiceRow | undefined {
    return this.repository.ofBooking(bookingId, 'credit note', tx);
  }

  list(reader: Principal, query: { page: number; pageSize: number }) {
    const { rows, total } = this.repository.page(reader, query);
    return { items: rows.map(summaryOf), total, page: query.page, pageSize: query.pageSize };
  }

  one(reader: Principal, invoiceId: string): Invoice {
    return this.repository.forReader(reader, invoiceId).document;
  }

  async pdf(reader: Principal, invoiceId: string): Promise<{ body: Buffer; fileName: string }> {
    const { document } = this.repository.forReader(reader, invoiceId);
    return { body: await this.press.print(document), fileName: `${document.number}.pdf` };
  }

  /** The rate is the one that the buyer saw; words come from the law's rules as long as they lead to the same rate. */
  private treatmentOf(tx: Db, booking: Billed): VatTreatment {
    const customer = this.repository.customer(tx, booking.operatorId);
    const { country } = this.config.marketplace.address;
    const decided = vatTreatment({
      supplier: { country, vatNumber: this.config.marketplace.vatNumber },
      customer: { country: customer.address.country, vatNumber: customer.vatNumber },
      dateMs: this.clock.nowMs(),
    });
    const frozen = frozenTreatment(booking.quote);
    return decided.rateBasisPoints === frozen.rateBasisPoints ? decided : frozen;
  }

  private write(
    tx: Db,
    booking: Billed,
    what: {
      kind: InvoiceRow['kind'];
      amounts: InvoiceAmounts;
      treatment: VatTreatment;
      subject: string;
      credits: InvoiceRow | null;
    },
  ): InvoiceRow {
    const issuedMs = this.clock.nowMs();
    const series = `${SERIES[what.kind]}-${new Date(issuedMs).getUTCFullYear()}`;
    const seq = this.repository.nextSeq(tx, series);
    const number = `${series}-${String(seq).padStart(6, '0')}`;
    const document = this.documentOf(tx, booking, { ...what, number, issuedMs });
    const row: InvoiceRow = {
      id: document.id,
      series,
      seq,
      number,
      kind: what.kind,
      bookingId: booking.id,
      operatorId: booking.operatorId,
      ownerId: booking.ownerId,
      issuedMs,
      currency: document.currency,
      netMinor: document.netMinor,
      vatMinor: document.vatMinor,
      grossMinor: document.grossMinor,
      document,
    };
    this.repository.insert(tx, row);
    const missing = missingInvoiceFields({
      kind: what.kind,
      number,
      issuedMs,
      suppliedMs: booking.aosMs,
      supplier: partyFor(document.supplier),
      customer: partyFor(document.customer),
      amounts: what.amounts,
      texts: [document.vatNote],
      changesNumber: document.creditsNumber,
    });
    this.audit.record(tx, {
      caller: null,
      action: `invoice.issue`,
      subject: `invoice:${row.id}`,
      data: { number, bookingId: booking.id, missing: missing.map((field) => field.sentence) },
    });
    return row;
  }

  private documentOf(
    tx: Db,
    booking: Billed,
    what: {
      kind: InvoiceRow['kind'];
      amounts: InvoiceAmounts;
      treatment: VatTreatment;
      subject: string;
      credits: InvoiceRow | null;
      number: string;
      issuedMs: number;
    },
  ): Invoice {
    const { amounts, treatment } = what;
    const customer = this.repository.customer(tx, booking.operatorId);
    const { name, address, vatNumber } = this.config.marketplace;
    return {
      id: newId(),
      number: what.number,
      kind: what.kind,
      issuedUtc: new Date(what.issuedMs).toISOString(),
      customerName: customer.name,
      bookingNumber: this.repository.bookingNumber(tx, booking.id),
      bookingId: booking.id,
      currency: amounts.currency,
      netMinor: amounts.netMinor,
      vatMinor: amounts.vatMinor,
      grossMinor: amounts.grossMinor,
      supplier: { name, address, vatNumber },
      customer: { name: customer.name, address: customer.address, vatNumber: customer.vatNumber },
      suppliedOnUtc: new Date(booking.losMs).toISOString(),
      subject: what.subject,
      lines: amounts.lines.map((line) => ({
        description: line.description,
        quantity: line.quantity,
        unitMinor: line.unitNetMinor,
        discountMinor: line.discountMinor,
        amountMinor: line.netMinor,
      })),
      vatRatePercent: treatment.rateBasisPoints / 100,
      vatNote: treatment.invoiceText ?? booking.quote.vat.note,
      creditsNumber: what.credits?.number ?? null,
    };
  }
}

const partyFor = (party: Invoice['supplier']) => ({
  name: party.name,
  addressLines: [party.address.line1, party.address.line2, `${party.address.postalCode} ${party.address.city}`],
  country: party.address.country,
  vatNumber: party.vatNumber,
});

const summaryOf = ({ document }: InvoiceRow): InvoiceSummary => {
  const { id, number, kind, issuedUtc, customerName, bookingNumber, bookingId } = document;
  const { currency, netMinor, vatMinor, grossMinor } = document;
  return {
    id,
    number,
    kind,
    issuedUtc,
    customerName,
    bookingNumber,
    bookingId,
    currency,
    netMinor,
    vatMinor,
    grossMinor,
  };
};
