/**
 * Holds booked contacts against newer elements. A shift inside the set-up guard is made, a larger one is asked about, and a
 * pass that is gone is given back. Each contact is looked at once for each delivery of elements, so several servers, or one that
 * was down, come to the same end.
 */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { BookingEnding } from '../bookings/booking-ending.service.js';
import { BookingNotices, contactName } from '../bookings/booking-notices.js';
import { BookingTransitions, BY_CLOCK } from '../bookings/booking-transitions.js';
import { utcText } from '../bookings/booking-words.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { newId } from '../platform/ids.js';
import { type Db, refusalOf, write } from '../platform/transaction.js';
import { ElementsService, type KeptElements } from '../spacecraft/elements.service.js';
import { DriftRepository, WATCHED } from './drift.repository.js';
import { type Carried, DriftGeometry } from './drift-geometry.js';
import { type Retiming, RetimingService } from './retiming.js';
import { shiftWords } from './shift-words.js';

const EVERY_MS = 20_000;
/** In one turn; the rest waits for the next, soonest contacts first. */
const MOST_IN_A_TURN = 500;
/** Less is under what elements can know and changes no second that anybody reads. */
const LEAST_SHIFT_MS = 1_000;

interface Drifted {
  readonly booking: BookingRow;
  readonly newer: KeptElements;
  readonly to: Carried | null;
  readonly checkedMs: number;
}

@Injectable()
export class DriftWatch implements OnModuleInit {
  private readonly log = new Logger('Drift');

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: DriftRepository,
    private readonly geometry: DriftGeometry,
    private readonly elements: ElementsService,
    private readonly bookings: BookingRepository,
    private readonly transitions: BookingTransitions,
    private readonly retiming: RetimingService,
    private readonly ending: BookingEnding,
    private readonly notices: BookingNotices,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('drift watch', EVERY_MS, () => this.turn());
  }

  async turn(): Promise<void> {
    const nowMs = this.clock.nowMs();
    if (this.repository.anyOvertaken()) write(this.db, (tx) => this.repository.overtaken(tx, nowMs));
    for (const booking of this.repository.due(nowMs, MOST_IN_A_TURN)) {
      try {
        await this.look(booking, nowMs);
      } catch (error) {
        // One set that cannot be used holds up no other contact; the next turn tries again.
        this.log.error(`berth ${booking.number}: ${error instanceof Error ? error.message : String(error)}`);
      }
    }
  }

  private async look(booking: BookingRow, checkedMs: number): Promise<void> {
    const sold = this.elements.byId(booking.elementSetId);
    const newer = this.elements.inForce(booking.spacecraftId, booking.tcaMs);
    if (!sold || !newer) return;
    const known = this.repository.check(booking.id);
    if (known?.elementSetId === newer.id) {
      // What came says nothing newer about this pass.
      write(this.db, (tx) => this.repository.saveCheck(tx, { ...known, checkedMs }));
      return;
    }
    const isSame = newer.id === sold.id;
    const to = isSame ? unmoved(booking) : await this.geometry.carry(booking, sold, newer);
    write(this.db, (tx) => {
      const current = this.bookings.byId(tx, booking.id);
      // Somebody moved or ended it while its pass was computed; the next turn looks at what it is then.
      if (!current || !WATCHED.includes(current.state) || current.aosMs !== booking.aosMs) return;
      if (current.elementSetId !== booking.elementSetId || current.losMs !== booking.losMs) return;
      this.settle(tx, { booking: current, newer, to, checkedMs });
    });
  }

  private settle(tx: Db, drifted: Drifted): void {
    const { booking, newer, to, checkedMs } = drifted;
    const shift = to && { aosMs: to.aosMs - booking.aosMs, losMs: to.losMs - booking.losMs };
    this.repository.saveCheck(tx, {
      bookingId: booking.id,
      checkedMs,
      elementSetId: newer.id,
      aosShiftMs: shift?.aosMs ?? null,
      losShiftMs: shift?.losMs ?? null,
    });
    const open = this.repository.openQuestion(tx, booking.id);
    if (open && open.toAosMs === to?.aosMs && open.toLosMs === to.losMs) return;
    if (open) this.repository.answer(tx, open.id, { state: 'overtaken', answeredMs: checkedMs, answeredBy: null });
    if (to === null || shift === null) {
      this.lose(tx, booking, newer);
      return;
    }
    const furthestMs = Math.max(Math.abs(shift.aosMs), Math.abs(shift.losMs));
    if (furthestMs < LEAST_SHIFT_MS) return;
    const why = this.whyNot(tx, { ...drifted, to }, furthestMs);
    if (why === null) return;
    const words = `By elements of ${utcText(newer.epochMs)} the pass moves: ${shiftWords(shift)}`;
    this.ask(tx, { ...drifted, to }, `${words}, ${why}`);
  }

  /** Makes the shift and answers null, or says why somebody has to be asked first. */
  private whyNot(
    tx: Db,
    { booking, newer, to, checkedMs }: Drifted & { to: Carried },
    furthestMs: number,
  ): string | null {
    if (furthestMs > guardMs(booking)) return 'more than the set-up time of the antenna covers.';
    if (to.aosMs <= checkedMs) return 'and its AOS would be past.';
    const taken = this.retimed(tx, booking, { to, elementSetId: newer.id, acceptedBy: null });
    return taken ? null : 'and there it would touch another contact.';
  }

  /** Whether the database took the new times: its own guard alone decides that they touch nobody, and undoes them if so. */
  private retimed(tx: Db, booking: BookingRow, retiming: Retiming): boolean {
    try {
      tx.transaction((inner) => void this.retiming.apply(inner, booking, retiming));
      return true;
    } catch (error) {
      const refusal = refusalOf(error);
      if (refusal?.includes('berth-taken') || refusal?.includes('spacecraft-busy')) return false;
      throw error;
    }
  }

  private ask(tx: Db, { booking, newer, to, checkedMs }: Drifted & { to: Carried }, sentence: string): void {
    this.repository.ask(tx, {
      id: newId(),
      bookingId: booking.id,
      elementSetId: newer.id,
      state: 'open',
      toAosMs: to.aosMs,
      toTcaMs: to.tcaMs,
      toLosMs: to.losMs,
      toPass: to.pass,
      sentence,
      askedMs: checkedMs,
    });
    this.transitions.note(tx, booking, { kind: 'drift asked', sentence, mover: BY_CLOCK });
    const name = contactName(this.notices.names(tx, booking));
    const kind = `drift asked ${newer.id}`;
    const times = `New times would be ${utcText(to.aosMs)} to ${utcText(to.losMs)}.`;
    this.notices.toBuyer(tx, booking, {
      kind,
      subject: `Please decide: ${name} has moved`,
      sentences: [sentence, times, 'Accept them at the agreed price, or cancel and get all of the price back.'],
    });
    this.notices.toStation(tx, booking, {
      kind,
      subject: `May move: ${name}`,
      sentences: [sentence, times, 'The operator is asked; until they answer the old times stand.'],
    });
  }

  private lose(tx: Db, booking: BookingRow, newer: KeptElements): void {
    const sentence = `By elements of ${utcText(newer.epochMs)} the spacecraft does not rise over this antenna’s horizon then; the contact is cancelled and all of the price goes back.`;
    const advice = 'Other passes of the day are on the board: Find time, with this spacecraft.';
    this.ending.passLost(tx, booking, { sentence, advice });
  }
}

export const guardMs = (booking: Pick<BookingRow, 'aosMs' | 'guardFromMs'>): number =>
  booking.aosMs - booking.guardFromMs;

const unmoved = ({ aosMs, tcaMs, losMs, pass }: BookingRow): Carried => ({ aosMs, tcaMs, losMs, pass });
