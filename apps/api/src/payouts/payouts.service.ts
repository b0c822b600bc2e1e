/**
 * Payout runs: gathered from the ledger, reviewed line by line, approved by a second person. What a line settles are the
 * postings of the owner's account themselves, each in one live line at most, so that nothing can be paid twice.
 */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { adjustmentEntry, type PayoutSums, payoutEntry, payoutSums } from '@skyberth/money';
import type { BodyOf, PayoutRun, Principal, routes } from '@skyberth/shared';
import { SecondFactorService } from '../accounts/second-factor.service.js';
import { LedgerService } from '../ledger/ledger.service.js';
import { groupBy } from '../market/group-by.js';
import { OutboxService } from '../outbox/outbox.service.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { headView, lineView } from './payout-views.js';
import { TRANSFER } from './payout-worker.js';
import { type LineRow, type OpenPosting, PayoutRepository, type RunRow } from './payouts.repository.js';

const NO_ACCOUNT = 'The owner has not said yet where the money goes.';

@Injectable()
export class PayoutService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: PayoutRepository,
    private readonly ledger: LedgerService,
    private readonly outbox: OutboxService,
    private readonly factors: SecondFactorService,
    private readonly audit: AuditService,
  ) {}

  list({ page, pageSize }: { page: number; pageSize: number }) {
    const { rows, total } = this.repository.runs(page, pageSize);
    const items = rows.map((run) => headView(run, this.repository.lines(this.db, run.id), this.repository));
    return { items, total, page, pageSize };
  }

  one(caller: Principal, id: string): PayoutRun {
    const run = this.repository.run(this.db, id);
    const lines = this.repository.lines(this.db, id);
    return {
      ...headView(run, lines, this.repository),
      lines: lines.map((line) => lineView(line, this.repository.organisation(this.db, line.ownerId).name)),
      mayApprove: run.preparedBy !== caller.personId && run.reviewedBy !== caller.personId,
    };
  }

  /** Throws `wrong-state` where a run in that currency is open, or nothing is owed. */
  prepare(caller: Principal, input: BodyOf<typeof routes.preparePayoutRun>): PayoutRun {
    const id = newId();
    write(this.db, (tx) => {
      const open = this.repository.openRun(tx, input.currency);
      if (open)
        throw new DomainError('wrong-state', `Run ${open.number} in ${input.currency} is open. Finish or drop it.`);
      const byOwner = groupBy(this.repository.openPostings(tx, input.currency), (posting) => posting.ownerId);
      if (byOwner.size === 0) throw new DomainError('wrong-state', `Nothing is owed to owners in ${input.currency}.`);
      const number = this.repository.nextNumber(tx);
      const made = { preparedBy: caller.personId, preparedMs: this.clock.nowMs() };
      this.repository.addRun(tx, { id, number, currency: input.currency, state: 'draft', ...made });
      for (const [ownerId, postings] of byOwner) this.addLine(tx, { runId: id, ownerId, postings, ...input });
      this.record(tx, caller, 'prepare', id);
    });
    return this.one(caller, id);
  }

  /** A change of a reviewed run asks for a new review. */
  hold(caller: Principal, place: { id: string; lineId: string }, reason: string | null): PayoutRun {
    write(this.db, (tx) => {
      const line = this.openLine(tx, place);
      const accountId = this.repository.organisation(tx, line.ownerId).providerAccountId;
      if (line.toPayMinor <= 0) throw new DomainError('wrong-state', 'Nothing is due to this owner.');
      if (reason === null && accountId === null) throw new DomainError('wrong-state', NO_ACCOUNT);
      const change = reason === null ? { state: 'ready', note: '' } : { state: 'held back', note: reason };
      this.repository.changeLine(tx, line.id, change as Pick<LineRow, 'state' | 'note'>);
      this.record(tx, caller, reason === null ? 'let go' : 'hold', place.id, { lineId: line.id, reason });
    });
    return this.one(caller, place.id);
  }

  /** Books the adjustment at once; it stays booked when the run is dropped, and comes in the next one. */
  adjust(
    caller: Principal,
    place: { id: string; lineId: string },
    input: { amountMinor: number; reason: string },
  ): PayoutRun {
    write(this.db, (tx) => {
      const line = this.openLine(tx, place);
      const { currency } = this.repository.run(tx, place.id);
      const causeKey = `adjust:${newId()}`;
      const head = { causeKey, cause: `Adjustment: ${input.reason}`, currency };
      const { ownerId } = line;
      this.ledger.post(tx, adjustmentEntry(head, { ownerId, amountMinor: input.amountMinor }), null);
      const posting = this.repository.postingOf(tx, causeKey);
      if (!posting) throw new Error('The adjustment was not booked.');
      const item = { id: newId(), lineId: line.id, entryId: posting.entryId, postingLine: posting.line, live: true };
      this.repository.addItems(tx, [item]);
      const sums = payoutSums(this.repository.itemsOf(tx, line.id));
      const due = line.state === 'nothing due' ? ('held back' as const) : line.state;
      const state = sums.toPayMinor <= 0 ? ('nothing due' as const) : due;
      this.repository.changeLine(tx, line.id, { ...sums, state });
      this.record(tx, caller, 'adjust', place.id, { lineId: line.id, ...input });
    });
    return this.one(caller, place.id);
  }

  review(caller: Principal, id: string, code: string): PayoutRun {
    this.factors.beginAct(caller);
    write(this.db, (tx) => {
      const run = this.repository.run(tx, id);
      if (run.state !== 'draft') throw wrongState(run);
      this.factors.spend(tx, caller, code);
      const reviewed = { reviewedBy: caller.personId, reviewedMs: this.clock.nowMs() };
      this.repository.changeRun(tx, id, { state: 'reviewed', ...reviewed });
      this.record(tx, caller, 'review', id);
    });
    return this.one(caller, id);
  }

  /**
   * Sends what is ready, as a third act by another person. A line whose owner's account has fallen below it meanwhile (a
   * refund, a dispute) waits for the next run. Throws `changed-meanwhile` where another sum was shown.
   */
  approve(caller: Principal, id: string, input: { code: string; expectedMinor: number }): PayoutRun {
    this.factors.beginAct(caller);
    write(this.db, (tx) => {
      const run = this.repository.run(tx, id);
      if (run.state !== 'reviewed') throw wrongState(run);
      if ([run.preparedBy, run.reviewedBy].includes(caller.personId)) {
        throw new DomainError('not-allowed', 'You prepared or reviewed this run, so another person must approve it.');
      }
      const ready = this.repository.lines(tx, id).filter((line) => line.state === 'ready');
      const sendsMinor = ready.reduce((sum, line) => sum + line.toPayMinor, 0);
      if (sendsMinor !== input.expectedMinor) {
        throw new DomainError('changed-meanwhile', 'The run has changed. Look at it again.');
      }
      this.factors.spend(tx, caller, input.code);
      const approved = { approvedBy: caller.personId, approvedMs: this.clock.nowMs() };
      this.repository.changeRun(tx, id, { state: 'approved', ...approved });
      for (const line of this.repository.lines(tx, id)) this.start(tx, run, line);
      this.record(tx, caller, 'approve', id, { sendsMinor });
    });
    return this.one(caller, id);
  }

  drop(caller: Principal, id: string): PayoutRun {
    write(this.db, (tx) => {
      const run = this.repository.run(tx, id);
      if (run.state !== 'draft' && run.state !== 'reviewed') throw wrongState(run);
      this.repository.changeRun(tx, id, { state: 'dropped' });
      for (const line of this.repository.lines(tx, id)) this.repository.giveFree(tx, line.id);
      this.record(tx, caller, 'drop', id);
    });
    return this.one(caller, id);
  }

  private start(tx: Db, run: RunRow, line: LineRow): void {
    if (line.state !== 'ready') {
      this.repository.giveFree(tx, line.id);
      return;
    }
    const { ownerId, toPayMinor } = line;
    if (-this.ledger.balanceMinor('owner payable', run.currency, ownerId) < toPayMinor) {
      const note = 'Refunds since the review took from it; it comes in the next run.';
      this.repository.changeLine(tx, line.id, { state: 'held back', note });
      this.repository.giveFree(tx, line.id);
      return;
    }
    this.repository.changeLine(tx, line.id, { state: 'paying' });
    const head = { causeKey: `payout:${line.id}`, cause: `Payout run ${run.number}`, currency: run.currency };
    this.ledger.post(tx, payoutEntry(head, { ownerId, amountMinor: toPayMinor }), null);
    this.outbox.enqueue(tx, { kind: TRANSFER, dedupeKey: `${TRANSFER}:${line.id}`, payload: { lineId: line.id } });
  }

  private addLine(
    tx: Db,
    wish: { runId: string; ownerId: string; postings: readonly OpenPosting[]; minimumMinor: number },
  ): void {
    const { runId, ownerId, postings, minimumMinor } = wish;
    const lineId = newId();
    const sums = payoutSums(postings);
    this.repository.addLine(tx, {
      id: lineId,
      runId,
      ownerId,
      ...sums,
      ...this.firstState(tx, ownerId, sums, minimumMinor),
    });
    const items = postings.map(({ entryId, line }) => ({
      id: newId(),
      lineId,
      entryId,
      postingLine: line,
      live: true,
    }));
    this.repository.addItems(tx, items);
  }

  private firstState(tx: Db, ownerId: string, { toPayMinor }: PayoutSums, minimumMinor: number) {
    if (toPayMinor <= 0) return { state: 'nothing due', note: '' } as const;
    if (toPayMinor < minimumMinor)
      return { state: 'below minimum', note: 'It is carried over to the next run.' } as const;
    if (this.repository.organisation(tx, ownerId).providerAccountId === null)
      return { state: 'held back', note: NO_ACCOUNT } as const;
    return { state: 'ready', note: '' } as const;
  }

  /** A line that may be changed; a reviewed run becomes a draft again. */
  private openLine(tx: Db, place: { id: string; lineId: string }): LineRow {
    const run = this.repository.run(tx, place.id);
    const line = this.repository.line(tx, place.lineId);
    if (line.runId !== run.id) throw notFound('payout line');
    if (run.state !== 'draft' && run.state !== 'reviewed') throw wrongState(run);
    if (run.state === 'reviewed') {
      this.repository.changeRun(tx, run.id, { state: 'draft', reviewedBy: null, reviewedMs: null });
    }
    return line;
  }

  private record(tx: Db, caller: Principal, what: string, id: string, data: Record<string, unknown> = {}): void {
    this.audit.record(tx, { caller, action: `payout.${what}`, subject: `payout:${id}`, data });
  }
}

const wrongState = ({ number, state }: RunRow): DomainError =>
  new DomainError('wrong-state', `Run ${number} is ${state}; this cannot be done with it any more, or not yet.`);
