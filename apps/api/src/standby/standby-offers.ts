/**
 * Offers what frees to the first in line: a hold at the price of that moment, for a limited time. Nothing has to be told that
 * a pass was released. Each turn asks who waits for time that nobody has, so that neither a crash nor a release by a path
 * that is added later can be missed.
 */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { BookingNotices, contactName } from '../bookings/booking-notices.js';
import { moneyText, utcText } from '../bookings/booking-words.js';
import { BookingRepository } from '../bookings/bookings.repository.js';
import { HoldService, MOST_HOLDS } from '../bookings/hold.service.js';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { write } from '../platform/transaction.js';
import { StandbyRepository, type StandbyRow } from './standby.repository.js';
import { MOST_PLACES } from './standby.service.js';

const EVERY_MS = 2_000;
/** So long an offer stands before the next in line gets it. */
export const OFFER_MS = 30 * 60_000;
/** Refusals that may be over at the next turn. */
const PASSING = ['berth-taken', 'unavailable'];

@Injectable()
export class StandbyOffers implements OnModuleInit {
  private readonly log = new Logger('Standby');

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: StandbyRepository,
    private readonly bookings: BookingRepository,
    private readonly holds: HoldService,
    private readonly notices: BookingNotices,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('standby', EVERY_MS, () => this.turn());
  }

  /** Closes what was offered and is decided, then offers what is free, in the order of joining. */
  async turn(): Promise<void> {
    for (const entry of this.repository.inState('offered')) this.follow(entry);
    for (const entry of this.repository.inState('waiting')) {
      if (entry.aosMs <= this.clock.nowMs()) this.end(entry, 'The pass went by without becoming free.');
      else if (this.isFree(entry)) await this.tryToOffer(entry);
    }
  }

  private isFree({ antennaId, guardFromMs, guardToMs }: StandbyRow): boolean {
    const beams = this.repository.beams(antennaId);
    return this.bookings.freeBeams(this.db, { antennaId, beams, guardFromMs, guardToMs }).length > 0;
  }

  private follow(entry: StandbyRow): void {
    write(this.db, (tx) => {
      const now = this.repository.byId(tx, entry.id);
      const booking = entry.bookingId === null ? undefined : this.repository.stateOfBooking(tx, entry.bookingId);
      if (now?.state !== 'offered' || booking === undefined || booking === 'held') return;
      const isGone = booking === 'lapsed' || booking === 'cancelled';
      const note = isGone ? 'The offer was not taken up.' : '';
      this.repository.change(tx, entry.id, {
        state: isGone ? 'passed' : 'bought',
        note,
        changedMs: this.clock.nowMs(),
      });
    });
  }

  private end(entry: StandbyRow, note: string): void {
    write(this.db, (tx) => {
      if (this.repository.byId(tx, entry.id)?.state !== 'waiting') return;
      this.repository.change(tx, entry.id, { state: 'ended', note, changedMs: this.clock.nowMs() });
    });
  }

  private async tryToOffer(entry: StandbyRow): Promise<void> {
    try {
      await this.offer(entry);
    } catch (error) {
      if (!(error instanceof DomainError)) {
        this.log.error(`entry ${entry.id}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`);
      } else if (!PASSING.includes(error.code)) {
        this.end(entry, `It became free and could not be offered: ${error.message}`);
      }
    }
  }

  private async offer(entry: StandbyRow): Promise<void> {
    const prepared = await this.holds.prepareAtPrice(entry.operatorId, {
      antennaId: entry.antennaId,
      spacecraftId: entry.spacecraftId,
      need: entry.need,
      bands: entry.bands,
      aosUtc: new Date(entry.aosMs).toISOString(),
      losUtc: new Date(entry.losMs).toISOString(),
    });
    write(this.db, (tx) => {
      if (this.repository.byId(tx, entry.id)?.state !== 'waiting') return;
      if (!this.repository.mayStillBuy(tx, entry))
        throw new DomainError('not-allowed', 'Who joined the line may no longer buy for the organisation.');
      const buyer = { personId: entry.personId, organisationId: entry.operatorId };
      const terms = { holdMs: OFFER_MS, isFromLine: true, most: MOST_HOLDS + MOST_PLACES };
      const booking = this.holds.insert(tx, buyer, prepared, terms);
      const changedMs = this.clock.nowMs();
      this.repository.change(tx, entry.id, { state: 'offered', bookingId: booking.id, changedMs });
      const until = utcText(booking.holdEndsMs ?? changedMs);
      this.notices.toBuyer(tx, booking, {
        kind: 'standby offer',
        subject: `Free now: ${contactName(this.notices.names(tx, booking))}`,
        sentences: [
          `The pass you wait for is free. It is held for you until ${until} at ${moneyText(booking.toPayMinor, booking.currency)}.`,
          'Pay for it in time, or let it go, and the next in line gets it.',
        ],
      });
    });
  }
}
