/** What needs the caller now: one sentence each, the pressing ones first. */
import { Inject, Injectable } from '@nestjs/common';
import { can, type HomeView, type Principal } from '@skyberth/shared';
import { utcText } from '../bookings/booking-words.js';
import { ClearanceBook } from '../clearances/clearance-book.js';
import { MessagesRepository } from '../messages/messages.repository.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { StandingService } from '../platform/standing.js';
import { ElementsService } from '../spacecraft/elements.service.js';
import { freshnessOf } from '../spacecraft/freshness.js';
import { HomeRepository, type WaitingBooking } from './home.repository.js';
import { HomeFiguresService } from './home-figures.service.js';

type Waiting = HomeView['waiting'][number];

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
/** A contact stands on the home page a day ahead, and presses an hour ahead. */
const AHEAD_MS = DAY_MS;
const PRESSING_MS = HOUR_MS;
const RENEW_WITHIN_MS = 30 * DAY_MS;
const FAILED_SHOWN_MS = 30 * DAY_MS;

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

@Injectable()
export class HomeService {
  constructor(
    private readonly repository: HomeRepository,
    private readonly figures: HomeFiguresService,
    private readonly elements: ElementsService,
    private readonly clearances: ClearanceBook,
    private readonly standing: StandingService,
    private readonly messages: MessagesRepository,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  view(caller: Principal): HomeView {
    const waiting = [...this.suspension(caller), ...this.waitingFor(caller)].sort(
      (a, b) => Number(b.urgent) - Number(a.urgent) || dueMs(a) - dueMs(b),
    );
    return {
      waiting,
      counts: this.countsFor(caller),
      money: this.figures.money(caller),
      firstSteps: this.figures.firstSteps(caller),
    };
  }

  private suspension({ organisationId }: Principal): Waiting[] {
    const reason = this.standing.suspendedFor(organisationId);
    if (reason === null) return [];
    const sentence = 'Your organisation is suspended: nothing is bought, sold or changed.';
    return [{ kind: 'suspended', sentence, detail: reason, path: '/organisation', urgent: true, dueUtc: null }];
  }

  private waitingFor(caller: Principal): Waiting[] {
    if (caller.organisationKind === 'operator') return this.forOperator(caller);
    if (caller.organisationKind === 'owner') return this.forOwner(caller);
    return can(caller, 'stations.approve') ? this.forAdmin() : this.forFinance();
  }

  private countsFor(caller: Principal): Record<string, number> {
    // Staff may read what the two sides write, but nothing of it is addressed to them.
    if (caller.organisationKind === 'staff') return this.workFor(caller);
    const { organisationKind: side, personId } = caller;
    return { messages: this.messages.newFor(caller, side, personId), ...this.workFor(caller) };
  }

  private workFor(caller: Principal): Record<string, number> {
    if (caller.organisationKind === 'owner') {
      return { requests: this.repository.countBookings('owner', caller.organisationId, ['awaiting owner']) };
    }
    if (!can(caller, 'stations.approve')) return {};
    return { approvals: this.repository.countStations('waiting'), disputes: this.repository.countDisputes() };
  }

  private forOperator({ organisationId }: Principal): Waiting[] {
    const nowMs = this.clock.nowMs();
    const held = this.repository.bookings('operator', organisationId, ['held'], Number.MAX_SAFE_INTEGER);
    const soon = this.repository.bookings('operator', organisationId, ['confirmed', 'under way'], nowMs + AHEAD_MS);
    const open = held.filter(({ holdEndsMs }) => holdEndsMs !== null && holdEndsMs > nowMs);
    return [
      ...open.map((each) => booking('hold', `Pay for the held contact ${titleOf(each)}.`, each, true, each.holdEndsMs)),
      ...this.moved(organisationId, nowMs),
      ...soon.map((each) => this.contact(each, nowMs)),
      ...this.disputes('operator', organisationId),
      ...this.clearancesOf('operator', organisationId),
      ...this.oldElements(organisationId, nowMs),
    ];
  }

  /** Contacts that newer elements move further than their guard: the operator is asked. */
  private moved(organisationId: string, nowMs: number): Waiting[] {
    return this.repository.driftQuestions(organisationId).map(({ bookingId, sentence, number, aosMs }) => ({
      kind: 'drift',
      sentence: `Newer elements move berth ${number}: keep it at the new time, or cancel.`,
      detail: sentence,
      path: `/bookings/${bookingId}`,
      urgent: aosMs - nowMs < DAY_MS,
      dueUtc: utc(aosMs),
    }));
  }

  private oldElements(organisationId: string, nowMs: number): Waiting[] {
    return this.repository.spacecraft(organisationId).flatMap(({ id, name }): Waiting[] => {
      const inForce = this.elements.inForce(id, nowMs);
      const common = { path: `/spacecraft/${id}`, urgent: false, dueUtc: null };
      if (!inForce) {
        const detail = 'Without them no pass can be found.';
        return [{ kind: 'elements', sentence: `${name} has no orbital elements.`, detail, ...common }];
      }
      const { meanMotionRevPerDay } = inForce.elementSet;
      const { freshness, ageH, timingErrorS } = freshnessOf(inForce.epochMs, meanMotionRevPerDay, nowMs);
      if (freshness === 'fresh') return [];
      const sentence = `The elements of ${name} are ${(ageH / 24).toFixed(1)} days old.`;
      const detail = `AOS may be off by about ${timingErrorS.toFixed(timingErrorS < 10 ? 1 : 0)} s (common practice).`;
      return [{ kind: 'elements', sentence, detail, ...common, urgent: freshness === 'stale' }];
    });
  }

  private forOwner({ organisationId }: Principal): Waiting[] {
    const nowMs = this.clock.nowMs();
    const read = (states: WaitingBooking['state'][], untilMs = Number.MAX_SAFE_INTEGER) =>
      this.repository.bookings('owner', organisationId, states, untilMs);
    const stations = this.repository.stations(organisationId, ['refused', 'suspended', 'draft']);
    return [
      ...read(['awaiting owner']).map((each) => {
        const pressing = (each.answerByMs ?? 0) - nowMs < PRESSING_MS;
        return booking('request', `Accept or decline ${titleOf(each)}.`, each, pressing, each.answerByMs);
      }),
      ...read(['reporting']).map((each) => booking('report', `Report how ${titleOf(each)} went.`, each, false, null)),
      ...read(['confirmed', 'under way'], nowMs + AHEAD_MS).map((each) => this.contact(each, nowMs)),
      ...this.disputes('owner', organisationId),
      ...this.clearancesOf('owner', organisationId),
      ...stations.map(({ id, name, state, stateNote }) => ({
        kind: 'station',
        sentence: state === 'draft' ? `${name} is a draft: ask for its approval.` : `${name} is ${state}.`,
        detail: stateNote,
        path: `/stations/${id}`,
        urgent: state === 'suspended',
        dueUtc: null,
      })),
    ];
  }

  private contact(each: WaitingBooking, nowMs: number): Waiting {
    const underWay = each.state === 'under way';
    const sentence = underWay ? `The contact ${titleOf(each)} is under way.` : `The contact ${titleOf(each)} is next.`;
    const pressing = underWay || each.aosMs - nowMs < PRESSING_MS;
    return booking('contact', sentence, each, pressing, underWay ? each.losMs : each.aosMs);
  }

  private forAdmin(): Waiting[] {
    const stations = this.repository.stations(null, ['waiting']).map(({ id, name, ownerName }) => ({
      kind: 'approval',
      sentence: `${name} of ${ownerName} waits for approval.`,
      detail: 'Check position, horizon and licence papers.',
      path: `/approvals/${id}`,
      urgent: false,
      dueUtc: null,
    }));
    return [...this.disputes(null), ...stations, ...this.clearancesOf('admin', ''), ...this.failures('/system')];
  }

  /** Clearances that this side must answer, check, or renew before they end. */
  private clearancesOf(side: 'operator' | 'owner' | 'admin', organisationId: string): Waiting[] {
    const untilMs = this.clock.nowMs() + RENEW_WITHIN_MS;
    const words = { operator: 'ends soon; renew it.', owner: 'waits for your answer.', admin: 'waits for your check.' };
    return this.clearances.waitingFor(side, organisationId, untilMs).map((each) => ({
      kind: 'clearance',
      sentence: `Clearance ${each.number} for ${each.spacecraftName} at ${each.stationName} ${words[side]}`,
      detail: each.purpose,
      path: `/clearances/${each.id}`,
      urgent: false,
      dueUtc: side === 'operator' ? utc(each.endMs) : null,
    }));
  }

  /** Disputes that wait; whose answer or decision is next stands in the words. */
  private disputes(side: 'operator' | 'owner' | null, organisationId?: string): Waiting[] {
    const nowMs = this.clock.nowMs();
    return this.repository.disputes(side, organisationId).map((each) => {
      const dueMs = side === 'owner' ? each.statementDueMs : each.decideByMs;
      const words = {
        operator: 'waits for a decision',
        owner: 'waits for your statement',
        admin: 'waits for your decision',
      };
      return {
        kind: 'dispute',
        sentence: `Dispute ${each.number} over berth ${each.bookingNumber} ${words[side ?? 'admin']}.`,
        detail: each.reason,
        path: `/disputes/${each.id}`,
        urgent: side !== 'operator' && dueMs - nowMs < DAY_MS,
        dueUtc: utc(dueMs),
      };
    });
  }

  private forFinance(): Waiting[] {
    return this.failures('/ledger').filter((each) => each.detail !== 'mail');
  }

  private failures(path: string): Waiting[] {
    return this.repository.failedOutbox(this.clock.nowMs() - FAILED_SHOWN_MS).map(({ kind, rows }) => ({
      kind: 'failure',
      sentence: `${rows} ${rows === 1 ? 'task' : 'tasks'} of kind ${kind} could not be carried out.`,
      detail: kind,
      path,
      urgent: kind !== 'mail',
      dueUtc: null,
    }));
  }
}

const dueMs = (waiting: Waiting): number =>
  waiting.dueUtc === null ? Number.MAX_SAFE_INTEGER : Date.parse(waiting.dueUtc);

const titleOf = (each: WaitingBooking): string =>
  `${each.number}, ${each.spacecraftName} over ${each.antennaName} at ${each.stationName}`;

const booking = (
  kind: string,
  sentence: string,
  each: WaitingBooking,
  urgent: boolean,
  due: number | null,
): Waiting => ({
  kind,
  sentence,
  detail: `AOS ${utcText(each.aosMs)}`,
  path: `/bookings/${each.id}`,
  urgent,
  dueUtc: due === null ? null : utc(due),
});
