/** What people do in the lines: join, look, leave. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { BodyOf, Principal, Reason, ResponseOf, routes, StandbyEntry } from '@skyberth/shared';
import { BookingSale } from '../bookings/booking-sale.service.js';
import { BookingRepository } from '../bookings/bookings.repository.js';
import { OfferService } from '../market/offer.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { write } from '../platform/transaction.js';
import { type NamedEntry, StandbyRepository } from './standby.repository.js';

/** More would make the line a way to keep others out. */
export const MOST_PLACES = 50;
/** Ended places stay in the list so long after their pass. */
const SHOWN_AFTER_MS = 7 * 86_400_000;

@Injectable()
export class StandbyService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: StandbyRepository,
    private readonly bookings: BookingRepository,
    private readonly offers: OfferService,
    private readonly sale: BookingSale,
  ) {}

  list(caller: Principal): ResponseOf<typeof routes.listStandby> {
    const entries = this.repository.list(caller.organisationId, this.clock.nowMs() - SHOWN_AFTER_MS);
    return { items: entries.map((entry) => this.view(entry)) };
  }

  /** Throws `wrong-state` where the pass is for sale, `not-for-sale` where more than another's contact stands against it. */
  async join(caller: Principal, berth: BodyOf<typeof routes.joinStandby>): Promise<StandbyEntry> {
    const operatorId = caller.organisationId;
    const offer = await this.offers.evaluate(operatorId, berth);
    requireTaken(offer.reasons);
    const { antennaId, spacecraftId, aosMs, losMs, guardFromMs, guardToMs } = offer;
    const nowMs = this.clock.nowMs();
    const id = newId();
    write(this.db, (tx) => {
      if (this.repository.isInLine(tx, { operatorId, antennaId, spacecraftId, aosMs }))
        throw new DomainError('already-exists', 'Your organisation is in line for this pass already.');
      if (this.repository.countOpen(tx, operatorId) >= MOST_PLACES)
        throw new DomainError(
          'too-many',
          `Your organisation waits for ${MOST_PLACES} passes already. Leave a line first.`,
        );
      this.repository.insert(tx, {
        id,
        operatorId,
        personId: caller.personId,
        antennaId,
        spacecraftId,
        need: berth.need,
        bands: berth.bands,
        aosMs,
        losMs,
        guardFromMs,
        guardToMs,
        state: 'waiting',
        bookingId: null,
        note: '',
        joinedMs: nowMs,
        changedMs: nowMs,
      });
    });
    return this.view(this.repository.one(id));
  }

  /** An offer that is open is let go with it, so that the next in line hears of it. */
  leave(caller: Principal, id: string): StandbyEntry {
    write(this.db, (tx) => {
      const entry = this.repository.ofOperator(caller.organisationId, id, tx);
      if (entry.state !== 'waiting' && entry.state !== 'offered')
        throw new DomainError('wrong-state', 'This place in the line has ended already.');
      const booking = entry.bookingId === null ? undefined : this.bookings.byId(tx, entry.bookingId);
      if (booking && booking.state !== 'held' && entry.state === 'offered')
        throw new DomainError('wrong-state', `Berth ${booking.number} is ${booking.state}; the line ended with it.`);
      if (booking) this.sale.letGo(tx, booking, { actor: 'operator', person: caller });
      this.repository.change(tx, id, { state: 'left', changedMs: this.clock.nowMs() });
    });
    return this.view(this.repository.one(id));
  }

  private view({ entry, holdEndsMs, ...names }: NamedEntry): StandbyEntry {
    const utc = (timeMs: number) => new Date(timeMs).toISOString();
    return {
      id: entry.id,
      state: entry.state,
      spacecraftId: entry.spacecraftId,
      antennaId: entry.antennaId,
      ...names,
      need: entry.need,
      aosUtc: utc(entry.aosMs),
      losUtc: utc(entry.losMs),
      joinedUtc: utc(entry.joinedMs),
      place: entry.state === 'waiting' ? this.repository.placeOf(entry) : null,
      bookingId: entry.bookingId,
      offerEndsUtc: entry.state === 'offered' && holdEndsMs !== null ? utc(holdEndsMs) : null,
      note: entry.note,
    };
  }
}

/** Another's contact, or the way of the dish to or from it, is all that may stand against the pass. */
function requireTaken(reasons: readonly Reason[]): void {
  if (reasons.length === 0)
    throw new DomainError('wrong-state', 'Nobody has this pass: it is for sale. Hold it instead of waiting.');
  const other = reasons.find(({ code }) => code !== 'taken' && code !== 'turn');
  if (other) throw new DomainError('not-for-sale', `${other.sentence} Waiting would not change that.`);
}
