/**
 * A person's second factor: time-based codes (RFC 6238, six digits, steps of 30 s). A code is taken one step early or late
 * (section 5.2), once, and few wrong ones in a row are looked at.
 */
import { Inject, Injectable } from '@nestjs/common';
import { type SkyberthDatabase, secondFactors } from '@skyberth/drizzle';
import type { Principal } from '@skyberth/shared';
import { eq } from 'drizzle-orm';
import { generateSecret, generateURI, verifySync } from 'otplib';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError } from '../platform/domain-error.js';
import { type Db, write } from '../platform/transaction.js';
import { AttemptThrottle } from './attempt-throttle.js';
import { PasswordHasher } from './password-hasher.js';
import { PeopleRepository } from './people.repository.js';

const STEP_S = 30;

@Injectable()
export class SecondFactorService {
  private readonly attempts = new AttemptThrottle({ freeAttempts: 5, firstWaitMs: 60_000, longestWaitMs: 900_000 });

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly people: PeopleRepository,
    private readonly hasher: PasswordHasher,
    private readonly audit: AuditService,
  ) {}

  state(caller: Principal): { sinceUtc: string | null } {
    const confirmedMs = this.of(this.db, caller.personId)?.confirmedMs ?? null;
    return { sinceUtc: confirmedMs === null ? null : new Date(confirmedMs).toISOString() };
  }

  /** A new secret, shown once. Throws `wrong-state` where there is a factor already, `bad-input` for a wrong password. */
  async begin(caller: Principal, password: string): Promise<{ secret: string; uri: string }> {
    this.attempts.begin(caller.personId, this.clock.nowMs());
    const person = this.people.byId(this.db, caller.personId);
    if (!person || !(await this.hasher.matches(person.passwordHash, password))) {
      throw refused('/password', 'The password does not match.');
    }
    this.attempts.clear(caller.personId);
    const secret = generateSecret();
    write(this.db, (tx) => {
      if ((this.of(tx, caller.personId)?.confirmedMs ?? null) !== null) {
        throw new DomainError('wrong-state', 'You have a second factor already.');
      }
      const row = { personId: caller.personId, secret, confirmedMs: null, lastStep: 0 };
      tx.insert(secondFactors)
        .values(row)
        .onConflictDoUpdate({ target: secondFactors.personId, set: { secret, lastStep: 0 } })
        .run();
    });
    return { secret, uri: generateURI({ issuer: 'Skyberth', label: person.email, secret }) };
  }

  /** The first code shows that the person holds the secret. */
  confirm(caller: Principal, code: string): { ok: true } {
    this.attempts.begin(caller.personId, this.clock.nowMs());
    write(this.db, (tx) => {
      const factor = this.of(tx, caller.personId);
      if (!factor || factor.confirmedMs !== null) throw new DomainError('wrong-state', 'There is nothing to confirm.');
      this.take(tx, factor, code);
      const confirmedMs = this.clock.nowMs();
      tx.update(secondFactors).set({ confirmedMs }).where(eq(secondFactors.personId, caller.personId)).run();
      const subject = `person:${caller.personId}`;
      this.audit.record(tx, { caller, action: 'second-factor.confirm', subject });
    });
    this.attempts.clear(caller.personId);
    return { ok: true };
  }

  /**
   * Counts an attempt with a code; called before the transaction of the act, so that a refusal's rollback does not forgive it.
   * Throws `too-many`.
   */
  beginAct(caller: Principal): void {
    this.attempts.begin(caller.personId, this.clock.nowMs());
  }

  /** Takes a code in the transaction of the act that needs it; used up with it. Throws `wrong-state`, `bad-input`. */
  spend(tx: Db, caller: Principal, code: string): void {
    const factor = this.of(tx, caller.personId);
    if (!factor || factor.confirmedMs === null) {
      throw new DomainError('wrong-state', 'Set up your second factor first: open Security in the menu of your name.');
    }
    this.take(tx, factor, code);
    this.attempts.clear(caller.personId);
  }

  private take(tx: Db, factor: typeof secondFactors.$inferSelect, code: string): void {
    const result = verifySync({
      secret: factor.secret,
      token: code,
      epoch: Math.floor(this.clock.nowMs() / 1000),
      epochTolerance: STEP_S,
      ...(factor.lastStep > 0 ? { afterTimeStep: factor.lastStep } : {}),
    });
    if (!result.valid || !('timeStep' in result)) {
      throw refused('/code', 'The code does not match, or was used already. Wait for the next one.');
    }
    const lastStep = result.timeStep;
    tx.update(secondFactors).set({ lastStep }).where(eq(secondFactors.personId, factor.personId)).run();
  }

  private of(db: Db, personId: string): typeof secondFactors.$inferSelect | undefined {
    return db.select().from(secondFactors).where(eq(secondFactors.personId, personId)).get();
  }
}

const refused = (pointer: string, detail: string) => new DomainError('bad-input', detail, [{ pointer, detail }]);
