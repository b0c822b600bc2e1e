/** Becoming a member, proving an address, and coming back after a forgotten password. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { BodyOf, routes } from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { write } from '../platform/transaction.js';
import { passwordChangedMail } from './account-mails.js';
import { AttemptThrottle } from './attempt-throttle.js';
import { MailedLinksService } from './mailed-links.service.js';
import { OrganisationsRepository } from './organisations.repository.js';
import { PasswordHasher } from './password-hasher.js';
import { PeopleRepository } from './people.repository.js';
import { SessionsRepository } from './sessions.repository.js';
import { type Device, type OpenSession, SessionsService } from './sessions.service.js';
import { usableVatNumber } from './vat-number.js';

const DONE = { ok: true } as const;

@Injectable()
export class SignUpService {
  private readonly signUps = new AttemptThrottle({ freeAttempts: 60, firstWaitMs: 60_000, longestWaitMs: 600_000 });
  private readonly resets = new AttemptThrottle({ freeAttempts: 5, firstWaitMs: 60_000, longestWaitMs: 900_000 });

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly people: PeopleRepository,
    private readonly organisations: OrganisationsRepository,
    private readonly sessionRows: SessionsRepository,
    private readonly sessions: SessionsService,
    private readonly links: MailedLinksService,
    private readonly hasher: PasswordHasher,
    private readonly audit: AuditService,
  ) {}

  /** Throws `already-exists` for an address or a name that is taken, `bad-input` for an impossible VAT number. */
  async signUp(input: BodyOf<typeof routes.signUp>, device: Device): Promise<OpenSession> {
    this.signUps.begin(device.address, this.clock.nowMs());
    const vatNumber = usableVatNumber(input.organisation.vatNumber, '/organisation/vatNumber');
    const passwordHash = await this.hasher.hash(input.password);
    return write(this.db, (tx) => {
      if (this.people.byEmail(tx, input.email)) throw taken('/email', EMAIL_TAKEN);
      if (this.organisations.byName(tx, input.organisation.name)) throw taken('/organisation/name', NAME_TAKEN);
      const createdMs = this.clock.nowMs();
      const person = { id: newId(), name: input.name, email: input.email, passwordHash, createdMs };
      const organisation = { ...input.organisation, id: newId(), vatNumber, billingEmail: input.email, createdMs };
      this.people.add(tx, person);
      this.organisations.add(tx, organisation);
      this.organisations.addMember(tx, {
        personId: person.id,
        organisationId: organisation.id,
        role: 'manager',
        createdMs,
      });
      this.audit.record(tx, {
        caller: { personId: person.id, organisationId: organisation.id },
        action: 'organisation.create',
        subject: `organisation:${organisation.id}`,
        data: { name: organisation.name, kind: organisation.kind },
      });
      this.links.sendVerify(tx, person);
      return this.sessions.open(tx, person.id, organisation.id, device);
    });
  }

  /** Throws `not-found` for a link that does not work any more. */
  verifyEmail(token: string): typeof DONE {
    return write(this.db, (tx) => {
      const person = this.links.follow(tx, token, ['verify']);
      this.people.change(tx, person.id, { emailVerifiedMs: this.clock.nowMs() });
      return DONE;
    });
  }

  /** Answers the same whether the address is known or not. Throws `too-many`. */
  requestReset(email: string, device: Device): typeof DONE {
    this.resets.begin(`${device.address} ${email}`, this.clock.nowMs());
    return write(this.db, (tx) => {
      const person = this.people.byEmail(tx, email);
      if (person) this.links.sendReset(tx, person);
      return DONE;
    });
  }

  /** Ends every session and every other link: whoever else had got in is out. Throws `not-found`. */
  async setPassword(token: string, password: string): Promise<typeof DONE> {
    const passwordHash = await this.hasher.hash(password);
    return write(this.db, (tx) => {
      const person = this.links.follow(tx, token, ['reset', 'invite']);
      const nowMs = this.clock.nowMs();
      this.people.change(tx, person.id, { passwordHash, emailVerifiedMs: person.emailVerifiedMs ?? nowMs });
      this.people.useAllMailedTokens(tx, person.id, nowMs);
      this.sessionRows.revokeOf(tx, { personId: person.id }, nowMs, 'password set');
      this.audit.record(tx, {
        caller: { personId: person.id, organisationId: '' },
        action: 'password.set',
        subject: `person:${person.id}`,
      });
      const mail = (url: string) => passwordChangedMail(person.name, url);
      if (person.passwordHash !== null) {
        this.links.tell(tx, person.email, mail, '/forgotten-password', `password:${person.id}:${nowMs}`);
      }
      return DONE;
    });
  }
}

const EMAIL_TAKEN =
  'There is an account with this e-mail address. Sign in, or set a new password if you have forgotten it.';
const NAME_TAKEN = 'An organisation of this name exists already. Ask one of its managers to invite you.';

const taken = (pointer: string, detail: string): DomainError =>
  new DomainError('already-exists', detail, [{ pointer, detail }]);
