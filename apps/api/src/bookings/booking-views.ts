/** Bookings as they cross the wire. */
import { Inject, Injectable } from '@nestjs/common';
import { type Booking, type BookingSummary, bookingMoves, can, type Principal } from '@skyberth/shared';
import { InvoiceService } from '../invoices/invoices.service.js';
import { PaymentRepository } from '../payments/payments.repository.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { BookingRepository, type BookingRow } from './bookings.repository.js';
import { type BookingNames, PartiesRepository } from './parties.repository.js';
import { cancelRefundMinor } from './refund-terms.js';
import { DISPUTE_WITHIN_MS } from './report-terms.js';

type Side = 'operator' | 'owner' | 'admin';

/** On which side of this booking the caller stands; null for staff who only look. */
export function sideOf(caller: Principal, booking: BookingRow): Side | null {
  if (caller.organisationId === booking.operatorId) return 'operator';
  if (caller.organisationId === booking.ownerId) return 'owner';
  return caller.organisationKind === 'staff' && caller.role === 'admin' ? 'admin' : null;
}

/** Whether the caller may cancel: those who do the work of their side, and the marketplace's admin. */
export function mayCancel(caller: Principal, side: Side | null): side is Side {
  if (side === 'operator') return can(caller, 'bookings.buy');
  if (side === 'owner') return can(caller, 'bookings.decide');
  return side === 'admin';
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();
const utcOrNull = (timeMs: number | null): string | null => (timeMs === null ? null : utc(timeMs));

export function summaryOf(booking: BookingRow, names: BookingNames): BookingSummary {
  return {
    id: booking.id,
    number: booking.number,
    state: booking.state,
    spacecraftName: names.spacecraftName,
    spacecraftShortName: names.spacecraftShortName,
    antennaId: booking.antennaId,
    antennaName: names.antennaName,
    stationId: names.stationId,
    stationName: names.stationName,
    stationTimeZone: names.stationTimeZone,
    operatorName: names.operatorName,
    ownerName: names.ownerName,
    need: booking.need,
    aosUtc: utc(booking.aosMs),
    tcaUtc: utc(booking.tcaMs),
    losUtc: utc(booking.losMs),
    maxElevationDeg: booking.pass.maxElevationDeg,
    currency: booking.currency,
    toPayMinor: booking.toPayMinor,
    holdEndsUtc: booking.state === 'held' ? utcOrNull(booking.holdEndsMs) : null,
    answerByUtc: utcOrNull(booking.answerByMs),
  };
}

@Injectable()
export class BookingViews {
  constructor(
    private readonly repository: BookingRepository,
    private readonly parties: PartiesRepository,
    private readonly payments: PaymentRepository,
    private readonly invoices: InvoiceService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  full(caller: Principal, booking: BookingRow): Booking {
    const side = sideOf(caller, booking);
    const invoice = side === 'owner' ? undefined : this.invoices.ofBooking(booking.id);
    return {
      ...summaryOf(booking, this.parties.names(booking.id)),
      quote: booking.quote,
      payment: this.payment(booking, side),
      invoiceId: invoice?.id ?? null,
      invoiceNumber: invoice?.number ?? null,
      report: booking.report,
      soldOn: this.repository.soldOn(booking.id),
      setupStartsUtc: utc(booking.guardFromMs),
      teardownEndsUtc: utc(booking.guardToMs),
      events: this.events(booking),
      actions: this.actions(caller, booking, side),
      refundNowMinor: side === null ? null : cancelRefundMinor(booking, side, this.clock.nowMs()),
    };
  }

  private payment(booking: BookingRow, side: Side | null): Booking['payment'] {
    const payment = this.payments.ofBooking(booking.id);
    // The card and the bank's words are the buyer's business alone.
    const own = side !== 'owner';
    return {
      state: payment?.state ?? 'none',
      amountMinor: booking.toPayMinor,
      capturedMinor: payment?.capturedMinor ?? 0,
      refundedMinor: payment?.refundedMinor ?? 0,
      currency: booking.currency,
      card: own ? (payment?.card ?? null) : null,
      failure: own ? (payment?.failure ?? null) : null,
    };
  }

  private events(booking: BookingRow): Booking['events'] {
    const rows = this.repository.events(booking.id);
    const people = rows.flatMap((row) => row.actorId ?? []);
    const organisations = rows.flatMap((row) => row.actorOrganisationId ?? []);
    const names = this.parties.actors([...new Set(people)], [...new Set(organisations)]);
    return rows.map((row) => {
      const person = row.actorId === null ? undefined : names.get(row.actorId);
      const organisation = row.actorOrganisationId === null ? undefined : names.get(row.actorOrganisationId);
      const by = person && organisation ? `${person}, ${organisation}` : (person ?? organisation ?? 'Skyberth');
      return { id: row.id, atUtc: utc(row.atMs), kind: row.kind, sentence: row.sentence, by };
    });
  }

  /** Moves that the table gives this side, as far as role and time allow them. */
  private actions(caller: Principal, booking: BookingRow, side: Side | null): Booking['actions'] {
    if (side === null) return [];
    const nowMs = this.clock.nowMs();
    const moves = new Set(bookingMoves(booking.state, side).map((move) => move.event));
    const actions: Booking['actions'] = [];
    const running = booking.state === 'held' && nowMs < (booking.holdEndsMs ?? 0);
    if (side === 'operator' && can(caller, 'bookings.buy') && running) actions.push('pay', 'let go');
    if (moves.has('owner accepts') && can(caller, 'bookings.decide') && nowMs < answerDueMs(booking))
      actions.push('accept', 'decline');
    if (moves.has('cancel') && mayCancel(caller, side) && nowMs < booking.aosMs) actions.push('cancel');
    if (
      side === 'operator' &&
      moves.has('dispute opened') &&
      can(caller, 'disputes.open') &&
      mayDispute(booking, nowMs)
    )
      actions.push('dispute');
    const reports = moves.has('reported good') || moves.has('contact broken off');
    if (reports && side === 'owner' && can(caller, 'bookings.report')) actions.push('report');
    return actions;
  }
}

/** Within 14 days, and where something is charged: a contact that failed without the spacecraft's fault costs nothing. */
function mayDispute({ state, report, losMs }: BookingRow, nowMs: number): boolean {
  if (nowMs > losMs + DISPUTE_WITHIN_MS) return false;
  return state !== 'failed' || report?.cause === 'spacecraft';
}

/** Until when the owner may answer: the agreed time, and never once the contact would have begun. */
export const answerDueMs = (booking: BookingRow): number =>
  Math.min(booking.answerByMs ?? booking.aosMs, booking.aosMs);
