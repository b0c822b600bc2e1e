/** The organisation and its members. The last manager stays: an organisation without one could never be helped. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import {
  type BodyOf,
  can,
  type Member,
  type Organisation,
  type Principal,
  ROLES_OF_KIND,
  type Role,
  type routes,
} from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { addedMail } from './account-mails.js';
import { MailedLinksService } from './mailed-links.service.js';
import { type MemberRow, type OrganisationRow, OrganisationsRepository } from './organisations.repository.js';
import { PeopleRepository } from './people.repository.js';
import { SessionsRepository } from './sessions.repository.js';
import { usableVatNumber } from './vat-number.js';

@Injectable()
export class OrganisationService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly organisations: OrganisationsRepository,
    private readonly people: PeopleRepository,
    private readonly sessions: SessionsRepository,
    private readonly links: MailedLinksService,
    private readonly audit: AuditService,
  ) {}

  /** One organisation by its id. Throws `not-found`. */
  byId(db: Db, id: string): Organisation {
    const row = this.organisations.byId(db, id);
    if (!row) throw notFound('organisation');
    return organisationView(row);
  }

  /** Who sells: named on every invoice. It is made at the start, so its absence is a fault of ours. */
  marketplace(db: Db): Organisation {
    const row = this.organisations.staff(db);
    if (!row) throw new Error('The organisation of the marketplace is missing.');
    return organisationView(row);
  }

  own(caller: Principal): Organisation {
    return this.byId(this.db, caller.organisationId);
  }

  /** Throws `already-exists` for a name that is taken, `bad-input` for an impossible VAT number. */
  update(caller: Principal, input: BodyOf<typeof routes.updateOrganisation>): Organisation {
    const { name, address, billingEmail } = input;
    const values = {
      ...(name !== undefined && { name }),
      ...(address !== undefined && { address }),
      ...(billingEmail !== undefined && { billingEmail }),
      ...(input.vatNumber !== undefined && { vatNumber: usableVatNumber(input.vatNumber, '/vatNumber') }),
    };
    return write(this.db, (tx) => {
      const namesake = name === undefined ? undefined : this.organisations.byName(tx, name);
      if (namesake && namesake.id !== caller.organisationId) {
        throw new DomainError('already-exists', `An organisation called ${name} exists already.`, [
          { pointer: '/name', detail: 'This name is taken.' },
        ]);
      }
      if (Object.keys(values).length > 0) this.organisations.change(tx, caller.organisationId, values);
      this.note(tx, caller, 'organisation.update', caller.organisationId, values);
      return this.byId(tx, caller.organisationId);
    });
  }

  members(caller: Principal): { items: Member[] } {
    return { items: this.organisations.members(this.db, caller.organisationId).map(memberView) };
  }

  /** A person without an account gets a link to set a password; one with an account belongs at once and is told. */
  invite(caller: Principal, input: BodyOf<typeof routes.inviteMember>): Member {
    checkRole(caller, input.role);
    return write(this.db, (tx) => {
      const organisation = this.byId(tx, caller.organisationId);
      const known = this.people.byEmail(tx, input.email);
      if (known && this.organisations.member(tx, organisation.id, known.id)) {
        throw new DomainError('already-exists', `${input.email} belongs to ${organisation.name} already.`, [
          { pointer: '/email', detail: 'This person is a member already.' },
        ]);
      }
      const createdMs = this.clock.nowMs();
      const person = known ?? { id: newId(), name: input.name, email: input.email, passwordHash: null };
      if (!known) this.people.add(tx, { ...person, createdMs });
      this.organisations.addMember(tx, {
        personId: person.id,
        organisationId: organisation.id,
        role: input.role,
        createdMs,
      });
      if (person.passwordHash === null) {
        this.links.sendInvite(tx, person, organisation.name);
      } else {
        const mail = (url: string) => addedMail(person.name, organisation.name, url);
        this.links.tell(tx, person.email, mail, '/', `added:${person.id}:${organisation.id}:${createdMs}`);
      }
      this.note(tx, caller, 'member.invite', person.id, { role: input.role });
      return this.memberOf(tx, caller, person.id);
    });
  }

  /** Throws `not-found`, or `wrong-state` for the last manager. */
  changeRole(caller: Principal, personId: string, role: BodyOf<typeof routes.changeMember>['role']): Member {
    checkRole(caller, role);
    return write(this.db, (tx) => {
      const member = this.memberOf(tx, caller, personId);
      if (member.role !== role) this.keepAnother(tx, caller, member);
      this.organisations.changeRole(tx, caller.organisationId, personId, role);
      this.note(tx, caller, 'member.change-role', personId, { from: member.role, to: role });
      return this.memberOf(tx, caller, personId);
    });
  }

  /** Ends the person's sessions for this organisation. Throws `not-found`, or `wrong-state` for the last manager. */
  remove(caller: Principal, personId: string): { ok: true } {
    return write(this.db, (tx) => {
      const member = this.memberOf(tx, caller, personId);
      this.keepAnother(tx, caller, member);
      this.organisations.removeMember(tx, caller.organisationId, personId);
      const whose = { personId, organisationId: caller.organisationId };
      this.sessions.revokeOf(tx, whose, this.clock.nowMs(), 'removed from the organisation');
      this.note(tx, caller, 'member.remove', personId, { role: member.role });
      return { ok: true };
    });
  }

  /** Somebody must stay who can manage the organisation. */
  private keepAnother(tx: Db, caller: Principal, { personId, role }: Member): void {
    if (!can({ organisationKind: caller.organisationKind, role }, 'members.manage')) return;
    if (this.organisations.othersWithRole(tx, caller.organisationId, { personId, role }) > 0) return;
    throw new DomainError(
      'wrong-state',
      `This is the last ${role} who can sign in. Make another member ${role} first.`,
    );
  }

  private memberOf(db: Db, caller: Principal, personId: string): Member {
    const row = this.organisations.member(db, caller.organisationId, personId);
    if (!row) throw notFound('member');
    return memberView(row);
  }

  private note(tx: Db, caller: Principal, action: string, id: string, data: Record<string, unknown>): void {
    const kind = action.split('.')[0] === 'member' ? 'person' : 'organisation';
    this.audit.record(tx, { caller, action, subject: `${kind}:${id}`, data });
  }
}

const memberView = (row: MemberRow): Member => ({
  personId: row.personId,
  name: row.name,
  email: row.email,
  role: row.role,
  state: row.hasPassword ? 'active' : 'invited',
  lastSeenUtc: row.lastSeenMs === null ? null : new Date(row.lastSeenMs).toISOString(),
});

const organisationView = (row: OrganisationRow): Organisation => ({
  id: row.id,
  kind: row.kind,
  name: row.name,
  address: row.address,
  vatNumber: row.vatNumber,
  billingEmail: row.billingEmail,
  createdUtc: new Date(row.createdMs).toISOString(),
});

/** A role exists in some kinds of organisation only. */
function checkRole({ organisationKind }: Principal, role: Role): void {
  if (ROLES_OF_KIND[organisationKind].includes(role)) return;
  const detail = `Here the roles are ${ROLES_OF_KIND[organisationKind].join(', ')}.`;
  throw new DomainError('bad-input', detail, [{ pointer: '/role', detail }]);
}
