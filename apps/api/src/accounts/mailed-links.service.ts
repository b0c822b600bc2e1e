/** Links that prove who reads a mailbox: stored as hashes, used once, short-lived. */
import { Inject, Injectable } from '@nestjs/common';
import { MailService } from '../mail/mail.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DomainError } from '../platform/domain-error.js';
import { newSecret, sha256 } from '../platform/ids.js';
import type { Db } from '../platform/transaction.js';
import { type AccountMail, inviteMail, resetMail, verifyMail } from './account-mails.js';
import { type MailedToken, PeopleRepository, type Person } from './people.repository.js';

const HOUR_MS = 3_600_000;
const LIVES_MS: Readonly<Record<MailedToken['purpose'], number>> = {
  verify: 72 * HOUR_MS,
  reset: HOUR_MS,
  invite: 168 * HOUR_MS,
};

type Recipient = Pick<Person, 'id' | 'name' | 'email'>;

@Injectable()
export class MailedLinksService {
  constructor(
    private readonly people: PeopleRepository,
    private readonly mail: MailService,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  sendVerify(tx: Db, person: Recipient): void {
    const { url, hash } = this.link(tx, person.id, 'verify', '/verify-email');
    this.send(tx, person.email, verifyMail(person.name, url), hash);
  }

  sendReset(tx: Db, person: Recipient): void {
    const { url, hash } = this.link(tx, person.id, 'reset', '/set-password');
    this.send(tx, person.email, resetMail(person.name, url), hash);
  }

  sendInvite(tx: Db, person: Recipient, organisationName: string): void {
    const { url, hash } = this.link(tx, person.id, 'invite', '/set-password');
    this.send(tx, person.email, inviteMail(person.name, organisationName, url), hash);
  }

  /** A mail without a link of its own; `cause` keeps it from being sent twice. */
  tell(tx: Db, email: string, mail: (url: string) => AccountMail, path: string, cause: string): void {
    this.send(tx, email, mail(`${this.config.publicUrl}${path}`), cause);
  }

  /** Uses a link up and says whose it was. Throws `not-found` for one that is unknown, used, or too old. */
  follow(tx: Db, secret: string, purposes: readonly MailedToken['purpose'][]): Person {
    const hash = sha256(secret);
    const token = this.people.findMailedToken(tx, hash);
    const nowMs = this.clock.nowMs();
    const alive = token && token.usedMs === null && token.expiresMs > nowMs && purposes.includes(token.purpose);
    const person = alive ? this.people.byId(tx, token.personId) : undefined;
    if (!person) throw new DomainError('not-found', 'This link has been used or is too old. Ask for a new one.');
    this.people.useMailedToken(tx, hash, nowMs);
    return person;
  }

  private link(tx: Db, personId: string, purpose: MailedToken['purpose'], path: string) {
    const secret = newSecret();
    const hash = sha256(secret);
    this.people.addMailedToken(tx, { hash, purpose, personId, expiresMs: this.clock.nowMs() + LIVES_MS[purpose] });
    return { hash, url: `${this.config.publicUrl}${path}?token=${secret}` };
  }

  private send(tx: Db, to: string, mail: AccountMail, cause: string): void {
    this.mail.queue(tx, { to, subject: mail.subject, text: mail.text, html: mail.html, dedupeKey: `account:${cause}` });
  }
}
