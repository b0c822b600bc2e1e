/** Standing of organisations, and the audit trail read and checked. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { AccountSummary, AccountView, AuditCheck, Principal, QueryOf, ResponseOf, routes } from '@skyberth/shared';
import { OrganisationsRepository } from '../accounts/organisations.repository.js';
import { MailService } from '../mail/mail.service.js';
import { AuditService, auditHash } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { type Db, write } from '../platform/transaction.js';
import { type AccountRow, OversightRepository } from './oversight.repository.js';
import { standingMail } from './standing-mails.js';

const CHECKED_AT_ONCE = 2_000;
const utc = (timeMs: number): string => new Date(timeMs).toISOString();
const utcOrNull = (timeMs: number | null): string | null => (timeMs === null ? null : utc(timeMs));

@Injectable()
export class OversightService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
    private readonly repository: OversightRepository,
    private readonly organisations: OrganisationsRepository,
    private readonly audit: AuditService,
    private readonly mail: MailService,
  ) {}

  accounts(query: QueryOf<typeof routes.listAccounts>): ResponseOf<typeof routes.listAccounts> {
    const { rows, total } = this.repository.accounts(query);
    return { items: rows.map(summaryOf), total, page: query.page, pageSize: query.pageSize };
  }

  account(id: string): AccountView {
    const row = this.repository.account(id);
    if (!row) throw notFound('organisation');
    const people = this.repository
      .peopleOf(id)
      .map(({ lastSeenMs, ...person }) => ({ ...person, lastSeenUtc: utcOrNull(lastSeenMs) }));
    return { ...summaryOf(row), billingEmail: row.billingEmail, vatNumber: row.vatNumber, people };
  }

  suspend(caller: Principal, id: string, reason: string): { ok: true } {
    return write(this.db, (tx) => {
      const row = this.found(tx, id);
      if (row.kind === 'staff') throw new DomainError('not-allowed', 'The marketplace cannot suspend itself.');
      if (row.suspendedMs !== null) throw new DomainError('wrong-state', `${row.name} is suspended already.`);
      const suspendedMs = this.clock.nowMs();
      this.repository.suspend(tx, { organisationId: id, reason, suspendedBy: caller.personId, suspendedMs });
      this.tell(tx, caller, row, 'suspend', reason);
      return { ok: true };
    });
  }

  reinstate(caller: Principal, id: string, reason: string): { ok: true } {
    return write(this.db, (tx) => {
      const row = this.found(tx, id);
      if (row.suspendedMs === null) throw new DomainError('wrong-state', `${row.name} is not suspended.`);
      this.repository.reinstate(tx, id);
      this.tell(tx, caller, row, 'reinstate', reason);
      return { ok: true };
    });
  }

  auditRows(query: QueryOf<typeof routes.listAudit>): ResponseOf<typeof routes.listAudit> {
    const items = this.repository.audit(query).map(({ row, personName, organisationName }) => ({
      seq: row.seq,
      atUtc: utc(row.atMs),
      personName,
      organisationName,
      action: row.action,
      subject: row.subject,
      data: row.data,
    }));
    return { items, nextBeforeSeq: items.length < query.pageSize ? null : (items.at(-1)?.seq ?? null) };
  }

  /** Walks the whole chain, a piece at a time so that others are answered meanwhile. */
  async checkAudit(): Promise<AuditCheck> {
    let [seq, hash] = [0, ''];
    for (;;) {
      const rows = this.repository.auditAfter(seq, CHECKED_AT_ONCE);
      if (rows.length === 0) return { rows: seq, intact: true, brokenSeq: null };
      for (const { hash: given, ...row } of rows) {
        const follows = row.seq === seq + 1 && row.previousHash === hash && auditHash(row) === given;
        if (!follows) return { rows: seq, intact: false, brokenSeq: row.seq };
        [seq, hash] = [row.seq, given];
      }
      await new Promise((resolve) => setImmediate(resolve));
    }
  }

  private found(tx: Db, id: string): AccountRow {
    const row = this.repository.account(id, tx);
    if (!row) throw notFound('organisation');
    return row;
  }

  private tell(tx: Db, caller: Principal, row: AccountRow, what: 'suspend' | 'reinstate', reason: string): void {
    const action = `organisation.${what}`;
    this.audit.record(tx, { caller, action, subject: `organisation:${row.id}`, data: { reason } });
    const mail = standingMail(row.name, what, reason, this.config.publicUrl);
    for (const email of this.organisations.managerEmails(tx, row.id)) {
      this.mail.queue(tx, { to: email, ...mail, dedupeKey: `${action}:${row.id}:${this.clock.nowMs()}:${email}` });
    }
  }
}

function summaryOf(row: AccountRow): AccountSummary {
  const { id, kind, name, country, members, openBookings } = row;
  return {
    id,
    kind,
    name,
    country,
    members,
    openBookings,
    createdUtc: utc(row.createdMs),
    lastSeenUtc: utcOrNull(row.lastSeenMs),
    suspended:
      row.suspendedMs === null
        ? null
        : { reason: row.reason ?? '', sinceUtc: utc(row.suspendedMs), byName: row.suspendedByName ?? '' },
  };
}
