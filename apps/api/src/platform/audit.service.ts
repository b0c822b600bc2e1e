/** The audit trail: appended in the same transaction as the change, each row chained to the one before by its hash. */
import { Inject, Injectable } from '@nestjs/common';
import { auditLog } from '@skyberth/drizzle';
import type { Principal } from '@skyberth/shared';
import { desc } from 'drizzle-orm';
import { CLOCK, type ClockPort } from './clock.js';
import type { Caller } from './contract.js';
import { sha256 } from './ids.js';
import type { Db } from './transaction.js';

export interface AuditEntry {
  readonly caller: (Pick<Principal, 'personId' | 'organisationId'> & Pick<Caller, 'apiKey'>) | null;
  /** A verb and its object, such as `station.approve`. */
  readonly action: string;
  /** What it was done to, such as `station:<id>`. */
  readonly subject: string;
  readonly data?: Readonly<Record<string, unknown>>;
}

@Injectable()
export class AuditService {
  constructor(@Inject(CLOCK) private readonly clock: ClockPort) {}

  /** Must be called inside the write transaction of what it records. */
  record(tx: Db, entry: AuditEntry): void {
    const last = tx
      .select({ seq: auditLog.seq, hash: auditLog.hash })
      .from(auditLog)
      .orderBy(desc(auditLog.seq))
      .limit(1)
      .get();
    const apiKey = entry.caller?.apiKey;
    const row = {
      seq: (last?.seq ?? 0) + 1,
      atMs: this.clock.nowMs(),
      personId: entry.caller?.personId ?? null,
      organisationId: entry.caller?.organisationId ?? null,
      action: entry.action,
      subject: entry.subject,
      data: JSON.stringify({ ...entry.data, ...(apiKey ? { apiKeyId: apiKey.id } : {}) }),
      previousHash: last?.hash ?? '',
    };
    tx.insert(auditLog)
      .values({ ...row, hash: auditHash(row) })
      .run();
  }
}

type Unhashed = Omit<typeof auditLog.$inferSelect, 'hash'>;

/** The hash that chains a row: over its own content and the hash before it. */
export const auditHash = (row: Unhashed): string =>
  sha256(
    JSON.stringify([
      row.seq,
      row.atMs,
      row.personId,
      row.organisationId,
      row.action,
      row.subject,
      row.data,
      row.previousHash,
    ]),
  );
