/** Making plans: checks a need, gathers what is on offer, and lets a thread find the cheapest plan. */
import { Inject, Injectable, Logger, type OnApplicationShutdown } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { needFaults } from '@skyberth/planner';
import {
  type BodyOf,
  MOST_IN_GROUP,
  type Plan,
  type PlanInput,
  type PlanProgress,
  type PlanState,
  type Principal,
  type QueryOf,
  type ResponseOf,
  type routes,
} from '@skyberth/shared';
import { BookingGroupsService } from '../bookings/booking-groups.service.js';
import { MarketInputs } from '../market/market-inputs.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { write } from '../platform/transaction.js';
import { PlanGatherer } from './plan-gatherer.js';
import { runInThread, type ThreadAnswer } from './plan-thread.js';
import { planSummary, planView } from './plan-views.js';
import { PlanningRepository, type PlanRow } from './planning.repository.js';

const [HOUR_MS, DAY_MS] = [3_600_000, 86_400_000];
/** A plan takes a core for up to half a minute; more of them at a time would starve the market. */
const MOST_AT_ONCE = 2;
const MOST_OF_ONE = 1;

/** What a plan is whose holds have ended, once it is planned again. */
const REOPENED = { state: 'draft', groupId: null } as const;

interface Running {
  readonly operatorId: string;
  readonly stop: AbortController;
  progress: PlanProgress;
}

@Injectable()
export class PlanningService implements OnApplicationShutdown {
  private readonly logger = new Logger(PlanningService.name);
  private readonly running = new Map<string, Running>();

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: PlanningRepository,
    private readonly inputs: MarketInputs,
    private readonly gatherer: PlanGatherer,
    private readonly groups: BookingGroupsService,
  ) {}

  onApplicationShutdown(): void {
    for (const { stop } of this.running.values()) stop.abort();
  }

  list(caller: Principal, query: QueryOf<typeof routes.listPlans>): ResponseOf<typeof routes.listPlans> {
    const { rows, total } = this.repository.list(caller.organisationId, query);
    return {
      items: rows.map((row) => planSummary(row, this.stateOf(caller, row), this.running.has(row.id))),
      total,
      ...query,
    };
  }

  one(caller: Principal, id: string): Plan {
    const row = this.row(caller.organisationId, id);
    return planView(row, this.stateOf(caller, row), this.running.get(row.id)?.progress ?? null);
  }

  /** What has become of its holds: a plan whose holds ended unpaid is a draft again. */
  private stateOf(caller: Principal, { state, groupId }: PlanRow): PlanState {
    if (state !== 'held' || groupId === null) return state;
    const group = this.groups.get(caller, groupId);
    if (group.state === 'bought') return 'bought';
    return group.state === 'ended' ? 'draft' : 'held';
  }

  /** Throws `bad-input`, `not-found` for someone else's spacecraft, and `too-many`. */
  create(caller: Principal, need: PlanInput): Plan {
    this.check(caller.organisationId, need);
    this.refuseCrowd(caller.organisationId);
    const nowMs = this.clock.nowMs();
    const id = newId();
    const fresh = { need, pinnedKeys: [], struckKeys: [], failure: null, outcome: null, groupId: null };
    const made = { createdBy: caller.personId, createdMs: nowMs, changedMs: nowMs };
    const row = { id, operatorId: caller.organisationId, state: 'draft' as const, work: 'working' as const };
    write(this.db, (tx) => this.repository.insert(tx, { ...row, ...fresh, ...made }));
    this.start(this.row(caller.organisationId, id));
    return this.one(caller, id);
  }

  /** Throws what `create` does, and `wrong-state` for a plan that is not a draft or is being made. */
  replan(caller: Principal, id: string, wish: BodyOf<typeof routes.replan>): Plan {
    this.check(caller.organisationId, wish.need, wish);
    const row = this.row(caller.organisationId, id);
    this.refuseUnlessDraft(caller, row);
    this.refuseCrowd(caller.organisationId);
    const changedMs = this.clock.nowMs();
    write(this.db, (tx) =>
      this.repository.change(tx, id, { ...wish, ...REOPENED, work: 'working', failure: null, changedMs }),
    );
    this.start(this.row(caller.organisationId, id));
    return this.one(caller, id);
  }

  stop(caller: Principal, id: string): Plan {
    this.row(caller.organisationId, id);
    const running = this.running.get(id);
    if (running === undefined) throw new DomainError('wrong-state', 'Nothing is being looked for in this plan.');
    running.stop.abort();
    this.running.delete(id);
    this.settle(id, { kind: 'stopped' });
    return this.one(caller, id);
  }

  /**
   * Holds every contact of the plan that is not had yet at the price that the plan shows, all or none. Throws `wrong-state`,
   * `too-large` for more than fit into one group, and `group-refused` with every contact that cannot be had.
   */
  async hold(caller: Principal, id: string, oldElementsAcknowledged: boolean): Promise<Plan> {
    const row = this.row(caller.organisationId, id);
    this.refuseUnlessDraft(caller, row);
    const fresh = (row.outcome?.passes ?? []).filter((each) => each.bookedBefore === null);
    if (fresh.length === 0) throw new DomainError('wrong-state', 'There is nothing in this plan that could be held.');
    if (fresh.length > MOST_IN_GROUP)
      throw new DomainError(
        'too-large',
        `The plan has ${fresh.length} new contacts, and at most ${MOST_IN_GROUP} can be held together. Plan fewer days or fewer spacecraft.`,
      );
    const items = fresh.map(({ antennaId, spacecraftId, need, aosUtc, losUtc, toPayMinor }) => {
      return {
        antennaId,
        spacecraftId,
        need,
        bands: [],
        aosUtc,
        losUtc,
        expectedToPayMinor: toPayMinor,
        oldElementsAcknowledged,
      };
    });
    const { groupId } = await this.groups.hold(caller, items);
    const changedMs = this.clock.nowMs();
    write(this.db, (tx) => this.repository.change(tx, id, { state: 'held', groupId, changedMs }));
    return this.one(caller, id);
  }

  giveUp(caller: Principal, id: string): Plan {
    const row = this.row(caller.organisationId, id);
    if (row.state === 'given up') throw new DomainError('wrong-state', 'This plan was given up before.');
    this.running.get(id)?.stop.abort();
    this.running.delete(id);
    const work = row.work === 'working' ? 'stopped' : row.work;
    write(this.db, (tx) => this.repository.change(tx, id, { state: 'given up', work, changedMs: this.clock.nowMs() }));
    return this.one(caller, id);
  }

  private row(operatorId: string, id: string): PlanRow {
    const row = this.repository.find(operatorId, id);
    if (row === undefined) throw notFound('plan');
    return row;
  }

  private refuseUnlessDraft(caller: Principal, row: PlanRow): void {
    const state = this.stateOf(caller, row);
    if (state !== 'draft') throw new DomainError('wrong-state', `This plan is ${state}; make a new one from it.`);
    if (this.running.has(row.id)) throw new DomainError('wrong-state', 'This plan is being made. Stop that first.');
  }

  private refuseCrowd(operatorId: string): void {
    const own = [...this.running.values()].filter((each) => each.operatorId === operatorId).length;
    if (own >= MOST_OF_ONE)
      throw new DomainError('too-many', 'Another plan of your organisation is being made. Wait for it, or stop it.');
    if (this.running.size >= MOST_AT_ONCE)
      throw new DomainError('too-many', 'Others are planning just now. Try again in half a minute.');
  }

  /** Everything that can be said before any pass is looked at. */
  private check(
    operatorId: string,
    need: PlanInput,
    edits: { pinnedKeys: string[]; struckKeys: string[] } | null = null,
  ): void {
    const fromMs = Date.parse(`${need.firstDay}T00:00:00Z`);
    const toMs = fromMs + need.days * DAY_MS;
    if (fromMs < this.clock.nowMs())
      throw badField('/firstDay', 'The first day has begun already. Plan from tomorrow on.');
    const period = { fromMs, toMs };
    const craft = this.inputs.craft(operatorId, [...new Set(need.craft.map((each) => each.spacecraftId))], period);
    const names = new Map(craft.map((each) => [each.id, each.name]));
    const [fault] = needFaults({
      ...period,
      craft: need.craft.map((each) => ({
        craftId: each.spacecraftId,
        name: names.get(each.spacecraftId) ?? 'the spacecraft',
        contactsPerDay: each.contactsPerDay,
        volumeBitsPerDay: each.bytesPerDay * 8,
        deliverByMs: each.deliverByH === null ? null : each.deliverByH * HOUR_MS,
        longestGapMs: each.longestGapH === null ? null : each.longestGapH * HOUR_MS,
        uplinkEveryMs: each.uplinkEveryH === null ? null : each.uplinkEveryH * HOUR_MS,
      })),
      budgets: need.budgets,
      rates: {},
      bannedStationIds: need.bannedStationIds,
      preferredStationIds: need.preferredStationIds,
      preferencePercent: need.preferencePercent,
      pinnedIds: edits?.pinnedKeys ?? [],
      struckIds: edits?.struckKeys ?? [],
    });
    if (fault !== undefined) throw badField(`/${fault.path}`, fault.sentence);
  }

  private start(row: PlanRow): void {
    const stop = new AbortController();
    const running: Running = {
      operatorId: row.operatorId,
      stop,
      progress: { stage: 'waiting', done: 0, of: 1, gapPercent: null },
    };
    this.running.set(row.id, running);
    const tell = (progress: PlanProgress): void => {
      running.progress = progress;
    };
    this.gatherer
      .gather(row, stop.signal, tell)
      .then((job) => runInThread(job, stop.signal, tell))
      .catch((error: unknown): ThreadAnswer => this.failed(row, stop.signal, error))
      .then((answer) => {
        // Stopped, given up or shut down: that has been written, or is no longer to be.
        if (this.running.get(row.id) !== running || stop.signal.aborted) return;
        this.settle(row.id, answer);
        this.running.delete(row.id);
      })
      .catch((error: unknown) => this.logger.error(`Plan ${row.id} could not be kept: ${String(error)}`));
  }

  private failed(row: PlanRow, signal: AbortSignal, error: unknown): ThreadAnswer {
    if (signal.aborted) return { kind: 'stopped' };
    if (error instanceof DomainError) return { kind: 'refused', sentence: error.message };
    this.logger.error(`Plan ${row.id} failed: ${error instanceof Error ? error.stack : String(error)}`);
    return { kind: 'refused', sentence: 'Something went wrong on our side. Try again; nothing was bought.' };
  }

  private settle(id: string, answer: ThreadAnswer): void {
    const changedMs = this.clock.nowMs();
    write(this.db, (tx) => {
      if (answer.kind === 'done')
        this.repository.change(tx, id, { work: 'done', outcome: answer.outcome, failure: null, changedMs });
      else if (answer.kind === 'refused')
        this.repository.change(tx, id, { work: 'failed', failure: answer.sentence, changedMs });
      else this.repository.change(tx, id, { work: 'stopped', changedMs });
    });
  }
}

const badField = (pointer: string, detail: string): DomainError =>
  new DomainError('bad-input', detail, [{ pointer, detail }]);
