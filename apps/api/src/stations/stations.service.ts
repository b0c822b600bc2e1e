/** Describing stations, asking for approval, and deciding about it. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { BodyOf, Principal, QueryOf, ResponseOf, routes, Station } from '@skyberth/shared';
import { OrganisationsRepository } from '../accounts/organisations.repository.js';
import { MailService } from '../mail/mail.service.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { nameTaken, uniqueOr } from '../platform/unique-name.js';
import { AntennasRepository } from './antennas.repository.js';
import { decisionMail } from './station-mails.js';
import { stationView } from './station-views.js';
import { type OwnedStation, type Scope, StationsRepository } from './stations.repository.js';

type Decide = BodyOf<typeof routes.decideStation>;
type Input = BodyOf<typeof routes.createStation>;

/** From which states each decision can be made, and where it leads. */
const DECISIONS: Readonly<
  Record<Decide['decision'], { readonly from: readonly OwnedStation['state'][]; readonly to: OwnedStation['state'] }>
> = {
  approve: { from: ['waiting', 'suspended'], to: 'approved' },
  refuse: { from: ['waiting'], to: 'refused' },
  suspend: { from: ['approved', 'waiting'], to: 'suspended' },
};

/** Owners see their own; the permission table lets nobody else in but staff, who see all. */
export const scopeOf = (caller: Principal): Scope =>
  caller.organisationKind === 'staff' ? null : caller.organisationId;

@Injectable()
export class StationsService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
    private readonly stations: StationsRepository,
    private readonly antennas: AntennasRepository,
    private readonly organisations: OrganisationsRepository,
    private readonly mail: MailService,
    private readonly audit: AuditService,
  ) {}

  list(caller: Principal, query: QueryOf<typeof routes.listStations>): ResponseOf<typeof routes.listStations> {
    const { page, pageSize, state } = query;
    const filter = { state, limit: pageSize, offset: (page - 1) * pageSize };
    const { rows, total } = this.stations.list(scopeOf(caller), filter);
    return { items: this.views(this.db, rows), total, page, pageSize };
  }

  get(caller: Principal, id: string): Station {
    return this.view(this.db, caller, id);
  }

  /** Throws `already-exists` for a name that the owner uses already. */
  create(caller: Principal, input: Input): Station {
    return write(this.db, (tx) => {
      const station = {
        id: newId(),
        organisationId: caller.organisationId,
        ...input,
        state: 'draft' as const,
        stateNote: '',
        createdMs: this.clock.nowMs(),
      };
      uniqueOr(nameTaken('station', input.name), () => this.stations.add(tx, station));
      this.note(tx, caller, 'station.create', station.id, { ...input });
      return this.view(tx, caller, station.id);
    });
  }

  /**
   * Moving an approved station sends it back to approval. Throws `not-found`, `already-exists`, or `wrong-state`: a
   * suspended station stays as it is, a station with sold contacts does not move, and a price keeps its currency.
   */
  update(caller: Principal, id: string, input: Input): Station {
    return write(this.db, (tx) => {
      const station = this.find(tx, caller, id);
      const moved =
        station.latitudeDeg !== input.latitudeDeg ||
        station.longitudeDeg !== input.longitudeDeg ||
        station.altitudeM !== input.altitudeM;
      this.refuseUnsafeChange(tx, station, input, moved);
      const backToApproval = moved && station.state === 'approved';
      const state = backToApproval ? { state: 'waiting' as const, stateNote: MOVED_NOTE } : {};
      uniqueOr(nameTaken('station', input.name), () => this.stations.change(tx, id, { ...input, ...state }));
      if (moved) this.stations.raiseVersions(tx, id);
      this.note(tx, caller, 'station.update', id, { ...input, ...state });
      return this.view(tx, caller, id);
    });
  }

  private refuseUnsafeChange(tx: Db, station: OwnedStation, input: Input, moved: boolean): void {
    if (station.state === 'suspended') {
      throw new DomainError('wrong-state', `${station.name} is suspended and cannot be changed: ${station.stateNote}`);
    }
    const sold = moved ? this.stations.contactsToCome(tx, station.id, this.clock.nowMs()) : 0;
    if (sold > 0) {
      throw new DomainError(
        'wrong-state',
        `${sold} sold ${sold === 1 ? 'contact was' : 'contacts were'} computed for where ${station.name} stands now. ` +
          'Fly or cancel them first, or describe the new place as another station.',
      );
    }
    if (input.currency !== station.currency && this.stations.hasPrices(tx, station.id)) {
      throw new DomainError(
        'wrong-state',
        `${station.name} has prices in ${station.currency}, so its currency cannot become ${input.currency}.`,
      );
    }
  }

  /** Throws `not-found`, or `wrong-state` where approval was given or asked for already. */
  submit(caller: Principal, id: string): Station {
    return write(this.db, (tx) => {
      const { state, name } = this.find(tx, caller, id);
      if (state !== 'draft' && state !== 'refused') {
        throw new DomainError('wrong-state', `${name} is ${state}; approval is asked for from draft or refused.`);
      }
      this.stations.change(tx, id, { state: 'waiting', stateNote: '' });
      this.note(tx, caller, 'station.submit', id, {});
      return this.view(tx, caller, id);
    });
  }

  /** Tells the owner's managers by mail. Throws `not-found` or `wrong-state`. */
  decide(caller: Principal, id: string, { decision, note }: Decide): Station {
    return write(this.db, (tx) => {
      const station = this.find(tx, caller, id);
      const { from, to } = DECISIONS[decision];
      if (!from.includes(station.state)) {
        const permitted = from.join(' or ');
        throw new DomainError(
          'wrong-state',
          `${station.name} is ${station.state}; to ${decision} it, it must be ${permitted}.`,
        );
      }
      this.stations.change(tx, id, { state: to, stateNote: note });
      this.note(tx, caller, `station.${decision}`, id, { note });
      const mail = decisionMail(station.name, decision, note, `${this.config.publicUrl}/stations/${id}`);
      for (const email of this.organisations.managerEmails(tx, station.organisationId)) {
        const dedupeKey = `station:${id}:${decision}:${this.clock.nowMs()}:${email}`;
        this.mail.queue(tx, { to: email, ...mail, dedupeKey });
      }
      return this.view(tx, caller, id);
    });
  }

  private find(db: Db, caller: Principal, id: string): OwnedStation {
    const station = this.stations.find(db, scopeOf(caller), id);
    if (!station) throw notFound('station');
    return station;
  }

  private view(db: Db, caller: Principal, id: string): Station {
    return this.views(db, [this.find(db, caller, id)])[0] as Station;
  }

  private views(db: Db, rows: readonly OwnedStation[]): Station[] {
    const nowMs = this.clock.nowMs();
    const all = this.antennas.ofStations(
      db,
      rows.map((row) => row.id),
      { fromMs: nowMs, toMs: nowMs, nowMs },
    );
    return rows.map((row) =>
      stationView(
        row,
        all.filter((whole) => whole.station.id === row.id),
      ),
    );
  }

  private note(tx: Db, caller: Principal, action: string, id: string, data: Record<string, unknown>): void {
    this.audit.record(tx, { caller, action, subject: `station:${id}`, data });
  }
}

const MOVED_NOTE = 'The position was changed; it must be approved again.';
