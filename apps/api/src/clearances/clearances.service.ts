/** Asking for leave to transmit, granting and checking it, and taking it back. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import {
  type BodyOf,
  type Clearance,
  LONGEST_CLEARANCE_DAYS,
  type Principal,
  type QueryOf,
  type ResponseOf,
  type routes,
} from '@skyberth/shared';
import { FileAccess } from '../files/file-access.js';
import { FilesService } from '../files/files.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, refusalOf, write } from '../platform/transaction.js';
import { ClearanceNotices } from './clearance-notices.js';
import { type ClearanceStep, ClearanceTransitions } from './clearance-transitions.js';
import { ACTOR_OF, ClearanceViews, PAPERS } from './clearance-views.js';
import { ClearancesRepository } from './clearances.repository.js';

type Request = BodyOf<typeof routes.requestClearance>;
const DAY_MS = 86_400_000;

@Injectable()
export class ClearancesService implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: ClearancesRepository,
    private readonly transitions: ClearanceTransitions,
    private readonly notices: ClearanceNotices,
    private readonly views: ClearanceViews,
    private readonly files: FilesService,
    private readonly access: FileAccess,
  ) {}

  /** Papers are read by both sides of the clearance and by those who check them. */
  onModuleInit(): void {
    this.access.register(
      PAPERS,
      (caller, id) =>
        !(caller.organisationKind === 'staff' && caller.role !== 'admin') &&
        this.repository.find(this.db, caller, id) !== undefined,
    );
  }

  list(caller: Principal, query: QueryOf<typeof routes.listClearances>): ResponseOf<typeof routes.listClearances> {
    const { page, pageSize, state } = query;
    const { rows, total } = this.repository.list(caller, { state, limit: pageSize, offset: (page - 1) * pageSize });
    return { items: this.views.of(this.db, caller, rows), total, page, pageSize };
  }

  get(caller: Principal, id: string, db: Db = this.db): Clearance {
    const row = this.repository.find(db, caller, id);
    const [view] = row ? this.views.of(db, caller, [row]) : [];
    if (!view) throw notFound('clearance');
    return view;
  }

  choices(): ResponseOf<typeof routes.clearanceChoices> {
    return { stations: this.repository.transmitting().map(({ ownerId: _ownerId, ...station }) => station) };
  }

  /** Throws `not-found`, `bad-input` for dates or a band that cannot be, `already-exists` for the same request twice. */
  request(caller: Principal, wish: Request): Clearance {
    return write(this.db, (tx) => {
      const craft = this.repository.ownSpacecraft(tx, caller.organisationId, wish.spacecraftId);
      if (!craft) throw notFound('spacecraft');
      const station = this.repository.transmitting(tx).find((each) => each.id === wish.stationId);
      if (!station) throw notFound('station that transmits');
      const [validFromMs, validToMs] = [Date.parse(wish.validFromUtc), Date.parse(wish.validToUtc)];
      this.refuseDates(validFromMs, validToMs);
      if (!station.bands.includes(wish.band)) {
        refuse('/band', `${station.name} transmits in ${station.bands.join(' and ')}, not in ${wish.band}.`);
      }
      if (!craft.uplinkBands.includes(wish.band)) {
        refuse('/band', `${craft.name} has no uplink radio in ${wish.band}. Add the radio to the spacecraft first.`);
      }
      const nowMs = this.clock.nowMs();
      const row = {
        id: newId(),
        number: this.repository.nextNumber(tx),
        spacecraftId: wish.spacecraftId,
        operatorId: caller.organisationId,
        stationId: station.id,
        ownerId: station.ownerId,
        band: wish.band,
        state: 'requested' as const,
        validFromMs,
        validToMs,
        purpose: wish.purpose,
        conditions: '',
        requestedBy: caller.personId,
        requestedMs: nowMs,
        changedMs: nowMs,
      };
      try {
        this.repository.add(tx, row);
      } catch (error) {
        if (!refusalOf(error)?.includes('clearances.spacecraft_id')) throw error;
        throw new DomainError(
          'already-exists',
          'The same clearance from the same day is asked for or granted already.',
        );
      }
      this.files.link(tx, { caller, subjectKind: PAPERS, subjectId: row.id, fileIds: wish.fileIds });
      this.transitions.record(tx, row, { act: 'request', toState: 'requested', caller, sentence: wish.purpose });
      const named = this.repository.byId(tx, row.id);
      if (named) this.notices.requested(tx, named);
      return this.get(caller, row.id, tx);
    });
  }

  /** Throws `not-found` and `wrong-state`. */
  answer(caller: Principal, id: string, body: BodyOf<typeof routes.answerClearance>): Clearance {
    return this.step(caller, id, () =>
      body.answer === 'grant'
        ? { act: 'grant', sentence: 'Granted by the station.', conditions: body.conditions }
        : { act: 'refuse', sentence: `Refused by the station: ${body.reason}` },
    );
  }

  /** Throws `not-found` and `wrong-state`. */
  check(caller: Principal, id: string, body: BodyOf<typeof routes.checkClearance>): Clearance {
    return this.step(caller, id, () =>
      body.answer === 'refuse'
        ? { act: 'refuse', sentence: `Refused after looking at the papers: ${body.reason}` }
        : { act: 'check', sentence: 'The papers were checked.' },
    );
  }

  /** Throws `not-found` and `wrong-state`. */
  withdraw(caller: Principal, id: string, reason: string): Clearance {
    const side = { operator: 'the operator', owner: 'the station', staff: 'Skyberth' }[caller.organisationKind];
    return this.step(caller, id, () => ({ act: 'withdraw', sentence: `Withdrawn by ${side}: ${reason}` }));
  }

  private step(caller: Principal, id: string, what: () => Omit<ClearanceStep, 'actor' | 'caller'>): Clearance {
    return write(this.db, (tx) => {
      const clearance = this.repository.find(tx, caller, id);
      if (!clearance) throw notFound('clearance');
      this.transitions.apply(tx, clearance, { ...what(), actor: ACTOR_OF[caller.organisationKind], caller });
      return this.get(caller, id, tx);
    });
  }

  private refuseDates(validFromMs: number, validToMs: number): void {
    if (validToMs <= validFromMs) refuse('/validToUtc', 'It must end after it begins.');
    if (validToMs <= this.clock.nowMs()) refuse('/validToUtc', 'Its end has passed already.');
    if (validToMs - validFromMs > LONGEST_CLEARANCE_DAYS * DAY_MS) {
      refuse('/validToUtc', `Papers are looked at again after at most ${LONGEST_CLEARANCE_DAYS} days; ask for less.`);
    }
  }
}

function refuse(pointer: string, detail: string): never {
  throw new DomainError('bad-input', detail, [{ pointer, detail }]);
}
