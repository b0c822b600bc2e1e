/** Opening, answering, deciding and appealing disputes. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type {
  BodyOf,
  DecisionEffect,
  DecisionTerms,
  Dispute,
  Observation,
  Principal,
  QueryOf,
  ResponseOf,
  routes,
} from '@skyberth/shared';
import { BookingTransitions, type Mover } from '../bookings/booking-transitions.js';
import { moneyText } from '../bookings/booking-words.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { DISPUTE_WITHIN_MS } from '../bookings/report-terms.js';
import { FileAccess } from '../files/file-access.js';
import { FilesService } from '../files/files.service.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { DisputeMoney } from './dispute-money.js';
import { DisputeNotices } from './dispute-notices.js';
import { APPEAL_WITHIN_MS, DECIDE_WITHIN_MS, STATEMENT_WITHIN_MS } from './dispute-terms.js';
import { DisputeViews, disputeSideOf, STATEMENT_FILES } from './dispute-views.js';
import { type DecisionRow, DisputeRepository, type DisputeRow } from './disputes.repository.js';
import { EvidenceService, type Gap } from './evidence.service.js';

const PRECEDENTS_SHOWN = 100;

interface Said {
  readonly text: string;
  readonly observations?: readonly Observation[];
  readonly fileIds?: readonly string[];
}

@Injectable()
export class DisputesService implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: DisputeRepository,
    private readonly bookings: BookingRepository,
    private readonly transitions: BookingTransitions,
    private readonly evidence: EvidenceService,
    private readonly money: DisputeMoney,
    private readonly notices: DisputeNotices,
    private readonly views: DisputeViews,
    private readonly audit: AuditService,
    private readonly files: FilesService,
    private readonly access: FileAccess,
  ) {}

  /** Files of a statement are read by whoever sees its dispute. */
  onModuleInit(): void {
    this.access.register(STATEMENT_FILES, (caller, statementId) => this.repository.seesStatement(caller, statementId));
  }

  list(caller: Principal, query: QueryOf<typeof routes.listDisputes>): ResponseOf<typeof routes.listDisputes> {
    const { state, bookingId = null, page, pageSize } = query;
    const states = state === undefined ? null : state === 'waiting' ? (['open', 'appealed'] as const) : [state];
    const { rows, total } = this.repository.page(caller, { states, bookingId, page, pageSize });
    return { items: rows.map((row) => this.views.summary(row)), total, page, pageSize };
  }

  get(caller: Principal, id: string): Dispute {
    return this.views.full(caller, this.repository.forViewer(caller, id));
  }

  precedents(query: QueryOf<typeof routes.precedents>): ResponseOf<typeof routes.precedents> {
    const rows = this.repository.precedents(query.reason, PRECEDENTS_SHOWN);
    return {
      items: rows.map(({ dispute, decision }) => ({
        number: dispute.number,
        reason: dispute.reason,
        outcome: decision.outcome,
        refundBasisPoints: decision.refundBasisPoints,
        borneBy: decision.borneBy,
        gapS:
          dispute.gapFromMs === null || dispute.gapToMs === null ? null : (dispute.gapToMs - dispute.gapFromMs) / 1000,
        text: decision.text,
        decidedUtc: new Date(decision.decidedMs).toISOString(),
        appealed: decision.round === 2,
      })),
    };
  }

  /** The evidence is assembled first, since that takes a while; everything is asked again in the transaction. */
  async open(caller: Principal, bookingId: string, body: BodyOf<typeof routes.openDispute>): Promise<Dispute> {
    const seen = this.bookings.forViewer(caller, bookingId);
    this.checkOpening(this.db, seen);
    const gap = claimedGap(seen, body);
    const evidence = await this.evidence.assemble(seen, gap);
    const dispute = write(this.db, (tx) => {
      const booking = this.bookings.forViewer(caller, bookingId, tx);
      this.checkOpening(tx, booking);
      const nowMs = this.clock.nowMs();
      const found = evidence.gap;
      const row: DisputeRow = {
        id: newId(),
        number: this.repository.nextNumber(tx),
        bookingId,
        operatorId: booking.operatorId,
        ownerId: booking.ownerId,
        reason: body.reason,
        state: 'open',
        openedMs: nowMs,
        statementDueMs: nowMs + STATEMENT_WITHIN_MS,
        decideByMs: nowMs + DECIDE_WITHIN_MS,
        gapFromMs: found ? Date.parse(found.fromUtc) : null,
        gapToMs: found ? Date.parse(found.toUtc) : null,
        appealByMs: null,
        appealedBy: null,
      };
      this.repository.insert(tx, row);
      this.repository.addEvidence(tx, row.id, evidence, nowMs);
      this.say(tx, caller, row, 'operator', body);
      // Before the state changes, since charging what is open belongs to the contact's report.
      this.money.hold(tx, booking, row.id);
      this.transitions.apply(tx, bookingId, {
        cause: 'dispute opened',
        mover: moverOf(caller, 'operator'),
        sentence: `The operator disputes the contact: ${body.reason}. The money is set aside.`,
        data: { disputeId: row.id, reason: body.reason },
      });
      this.notices.opened(tx, booking, row, body.text);
      return row;
    });
    return this.views.full(caller, dispute);
  }

  state(caller: Principal, id: string, said: Said): Dispute {
    return write(this.db, (tx) => {
      const dispute = this.waiting(tx, caller, id);
      const side = disputeSideOf(caller, dispute);
      if (side !== 'operator' && side !== 'owner')
        throw new DomainError('not-allowed', 'Only its two sides make statements.');
      const statementId = this.say(tx, caller, dispute, side, said);
      this.notices.said(tx, this.booking(tx, dispute), { dispute, side, id: statementId, text: said.text });
      return this.views.full(caller, dispute);
    });
  }

  ask(caller: Principal, id: string, question: { side: 'operator' | 'owner'; text: string }): Dispute {
    return write(this.db, (tx) => {
      const dispute = this.waiting(tx, caller, id);
      const { side, text } = question;
      const asked = `To the ${side === 'operator' ? 'operator' : 'station'}: ${text}`;
      const statementId = this.say(tx, caller, dispute, 'admin', { text: asked });
      this.notices.asked(tx, this.booking(tx, dispute), { dispute, side, id: statementId, text });
      return this.views.full(caller, dispute);
    });
  }

  async assemble(caller: Principal, id: string): Promise<Dispute> {
    const seen = this.waiting(this.db, caller, id);
    const claimed =
      seen.gapFromMs === null || seen.gapToMs === null
        ? null
        : {
            fromMs: seen.gapFromMs,
            toMs: seen.gapToMs,
            from: this.repository.evidence(id).evidence.gap?.from ?? 'the operator',
          };
    const evidence = await this.evidence.assemble(this.booking(this.db, seen), claimed);
    return write(this.db, (tx) => {
      const dispute = this.waiting(tx, caller, id);
      this.repository.addEvidence(tx, id, evidence, this.clock.nowMs());
      this.record(tx, caller, 'dispute.assemble', dispute, {});
      return this.views.full(caller, dispute);
    });
  }

  preview(caller: Principal, id: string, terms: DecisionTerms): DecisionEffect {
    const dispute = this.waiting(this.db, caller, id);
    return this.effectOf(this.db, dispute, terms);
  }

  decide(caller: Principal, id: string, body: BodyOf<typeof routes.decideDispute>): Dispute {
    const { terms, text, expectedRefundMinor } = body;
    return write(this.db, (tx) => {
      const dispute = this.waiting(tx, caller, id);
      const before = this.before(tx, dispute);
      if (before?.decidedBy === caller.personId)
        throw new DomainError('not-allowed', 'You made the first decision; another person decides its appeal.');
      const effect = this.effectOf(tx, dispute, terms);
      if (effect.refundMinor !== expectedRefundMinor)
        throw new DomainError(
          'price-changed',
          `The refund would be ${moneyText(effect.refundMinor, effect.currency)}, not what was shown. Look at the sums again.`,
        );
      const round = before ? 2 : 1;
      const booking = this.booking(tx, dispute);
      const nowMs = this.clock.nowMs();
      const reason = `dispute ${dispute.number}, ${terms.outcome === 'none' ? 'no' : terms.outcome} refund`;
      const what = { disputeId: id, ruling: terms, before };
      const creditId = this.money.book(tx, booking, { ...what, round, reason });
      const { refundBasisPoints, borneBy, outcome } = terms;
      this.repository.addDecision(tx, {
        disputeId: id,
        round,
        outcome,
        refundBasisPoints,
        borneBy,
        text,
        decidedBy: caller.personId,
        decidedMs: nowMs,
        effect,
        refundMinor: effect.refundMinor,
      });
      const appealByMs = round === 1 ? nowMs + APPEAL_WITHIN_MS : null;
      const change = { state: round === 1 ? 'decided' : 'closed', appealByMs } as const;
      this.repository.change(tx, id, change);
      const whole = Math.max(before?.refundBasisPoints ?? 0, refundBasisPoints) === 10_000;
      this.transitions.apply(tx, booking.id, {
        cause: whole ? 'dispute refunded' : 'dispute settled',
        mover: moverOf(caller, 'admin'),
        sentence: `Decided: ${outcome === 'none' ? 'nothing goes back' : `${moneyText(effect.refundMinor, effect.currency)} go back`}.`,
        data: { disputeId: id, round, ...terms },
      });
      const told = { dispute, round, refundMinor: effect.refundMinor, text, appealByMs, creditId };
      this.notices.decided(tx, booking, told);
      return this.views.full(caller, { ...dispute, ...change });
    });
  }

  appeal(caller: Principal, id: string, { text }: Said): Dispute {
    return write(this.db, (tx) => {
      const dispute = this.repository.forViewer(caller, id, tx);
      const side = disputeSideOf(caller, dispute);
      if (side !== 'operator' && side !== 'owner') throw new DomainError('not-allowed', 'Only its two sides appeal.');
      const nowMs = this.clock.nowMs();
      if (dispute.state !== 'decided' || nowMs >= (dispute.appealByMs ?? 0))
        throw new DomainError('wrong-state', `Dispute ${dispute.number} can no longer be appealed.`);
      const booking = this.booking(tx, dispute);
      const change = { state: 'appealed', appealedBy: side, decideByMs: nowMs + DECIDE_WITHIN_MS } as const;
      this.repository.change(tx, id, change);
      this.say(tx, caller, dispute, side, { text: `Appeal: ${text}` });
      this.transitions.apply(tx, booking.id, {
        cause: 'appeal',
        mover: moverOf(caller, side),
        sentence: `The ${side === 'operator' ? 'operator' : 'station'} appeals against the decision.`,
        data: { disputeId: id },
      });
      this.notices.appealed(tx, booking, { dispute, side, text, decideByMs: change.decideByMs });
      return this.views.full(caller, { ...dispute, ...change });
    });
  }

  /** The time for an appeal is over: the decision stands for ever. */
  closeBeyondAppeal(): void {
    for (const dispute of this.repository.beyondAppeal(this.clock.nowMs())) {
      write(this.db, (tx) => {
        this.repository.change(tx, dispute.id, { state: 'closed' });
        this.record(tx, null, 'dispute.close', dispute, {});
      });
    }
  }

  private checkOpening(db: Db, booking: BookingRow): void {
    if (this.repository.ofBooking(db, booking.id))
      throw new DomainError(
        'already-exists',
        `Berth ${booking.number} was disputed before. A decision can be appealed once.`,
      );
    if (!['reporting', 'settled', 'failed'].includes(booking.state))
      throw new DomainError(
        'wrong-state',
        `Berth ${booking.number} is ${booking.state}; only a contact that is over can be disputed.`,
      );
    if (this.clock.nowMs() > booking.losMs + DISPUTE_WITHIN_MS)
      throw new DomainError('wrong-state', `The 14 days to dispute berth ${booking.number} are over.`);
    this.money.checkCharged(db, booking);
  }

  private effectOf(db: Db, dispute: DisputeRow, terms: DecisionTerms): DecisionEffect {
    return this.money.effect(db, this.booking(db, dispute), {
      disputeId: dispute.id,
      ruling: terms,
      before: this.before(db, dispute),
    });
  }

  private before(db: Db, dispute: DisputeRow): DecisionRow | null {
    return this.repository.decisions(dispute.id, db)[0]?.row ?? null;
  }

  private waiting(db: Db, caller: Principal, id: string): DisputeRow {
    const dispute = this.repository.forViewer(caller, id, db);
    if (dispute.state === 'open' || dispute.state === 'appealed') return dispute;
    throw new DomainError('wrong-state', `Dispute ${dispute.number} is decided.`);
  }

  private booking(db: Db, dispute: DisputeRow): BookingRow {
    const booking = this.bookings.byId(db, dispute.bookingId);
    if (!booking) throw new Error(`The dispute ${dispute.id} has no booking.`);
    return booking;
  }

  private say(
    tx: Db,
    caller: Principal,
    dispute: DisputeRow,
    side: 'operator' | 'owner' | 'admin',
    said: Said,
  ): string {
    const id = newId();
    this.repository.addStatement(tx, {
      id,
      disputeId: dispute.id,
      side,
      personId: caller.personId,
      atMs: this.clock.nowMs(),
      text: said.text,
      observations: [...(said.observations ?? [])],
    });
    this.files.link(tx, { caller, subjectKind: STATEMENT_FILES, subjectId: id, fileIds: said.fileIds ?? [] });
    this.record(tx, caller, 'dispute.state', dispute, { side, statementId: id });
    return id;
  }

  private record(
    tx: Db,
    caller: Principal | null,
    action: string,
    dispute: DisputeRow,
    data: Record<string, unknown>,
  ): void {
    this.audit.record(tx, { caller, action, subject: `dispute:${dispute.id}`, data });
  }
}

const moverOf = (caller: Principal, actor: 'operator' | 'owner' | 'admin'): Mover => ({ actor, person: caller });

/** The gap that the operator names; it must touch the contact. */
function claimedGap(booking: BookingRow, body: { gapFromUtc: string | null; gapToUtc: string | null }): Gap | null {
  if (body.gapFromUtc === null || body.gapToUtc === null) return null;
  const fromMs = Math.max(Date.parse(body.gapFromUtc), booking.aosMs);
  const toMs = Math.min(Date.parse(body.gapToUtc), booking.losMs);
  if (toMs <= fromMs) {
    const detail = 'The time without data lies outside the contact.';
    throw new DomainError('bad-input', detail, [{ pointer: '/gapFromUtc', detail }]);
  }
  return { fromMs, toMs, from: 'the operator' };
}
