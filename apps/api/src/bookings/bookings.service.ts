/** What people do with bookings. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import {
  type BodyOf,
  type Booking,
  BookingState,
  type Principal,
  type QueryOf,
  type ResponseOf,
  type routes,
} from '@skyberth/shared';
import { refundOf } from '../invoices/invoice-amounts.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { line } from '../platform/csv.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { type Db, write } from '../platform/transaction.js';
import { BOOKING_COLUMNS, bookingCells } from './booking-csv.js';
import { BookingEnding } from './booking-ending.service.js';
import { BookingGroupRepository } from './booking-groups.repository.js';
import { BookingListRepository, type BookingQuery } from './booking-list.repository.js';
import { BookingSale } from './booking-sale.service.js';
import { answerDueMs, BookingViews, mayCancel, sideOf, summaryOf } from './booking-views.js';
import { moneyText } from './booking-words.js';
import { BookingRepository, type BookingRow } from './bookings.repository.js';
import { HoldService } from './hold.service.js';
import { cancelPercent } from './refund-terms.js';

const EXPORT_CHUNK = 500;

@Injectable()
export class BookingsService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: BookingRepository,
    private readonly lists: BookingListRepository,
    private readonly views: BookingViews,
    private readonly holds: HoldService,
    private readonly sale: BookingSale,
    private readonly ending: BookingEnding,
    private readonly groups: BookingGroupRepository,
  ) {}

  list(caller: Principal, query: QueryOf<typeof routes.listBookings>): ResponseOf<typeof routes.listBookings> {
    const { page, pageSize } = query;
    const { rows, total } = this.lists.page(caller, { ...filterOf(query), page, pageSize });
    return { items: rows.map(({ booking, names }) => summaryOf(booking, names)), total, page, pageSize };
  }

  /** Lines of the whole list as a file, a page of rows at a time, however long it is. */
  csvOf(caller: Principal, query: QueryOf<typeof routes.exportBookings>): Generator<string> {
    // Judged before the first line is sent: afterwards a refusal could only break the file off.
    return this.csvLines(caller, filterOf(query));
  }

  private *csvLines(caller: Principal, filter: ReturnType<typeof filterOf>): Generator<string> {
    yield line(BOOKING_COLUMNS);
    for (let page = 1; ; page += 1) {
      const { rows } = this.lists.page(caller, { ...filter, page, pageSize: EXPORT_CHUNK });
      for (const { booking, names } of rows) yield line(bookingCells(summaryOf(booking, names)));
      if (rows.length < EXPORT_CHUNK) return;
    }
  }

  get(caller: Principal, bookingId: string): Booking {
    return this.views.full(caller, this.row(caller, bookingId));
  }

  /** The row itself, for the pages and files of its geometry. */
  row(caller: Principal, bookingId: string): BookingRow {
    return this.repository.forViewer(caller, bookingId);
  }

  async hold(caller: Principal, wish: BodyOf<typeof routes.holdBerth>): Promise<Booking> {
    return this.views.full(caller, await this.holds.hold(caller, wish));
  }

  letGo(caller: Principal, bookingId: string): Booking {
    return this.move(caller, bookingId, (tx, booking) => {
      if (booking.state === 'held' && this.groups.groupIdOf(bookingId, tx) !== null)
        throw new DomainError('wrong-state', 'It is held together with others: let the whole group go, or pay for it.');
      return this.sale.letGo(tx, booking, { actor: 'operator', person: caller });
    });
  }

  accept(caller: Principal, bookingId: string): Booking {
    return this.move(caller, bookingId, (tx, booking) => {
      this.requireInTime(booking);
      return this.sale.accept(tx, booking, { actor: 'owner', person: caller });
    });
  }

  decline(caller: Principal, bookingId: string, reason: string): Booking {
    return this.move(caller, bookingId, (tx, booking) => {
      this.requireInTime(booking);
      return this.sale.decline(tx, booking, { mover: { actor: 'owner', person: caller }, reason });
    });
  }

  report(caller: Principal, bookingId: string, report: BodyOf<typeof routes.reportContact>): Booking {
    return this.move(caller, bookingId, (tx, booking) => {
      if (booking.state === 'under way' && report.outcome !== 'failed') {
        throw new DomainError(
          'wrong-state',
          'The contact is still under way. Report it after LOS, or report that it was broken off.',
        );
      }
      return this.ending.report(tx, booking, { report, mover: { actor: 'owner', person: caller } });
    });
  }

  /** Throws `price-changed` where the time passed a step of the refund since the page was shown. */
  cancel(caller: Principal, bookingId: string, body: BodyOf<typeof routes.cancelBooking>): Booking {
    return this.move(caller, bookingId, (tx, booking) => {
      const side = sideOf(caller, booking);
      if (!mayCancel(caller, side))
        throw new DomainError('not-allowed', 'In your role you cannot cancel this contact.');
      const refundPercent = cancelPercent(booking, side, this.clock.nowMs());
      if (refundPercent === null) {
        throw new DomainError(
          'wrong-state',
          `Berth ${booking.number} is ${booking.state} and can no longer be cancelled.`,
        );
      }
      const refundMinor = refundOf(booking.quote, refundPercent).grossMinor;
      if (refundMinor !== body.expectedRefundMinor) {
        throw new DomainError(
          'price-changed',
          `A cancellation now gives ${moneyText(refundMinor, booking.currency)} back. Look at it and cancel again if you agree.`,
        );
      }
      return this.ending.cancel(tx, booking, {
        mover: { actor: side, person: caller },
        refundPercent,
        reason: body.reason,
      });
    });
  }

  private move(caller: Principal, bookingId: string, act: (tx: Db, booking: BookingRow) => BookingRow): Booking {
    const moved = write(this.db, (tx) => act(tx, this.repository.forViewer(caller, bookingId, tx)));
    return this.views.full(caller, moved);
  }

  private requireInTime(booking: BookingRow): void {
    if (booking.state === 'awaiting owner' && this.clock.nowMs() >= answerDueMs(booking)) {
      throw new DomainError('wrong-state', 'The time to answer has passed; the request lapses.');
    }
  }
}

/** States separated by commas; an unknown one is refused, because a list without it would look complete. */
function statesOf(text: string | undefined): BookingState[] {
  if (!text) return [];
  return text.split(',').map((each) => {
    const state = BookingState.safeParse(each.trim());
    if (!state.success)
      throw new DomainError('bad-input', `“${each}” is not a state of a booking.`, [
        { pointer: '/query/state', detail: 'unknown state' },
      ]);
    return state.data;
  });
}

/** The part of a list's question that is about bookings, and not about pages. */
function filterOf(query: QueryOf<typeof routes.exportBookings>): Omit<BookingQuery, 'page' | 'pageSize'> {
  return {
    fromMs: query.fromUtc === undefined ? null : Date.parse(query.fromUtc),
    toMs: query.toUtc === undefined ? null : Date.parse(query.toUtc),
    states: statesOf(query.state),
    spacecraftId: query.spacecraftId ?? null,
    antennaId: query.antennaId ?? null,
    number: query.number ?? null,
    sort: query.sort,
  };
}
