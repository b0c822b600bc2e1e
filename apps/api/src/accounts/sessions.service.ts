/**
 * Sign-in, and sessions whose refresh token changes with each use. A token used a second time means that two hold it,
 * so the whole family ends. Two tabs of one browser may send the same token at the same moment: for ten seconds after
 * its use a repeat is answered `in-progress` and is given nothing (the first answer has already put the new cookie into
 * the browser they share); later it ends the family. A thief gains nothing in those seconds, and is found out after them.
 */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { BodyOf, Principal, routes, Session } from '@skyberth/shared';
import { JobsService } from '../jobs/jobs.service.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Caller } from '../platform/contract.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId, newSecret, sha256 } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { AccessTokens } from './access-tokens.js';
import { AttemptThrottle } from './attempt-throttle.js';
import { PasswordHasher } from './password-hasher.js';
import { PeopleRepository } from './people.repository.js';
import { SessionsRepository } from './sessions.repository.js';

const DAY_MS = 86_400_000;
/** A session that is not used for so long ends. */
export const REFRESH_TOKEN_MS = 14 * DAY_MS;
/** However busy, a session asks for the password again after this. */
const FAMILY_MS = 90 * DAY_MS;
const SAME_MOMENT_MS = 10_000;

/** From where a session is opened: for throttling and for the list of sessions. */
export interface Device {
  readonly address: string;
  readonly userAgent: string;
}
export interface SessionTokens {
  readonly access: string;
  /** Null where the refresh token stays as it is. */
  readonly refresh: string | null;
}
export interface OpenSession {
  readonly session: Session;
  readonly tokens: SessionTokens;
}
type Rotation =
  | { readonly kind: 'rotated'; readonly personId: string; readonly familyId: string; readonly refresh: string }
  | { readonly kind: 'same moment' | 'ended' };

@Injectable()
export class SessionsService implements OnModuleInit {
  private readonly perAccount = new AttemptThrottle({ freeAttempts: 8, firstWaitMs: 15_000, longestWaitMs: 900_000 });
  private readonly perAddress = new AttemptThrottle({ freeAttempts: 60, firstWaitMs: 15_000, longestWaitMs: 300_000 });

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly people: PeopleRepository,
    private readonly sessions: SessionsRepository,
    private readonly hasher: PasswordHasher,
    private readonly accessTokens: AccessTokens,
    private readonly audit: AuditService,
    private readonly jobs: JobsService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('forget ended sessions', DAY_MS / 4, () =>
      this.sessions.forgetTokens(this.clock.nowMs() - 30 * DAY_MS),
    );
  }

  /** Throws `wrong-credentials`, `too-many`, or `not-allowed` for a person whom every organisation has removed. */
  async signIn(input: BodyOf<typeof routes.signIn>, device: Device): Promise<OpenSession> {
    const account = `${device.address} ${input.email}`;
    this.perAccount.begin(account, this.clock.nowMs());
    this.perAddress.begin(device.address, this.clock.nowMs());
    const person = this.people.byEmail(this.db, input.email);
    if (!(await this.hasher.matches(person?.passwordHash ?? null, input.password)) || !person) {
      throw new DomainError(
        'wrong-credentials',
        'E-mail and password do not match. Check both, or set a new password.',
      );
    }
    this.perAccount.clear(account);
    this.perAddress.giveBack(device.address);
    return write(this.db, (tx) => this.open(tx, person.id, null, device));
  }

  /** Opens a new family; called in the transaction that signs somebody in. */
  open(tx: Db, personId: string, organisationId: string | null, device: Device): OpenSession {
    const memberships = this.people.membershipsOf(tx, personId);
    const wanted = organisationId ?? this.sessions.lastOrganisationOf(tx, personId);
    const active = memberships.find((each) => each.organisationId === wanted) ?? memberships[0];
    if (!active) {
      throw new DomainError(
        'not-allowed',
        'You belong to no organisation any more. Ask a manager to invite you again.',
      );
    }
    const nowMs = this.clock.nowMs();
    const familyId = newId();
    this.sessions.addFamily(tx, {
      id: familyId,
      personId,
      organisationId: active.organisationId,
      userAgent: device.userAgent.slice(0, 300),
      createdMs: nowMs,
      lastUsedMs: nowMs,
    });
    this.people.touch(tx, personId, nowMs);
    this.audit.record(tx, {
      caller: { personId, organisationId: active.organisationId },
      action: 'session.open',
      subject: `session:${familyId}`,
    });
    const refresh = this.addToken(tx, familyId, nowMs, nowMs + FAMILY_MS);
    return this.answer(tx, personId, active.organisationId, {
      access: this.accessTokens.issue(personId, familyId),
      refresh,
    });
  }

  /** Throws `session-ended`, or `in-progress` where another tab has just renewed the same session. */
  refresh(token: string | null): OpenSession {
    const hash = token === null ? '' : sha256(token);
    const rotation = write(this.db, (tx) => this.rotate(tx, hash));
    if (rotation.kind === 'same moment') {
      throw new DomainError('in-progress', 'Another window has just renewed this session. Send the request again.');
    }
    const principal = rotation.kind === 'rotated' && this.sessions.principalOf(rotation.familyId, rotation.personId);
    if (rotation.kind !== 'rotated' || !principal) {
      throw new DomainError('session-ended', 'The session has ended. Sign in again.');
    }
    return this.answer(this.db, principal.personId, principal.organisationId, {
      access: this.accessTokens.issue(principal.personId, principal.familyId),
      refresh: rotation.refresh,
    });
  }

  /** Refusals are returned, not thrown: a family that must end would come back to life with the rollback. */
  private rotate(tx: Db, hash: string): Rotation {
    const found = this.sessions.findToken(tx, hash);
    const nowMs = this.clock.nowMs();
    if (!found || found.family.revokedMs !== null) return { kind: 'ended' };
    const { token, family } = found;
    if (token.usedMs !== null) {
      if (nowMs - token.usedMs < SAME_MOMENT_MS) return { kind: 'same moment' };
      this.end(tx, family, 'refresh token used twice');
      return { kind: 'ended' };
    }
    if (token.expiresMs <= nowMs) return { kind: 'ended' };
    this.sessions.markUsed(tx, hash, nowMs);
    this.sessions.touchFamily(tx, family.id, { lastUsedMs: nowMs });
    this.people.touch(tx, family.personId, nowMs);
    const refresh = this.addToken(tx, family.id, nowMs, family.createdMs + FAMILY_MS);
    return { kind: 'rotated', personId: family.personId, familyId: family.id, refresh };
  }

  /** Ends the session of the refresh token or of the caller; signing out twice is fine. */
  signOut(token: string | null, familyId: string | null): { ok: true } {
    write(this.db, (tx) => {
      const family = token === null ? undefined : this.sessions.findToken(tx, sha256(token))?.family;
      const id = family?.id ?? familyId;
      if (id !== null) this.sessions.revokeFamily(tx, id, this.clock.nowMs(), 'signed out');
    });
    return { ok: true };
  }

  current(caller: Principal): Session {
    return this.view(this.db, caller.personId, caller.organisationId);
  }

  /** Throws `not-found` for an organisation of which the caller is no member. */
  switchTo({ personId, familyId }: Caller, organisationId: string): OpenSession {
    if (familyId === null) throw new Error('Only a session acts for another organisation.');
    return write(this.db, (tx) => {
      const memberships = this.people.membershipsOf(tx, personId);
      if (!memberships.some((each) => each.organisationId === organisationId)) throw notFound('organisation');
      this.sessions.touchFamily(tx, familyId, { lastUsedMs: this.clock.nowMs(), organisationId });
      return this.answer(tx, personId, organisationId, {
        access: this.accessTokens.issue(personId, familyId),
        refresh: null,
      });
    });
  }

  private end(tx: Db, family: { id: string; personId: string; organisationId: string }, reason: string): void {
    this.sessions.revokeFamily(tx, family.id, this.clock.nowMs(), reason);
    this.audit.record(tx, { caller: family, action: 'session.end', subject: `session:${family.id}`, data: { reason } });
  }

  private addToken(tx: Db, familyId: string, issuedMs: number, familyEndsMs: number): string {
    const secret = newSecret();
    const expiresMs = Math.min(issuedMs + REFRESH_TOKEN_MS, familyEndsMs);
    this.sessions.addToken(tx, { hash: sha256(secret), familyId, issuedMs, expiresMs });
    return secret;
  }

  private answer(db: Db, personId: string, organisationId: string, tokens: SessionTokens): OpenSession {
    return { session: this.view(db, personId, organisationId), tokens };
  }

  private view(db: Db, personId: string, organisationId: string): Session {
    const person = this.people.byId(db, personId);
    const memberships = this.people.membershipsOf(db, personId);
    const active = memberships.find((each) => each.organisationId === organisationId);
    if (!person || !active) throw new DomainError('session-ended', 'The session has ended. Sign in again.');
    return {
      person: {
        id: person.id,
        name: person.name,
        email: person.email,
        emailVerified: person.emailVerifiedMs !== null,
      },
      active,
      memberships,
      serverTimeUtc: new Date(this.clock.nowMs()).toISOString(),
    };
  }
}
