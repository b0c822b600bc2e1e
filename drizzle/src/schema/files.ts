/** Files by what they are and whose; their bytes lie beside the database, named by their digest. */
import { sql } from 'drizzle-orm';
import { check, index, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { organisations, people } from './accounts.js';
import { id, ms } from './columns.js';

export const files = sqliteTable(
  'files',
  {
    id: id(),
    organisationId: text('organisation_id')
      .notNull()
      .references(() => organisations.id),
    name: text('name').notNull(),
    mediaType: text('media_type')
      .$type<'application/pdf' | 'image/png' | 'image/jpeg' | 'text/csv' | 'text/plain'>()
      .notNull(),
    bytes: ms('bytes').notNull(),
    sha256: text('sha256').notNull(),
    createdBy: text('created_by')
      .notNull()
      .references(() => people.id),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    index('files_organisation').on(t.organisationId, t.createdMs),
    index('files_digest').on(t.sha256),
    check('files_size', sql`${t.bytes} > 0`),
    check('files_digest_form', sql`length(${t.sha256}) = 64 AND ${t.sha256} NOT GLOB '*[^0-9a-f]*'`),
    check(
      'files_media_type',
      sql`${t.mediaType} IN ('application/pdf','image/png','image/jpeg','text/csv','text/plain')`,
    ),
  ],
);

/** What a file is attached to. The kind names a feature, which alone knows who may see the subject. */
export const fileLinks = sqliteTable(
  'file_links',
  {
    fileId: text('file_id')
      .notNull()
      .references(() => files.id),
    subjectKind: text('subject_kind').notNull(),
    subjectId: text('subject_id').notNull(),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.fileId, t.subjectKind, t.subjectId] }),
    index('file_links_subject').on(t.subjectKind, t.subjectId),
  ],
);
