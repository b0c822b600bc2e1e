/** Disputes as they cross the wire. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { can, type Dispute, type DisputeSide, type DisputeSummary, type Principal } from '@skyberth/shared';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { PartiesRepository } from '../bookings/parties.repository.js';
import { FilesService } from '../files/files.service.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DisputeMoney } from './dispute-money.js';
import { DisputeRepository, type DisputeRow } from './disputes.repository.js';

/** What files of statements are attached to. */
export const STATEMENT_FILES = 'dispute statement';

const utc = (timeMs: number): string => new Date(timeMs).toISOString();
const utcOrNull = (timeMs: number | null): string | null => (timeMs === null ? null : utc(timeMs));

/** On which side of a dispute the caller stands. */
export function disputeSideOf(caller: Principal, dispute: DisputeRow): DisputeSide | null {
  if (caller.organisationId === dispute.operatorId) return 'operator';
  if (caller.organisationId === dispute.ownerId) return 'owner';
  return can(caller, 'disputes.decide') ? 'admin' : null;
}

@Injectable()
export class DisputeViews {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: DisputeRepository,
    private readonly bookings: BookingRepository,
    private readonly parties: PartiesRepository,
    private readonly ledger: LedgerService,
    private readonly money: DisputeMoney,
    private readonly files: FilesService,
  ) {}

  summary(row: DisputeRow): DisputeSummary {
    return this.summaryOf(row, this.bookingOf(row));
  }

  full(caller: Principal, row: DisputeRow): Dispute {
    const booking = this.bookingOf(row);
    const { evidence } = this.repository.evidence(row.id);
    const statements = this.repository.statements(row.id);
    const files = this.files.of(
      STATEMENT_FILES,
      statements.map(({ row: said }) => said.id),
    );
    const gapS = gapSeconds(evidence.gap);
    const lengthS = (booking.losMs - booking.aosMs) / 1000;
    return {
      ...this.summaryOf(row, booking),
      gapS,
      statements: statements.map(({ row: said, name }) => ({
        id: said.id,
        side: said.side,
        byName: name,
        atUtc: utc(said.atMs),
        text: said.text,
        observations: said.observations,
        files: files.get(said.id) ?? [],
      })),
      evidence,
      // The journal is the marketplace's own; each side has its invoices and statements.
      money:
        disputeSideOf(caller, row) === 'admin'
          ? this.ledger.storyOf(booking.id).map(({ atMs, ...line }) => ({ atUtc: utc(atMs), ...line }))
          : [],
      heldMinor: this.money.heldMinor(this.db, row.id),
      decisions: this.repository.decisions(row.id).map(({ row: made, name }) => ({
        round: made.round,
        outcome: made.outcome,
        refundBasisPoints: made.refundBasisPoints,
        borneBy: made.borneBy,
        text: made.text,
        byName: name,
        atUtc: utc(made.decidedMs),
        effect: made.effect,
      })),
      appealByUtc: utcOrNull(row.appealByMs),
      appealedBy: row.appealedBy,
      suggestedBasisPoints: gapS === null ? null : Math.min(10_000, Math.round((gapS / lengthS) * 10_000)),
      actions: this.actions(caller, row),
    };
  }

  private actions(caller: Principal, row: DisputeRow): Dispute['actions'] {
    const side = disputeSideOf(caller, row);
    const waits = row.state === 'open' || row.state === 'appealed';
    if (side === 'admin') {
      if (!waits) return [];
      // The person of the first decision does not decide its appeal.
      const decided = this.repository.decisions(row.id).some(({ row: made }) => made.decidedBy === caller.personId);
      return decided ? ['assemble', 'ask'] : ['decide', 'assemble', 'ask'];
    }
    if (side === null || !can(caller, 'disputes.answer')) return [];
    if (waits) return ['state'];
    const mayAppeal = row.state === 'decided' && this.clock.nowMs() < (row.appealByMs ?? 0);
    return mayAppeal ? ['appeal'] : [];
  }

  private summaryOf(row: DisputeRow, booking: BookingRow): DisputeSummary {
    const names = this.parties.names(booking.id);
    const gapMs = row.gapFromMs !== null && row.gapToMs !== null ? row.gapToMs - row.gapFromMs : null;
    return {
      id: row.id,
      number: row.number,
      state: row.state,
      reason: row.reason,
      bookingId: booking.id,
      bookingNumber: booking.number,
      spacecraftName: names.spacecraftName,
      antennaName: names.antennaName,
      operatorName: names.operatorName,
      ownerName: names.ownerName,
      aosUtc: utc(booking.aosMs),
      losUtc: utc(booking.losMs),
      openedUtc: utc(row.openedMs),
      statementDueUtc: utc(row.statementDueMs),
      decideByUtc: utc(row.decideByMs),
      gapS: gapMs === null ? null : gapMs / 1000,
      currency: booking.currency,
      priceMinor: booking.toPayMinor,
    };
  }

  private bookingOf(row: DisputeRow): BookingRow {
    const booking = this.bookings.byId(this.db, row.bookingId);
    if (!booking) throw new Error(`The dispute ${row.id} has no booking.`);
    return booking;
  }
}

const gapSeconds = (gap: { fromUtc: string; toUtc: string } | null): number | null =>
  gap === null ? null : (Date.parse(gap.toUtc) - Date.parse(gap.fromUtc)) / 1000;
