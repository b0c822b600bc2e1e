/** The organisation's spacecraft and their radios. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { BodyOf, Principal, QueryOf, ResponseOf, routes, Spacecraft } from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { uniqueOr } from '../platform/unique-name.js';
import { ElementsService } from './elements.service.js';
import { freshnessOf } from './freshness.js';
import { type EquippedSpacecraft, SpacecraftRepository } from './spacecraft.repository.js';

type Input = BodyOf<typeof routes.createSpacecraft>;

@Injectable()
export class SpacecraftService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly spacecraft: SpacecraftRepository,
    private readonly elements: ElementsService,
    private readonly audit: AuditService,
  ) {}

  /** Spacecraft with their radios, for finding contact time. Throws `not-found` where one is not the organisation's. */
  forMarket(organisationId: string, ids: readonly string[]): EquippedSpacecraft[] {
    const wanted = [...new Set(ids)];
    const rows = this.spacecraft.findSome(this.db, organisationId, wanted);
    if (rows.length !== wanted.length) throw notFound('spacecraft');
    return rows;
  }

  list(caller: Principal, query: QueryOf<typeof routes.listSpacecraft>): ResponseOf<typeof routes.listSpacecraft> {
    const { page, pageSize, state } = query;
    const filter = { state, limit: pageSize, offset: (page - 1) * pageSize };
    const { rows, total } = this.spacecraft.list(caller.organisationId, filter);
    return { items: rows.map((row) => this.view(row)), total, page, pageSize };
  }

  get(caller: Principal, id: string): Spacecraft {
    return this.view(this.find(this.db, caller, id));
  }

  history(
    caller: Principal,
    id: string,
    query: QueryOf<typeof routes.listElements>,
  ): ResponseOf<typeof routes.listElements> {
    this.find(this.db, caller, id);
    return this.elements.history(id, query);
  }

  /** Throws `already-exists` for a name or a catalogue number that the organisation uses already. */
  create(caller: Principal, { radios, ...input }: Input): Spacecraft {
    return write(this.db, (tx) => {
      const id = newId();
      const { organisationId } = caller;
      const row = { id, organisationId, ...input, state: 'active' as const, createdMs: this.clock.nowMs() };
      uniqueOr(taken(input), () => this.spacecraft.add(tx, row));
      this.spacecraft.replaceRadios(tx, id, radios);
      this.note(tx, caller, 'spacecraft.create', id, { ...input, radios });
      return this.view(this.find(tx, caller, id));
    });
  }

  /** Throws `not-found` or `already-exists`. */
  update(caller: Principal, id: string, { radios, ...input }: Input): Spacecraft {
    return write(this.db, (tx) => {
      this.find(tx, caller, id);
      uniqueOr(taken(input), () => this.spacecraft.change(tx, id, input));
      this.spacecraft.replaceRadios(tx, id, radios);
      this.note(tx, caller, 'spacecraft.update', id, { ...input, radios });
      return this.view(this.find(tx, caller, id));
    });
  }

  /** Throws `not-found`, or `wrong-state` while there are contacts to come. */
  retire(caller: Principal, id: string): Spacecraft {
    return write(this.db, (tx) => {
      const { name } = this.find(tx, caller, id);
      const contacts = this.spacecraft.contactsToCome(tx, id, this.clock.nowMs());
      if (contacts > 0) {
        const detail = `${name} has ${contacts} ${contacts === 1 ? 'contact' : 'contacts'} to come. Fly or cancel first.`;
        throw new DomainError('wrong-state', detail);
      }
      this.spacecraft.change(tx, id, { state: 'retired' });
      this.note(tx, caller, 'spacecraft.retire', id, {});
      return this.view(this.find(tx, caller, id));
    });
  }

  private find(db: Db, caller: Principal, id: string): EquippedSpacecraft {
    const row = this.spacecraft.find(db, caller.organisationId, id);
    if (!row) throw notFound('spacecraft');
    return row;
  }

  private view({ organisationId: _organisationId, createdMs: _createdMs, ...row }: EquippedSpacecraft): Spacecraft {
    const elements = this.elements.summaryNow(row.id);
    const freshness = elements
      ? freshnessOf(Date.parse(elements.epochUtc), elements.meanMotionRevPerDay, this.clock.nowMs()).freshness
      : 'none';
    return { ...row, radios: [...row.radios], elements, freshness };
  }

  private note(tx: Db, caller: Principal, action: string, id: string, data: Record<string, unknown>): void {
    this.audit.record(tx, { caller, action, subject: `spacecraft:${id}`, data });
  }
}

const taken = ({ name, catalogNumber }: Pick<Input, 'name' | 'catalogNumber'>): DomainError => {
  const number = catalogNumber === null ? '' : ` or the number ${catalogNumber}`;
  return new DomainError('already-exists', `You have a spacecraft with the name ${name}${number} already.`, [
    { pointer: '/name', detail: 'This name or number is taken.' },
  ]);
};
