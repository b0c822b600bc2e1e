/** Taking files in, attaching them, and giving them out to those who may see them. */
import { createHash } from 'node:crypto';
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { type AttachedFile, FILE_LIMITS, type Principal } from '@skyberth/shared';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { FileAccess } from './file-access.js';
import { safeName, sniff } from './file-kind.js';
import { FILE_STORE, type FileStorePort } from './file-store.port.js';
import { FilesRepository, type NamedFile } from './files.repository.js';

const SWEEP_EVERY_MS = 15 * 60_000;
/** Long enough to finish a form after lunch, and to attach again after a failed attempt. */
export const UNLINKED_KEPT_MS = 24 * 3_600_000;

export interface Attachment {
  readonly caller: Pick<Principal, 'organisationId'>;
  /** Registered with `FileAccess`. */
  readonly subjectKind: string;
  readonly subjectId: string;
  readonly fileIds: readonly string[];
}

@Injectable()
export class FilesService implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(FILE_STORE) private readonly store: FileStorePort,
    private readonly repository: FilesRepository,
    private readonly access: FileAccess,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('unattached files', SWEEP_EVERY_MS, () => this.sweep());
  }

  /** Throws `file-refused` for a kind that is not taken, `too-large` where the organisation's room is used up. */
  async upload(caller: Principal, givenName: string, bytes: Uint8Array): Promise<AttachedFile> {
    const mediaType = sniff(bytes, givenName);
    if (mediaType === null) {
      throw new DomainError(
        'file-refused',
        'Only PDF, PNG, JPEG, CSV and plain text in UTF-8 are taken, and this file is none of them by its content.',
      );
    }
    const sha256 = createHash('sha256').update(bytes).digest('hex');
    const file = {
      id: newId(),
      organisationId: caller.organisationId,
      name: safeName(givenName, mediaType),
      mediaType,
      bytes: bytes.byteLength,
      sha256,
      createdBy: caller.personId,
      createdMs: this.clock.nowMs(),
    };
    this.refuseOverQuota(this.db, caller.organisationId, bytes.byteLength);
    await this.store.put(sha256, bytes);
    const kept = write(this.db, (tx) => {
      this.refuseOverQuota(tx, caller.organisationId, bytes.byteLength);
      this.repository.add(tx, file);
      return this.repository.find(tx, file.id);
    });
    // The sweep may have removed the same bytes of an older upload between the two steps above.
    await this.store.put(sha256, bytes);
    if (!kept) throw new Error('The file was not kept.');
    return fileView(kept);
  }

  /** Throws `not-found` for a file that the caller may not see, as for one that does not exist. */
  async download(caller: Principal, id: string): Promise<{ readonly file: NamedFile; readonly bytes: Buffer }> {
    const file = this.repository.find(this.db, id);
    if (!file || !this.mayRead(caller, file)) throw notFound('file');
    const bytes = await this.store.get(file.sha256);
    const intact = bytes !== null && createHash('sha256').update(bytes).digest('hex') === file.sha256;
    if (!intact) throw new DomainError('unavailable', `${file.name} cannot be read just now. Tell the marketplace.`);
    return { file, bytes };
  }

  /**
   * Attaches uploads of the caller's own organisation, in the transaction that makes their subject. Throws `not-found`
   * for any other file, `too-large` beyond the files that one subject takes.
   */
  link(tx: Db, { caller, subjectKind, subjectId, fileIds }: Attachment): void {
    if (!this.access.knows(subjectKind)) throw new Error(`Nobody registered who may read files of ${subjectKind}.`);
    for (const fileId of fileIds) {
      const file = this.repository.find(tx, fileId);
      if (file?.organisationId !== caller.organisationId) throw notFound('file');
      this.repository.link(tx, { fileId, subjectKind, subjectId, createdMs: this.clock.nowMs() });
    }
    if (this.repository.countOf(tx, subjectKind, subjectId) > FILE_LIMITS.perSubject) {
      throw new DomainError('too-large', `At most ${FILE_LIMITS.perSubject} files can be attached here.`);
    }
  }

  /** Files by subject, oldest first. Only for subjects that the caller of the API was found to see. */
  of(subjectKind: string, subjectIds: readonly string[], db: Db = this.db): Map<string, AttachedFile[]> {
    const found = new Map<string, AttachedFile[]>(subjectIds.map((id) => [id, []]));
    for (const row of this.repository.ofSubjects(db, subjectKind, subjectIds)) {
      found.get(row.subjectId)?.push(fileView(row));
    }
    return found;
  }

  /** Deletes what was uploaded and never attached. */
  sweep(): void {
    const beforeMs = this.clock.nowMs() - UNLINKED_KEPT_MS;
    for (const { id } of this.repository.unlinked(this.db, beforeMs)) {
      write(this.db, (tx) => {
        const file = this.repository.find(tx, id);
        if (!file || this.repository.links(tx, id).length > 0) return;
        const { bytesStillNamed } = this.repository.remove(tx, file);
        // Under the write lock: an upload of the same bytes then either has its row already or puts them anew.
        if (!bytesStillNamed) this.store.remove(file.sha256);
      });
    }
  }

  private mayRead(caller: Principal, file: NamedFile): boolean {
    if (file.organisationId === caller.organisationId) return true;
    return this.repository.links(this.db, file.id).some((link) => this.access.mayRead(caller, link));
  }

  private refuseOverQuota(db: Db, organisationId: string, bytes: number): void {
    const used = this.repository.bytesOf(db, organisationId);
    if (used + bytes <= FILE_LIMITS.organisationBytes) return;
    throw new DomainError(
      'too-large',
      `Your organisation may keep ${FILE_LIMITS.organisationBytes / 1e6} MB of files and has ${(used / 1e6).toFixed(1)} MB.`,
    );
  }
}

const fileView = (file: NamedFile): AttachedFile => ({
  id: file.id,
  name: file.name,
  mediaType: file.mediaType,
  bytes: file.bytes,
  uploadedUtc: new Date(file.createdMs).toISOString(),
  uploadedByName: file.uploadedByName,
});
