/** Files and what they are attached to, in the database. */
import { Injectable } from '@nestjs/common';
import { fileLinks, files, people } from '@skyberth/drizzle';
import { and, asc, count, eq, inArray, lt, notExists, sql, sum } from 'drizzle-orm';
import type { Db } from '../platform/transaction.js';

export type FileRow = typeof files.$inferSelect;
export type NamedFile = FileRow & { readonly uploadedByName: string };
export type FileLink = typeof fileLinks.$inferSelect;

const COLUMNS = {
  id: files.id,
  organisationId: files.organisationId,
  name: files.name,
  mediaType: files.mediaType,
  bytes: files.bytes,
  sha256: files.sha256,
  createdBy: files.createdBy,
  createdMs: files.createdMs,
  uploadedByName: people.name,
};
const MOST_SWEPT = 200;

@Injectable()
export class FilesRepository {
  find(db: Db, id: string): NamedFile | undefined {
    return db
      .select(COLUMNS)
      .from(files)
      .innerJoin(people, eq(people.id, files.createdBy))
      .where(eq(files.id, id))
      .get();
  }

  add(tx: Db, row: FileRow): void {
    tx.insert(files).values(row).run();
  }

  /** What an organisation keeps, in bytes; the same content counts once for each upload. */
  bytesOf(tx: Db, organisationId: string): number {
    const row = tx
      .select({ bytes: sum(files.bytes) })
      .from(files)
      .where(eq(files.organisationId, organisationId))
      .get();
    return Number(row?.bytes ?? 0);
  }

  links(db: Db, fileId: string): FileLink[] {
    return db.select().from(fileLinks).where(eq(fileLinks.fileId, fileId)).all();
  }

  countOf(tx: Db, subjectKind: string, subjectId: string): number {
    const mine = and(eq(fileLinks.subjectKind, subjectKind), eq(fileLinks.subjectId, subjectId));
    return tx.select({ files: count() }).from(fileLinks).where(mine).get()?.files ?? 0;
  }

  link(tx: Db, row: FileLink): void {
    tx.insert(fileLinks).values(row).onConflictDoNothing().run();
  }

  /** Files of these subjects, oldest first. */
  ofSubjects(db: Db, subjectKind: string, subjectIds: readonly string[]): (NamedFile & { subjectId: string })[] {
    if (subjectIds.length === 0) return [];
    return db
      .select({ ...COLUMNS, subjectId: fileLinks.subjectId })
      .from(fileLinks)
      .innerJoin(files, eq(files.id, fileLinks.fileId))
      .innerJoin(people, eq(people.id, files.createdBy))
      .where(and(eq(fileLinks.subjectKind, subjectKind), inArray(fileLinks.subjectId, [...subjectIds])))
      .orderBy(asc(fileLinks.createdMs), asc(files.id))
      .all();
  }

  /** Uploads from before `beforeMs` that nothing holds. */
  unlinked(tx: Db, beforeMs: number): FileRow[] {
    const held = tx.select({ one: sql`1` }).from(fileLinks).where(eq(fileLinks.fileId, files.id));
    return tx
      .select()
      .from(files)
      .where(and(lt(files.createdMs, beforeMs), notExists(held)))
      .limit(MOST_SWEPT)
      .all();
  }

  /** Deletes the row; answers whether another row still names the same bytes. */
  remove(tx: Db, file: FileRow): { readonly bytesStillNamed: boolean } {
    tx.delete(files).where(eq(files.id, file.id)).run();
    const other = tx.select({ id: files.id }).from(files).where(eq(files.sha256, file.sha256)).limit(1).get();
    return { bytesStillNamed: other !== undefined };
  }
}
