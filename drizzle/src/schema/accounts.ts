/** People, organisations, memberships, sessions and mailed tokens. */
import type { OrganisationKind, PostalAddress, Role } from '@skyberth/shared';
import { sql } from 'drizzle-orm';
import { check, index, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { id, json, ms } from './columns.js';

export const organisations = sqliteTable(
  'organisations',
  {
    id: id(),
    kind: text('kind').$type<OrganisationKind>().notNull(),
    name: text('name').notNull(),
    address: json<PostalAddress>('address').notNull(),
    vatNumber: text('vat_number'),
    billingEmail: text('billing_email').notNull(),
    /** Customer (operators) or connected account (owners) at the payment provider. */
    providerCustomerId: text('provider_customer_id').unique(),
    providerAccountId: text('provider_account_id').unique(),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    check('organisations_kind', sql`${t.kind} IN ('operator','owner','staff')`),
    uniqueIndex('organisations_name').on(sql`lower(${t.name})`),
  ],
);

export const people = sqliteTable(
  'people',
  {
    id: id(),
    name: text('name').notNull(),
    email: text('email').notNull(),
    /** argon2id; null until an invited person sets one. */
    passwordHash: text('password_hash'),
    emailVerifiedMs: ms('email_verified_ms'),
    lastSeenMs: ms('last_seen_ms'),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [uniqueIndex('people_email').on(t.email), check('people_email_lower', sql`${t.email} = lower(${t.email})`)],
);

export const memberships = sqliteTable(
  'memberships',
  {
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    organisationId: text('organisation_id')
      .notNull()
      .references(() => organisations.id),
    role: text('role').$type<Role>().notNull(),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.personId, t.organisationId] }),
    index('memberships_organisation').on(t.organisationId),
    check('memberships_role', sql`${t.role} IN ('manager','member','viewer','finance','admin')`),
  ],
);

/** One sign-in on one device; its refresh tokens follow each other, and a second use of any ends them all. */
export const sessionFamilies = sqliteTable(
  'session_families',
  {
    id: id(),
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    organisationId: text('organisation_id')
      .notNull()
      .references(() => organisations.id),
    userAgent: text('user_agent').notNull(),
    createdMs: ms('created_ms').notNull(),
    lastUsedMs: ms('last_used_ms').notNull(),
    revokedMs: ms('revoked_ms'),
    revokedReason: text('revoked_reason'),
  },
  (t) => [index('session_families_person').on(t.personId)],
);

export const refreshTokens = sqliteTable('refresh_tokens', {
  /** SHA-256 of the token, hexadecimal. */
  hash: text('hash').primaryKey(),
  familyId: text('family_id')
    .notNull()
    .references(() => sessionFamilies.id),
  issuedMs: ms('issued_ms').notNull(),
  expiresMs: ms('expires_ms').notNull(),
  usedMs: ms('used_ms'),
});

/** E-mail verification, password reset and invitation links. Stored hashed, used once. */
export const mailedTokens = sqliteTable(
  'mailed_tokens',
  {
    hash: text('hash').primaryKey(),
    purpose: text('purpose').$type<'verify' | 'reset' | 'invite'>().notNull(),
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    expiresMs: ms('expires_ms').notNull(),
    usedMs: ms('used_ms'),
  },
  (t) => [check('mailed_tokens_purpose', sql`${t.purpose} IN ('verify','reset','invite')`)],
);

/** The first answer to a write, kept so that a repeat gets the same one. */
export const idempotencyKeys = sqliteTable(
  'idempotency_keys',
  {
    /** The person, or 'public'. */
    caller: text('caller').notNull(),
    key: text('key').notNull(),
    route: text('route').notNull(),
    inputHash: text('input_hash').notNull(),
    status: ms('status'),
    answer: text('answer'),
    createdMs: ms('created_ms').notNull(),
  },
  (t) => [primaryKey({ columns: [t.caller, t.key] }), index('idempotency_keys_age').on(t.createdMs)],
);

/** What was done, by whom; rows are chained by hash and can't be changed (triggers). */
export const auditLog = sqliteTable(
  'audit_log',
  {
    seq: ms('seq').primaryKey(),
    atMs: ms('at_ms').notNull(),
    personId: text('person_id'),
    organisationId: text('organisation_id'),
    action: text('action').notNull(),
    subject: text('subject').notNull(),
    data: text('data').notNull(),
    previousHash: text('previous_hash').notNull(),
    hash: text('hash').notNull().unique(),
  },
  (t) => [index('audit_log_subject').on(t.subject)],
);
