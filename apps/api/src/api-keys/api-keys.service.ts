/** Managers make and revoke the API keys of their organisation. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import {
  API_KEY_PREFIX,
  type ApiKey,
  type ApiKeyState,
  type BodyOf,
  can,
  MOST_API_KEYS,
  type Principal,
  type ResponseOf,
  type routes,
} from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId, newSecret, sha256 } from '../platform/ids.js';
import { write } from '../platform/transaction.js';
import { ApiKeysRepository, type KnownKey } from './api-keys.repository.js';

const TAIL = 4;

@Injectable()
export class ApiKeysService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: ApiKeysRepository,
    private readonly audit: AuditService,
  ) {}

  list(caller: Principal): { items: ApiKey[] } {
    const nowMs = this.clock.nowMs();
    return { items: this.repository.ofOrganisation(caller.organisationId).map((known) => viewOf(known, nowMs)) };
  }

  /**
   * The secret leaves in this answer and is kept as its hash alone. Throws `bad-input` for a scope the maker does not have and
   * for an end that is past, `wrong-state` where there are too many keys.
   */
  make(caller: Principal, body: BodyOf<typeof routes.makeApiKey>): ResponseOf<typeof routes.makeApiKey> {
    const nowMs = this.clock.nowMs();
    const beyond = body.scopes.filter((scope) => !can(caller, scope));
    if (beyond.length > 0) throw refused('/scopes', `Your organisation cannot do this: ${beyond.join(', ')}.`);
    const endsMs = body.endsUtc === null ? null : Date.parse(body.endsUtc);
    if (endsMs !== null && endsMs <= nowMs) throw refused('/endsUtc', 'The key would have ended already.');
    const secret = `${API_KEY_PREFIX}${newSecret()}`;
    return write(this.db, (tx) => {
      if (this.repository.living(tx, caller.organisationId, nowMs) >= MOST_API_KEYS) {
        throw new DomainError('wrong-state', `There are ${MOST_API_KEYS} keys already. Revoke one that is not needed.`);
      }
      const id = newId();
      this.repository.add(tx, {
        id,
        organisationId: caller.organisationId,
        personId: caller.personId,
        name: body.name,
        hash: sha256(secret),
        tail: secret.slice(-TAIL),
        scopes: body.scopes,
        createdMs: nowMs,
        endsMs,
      });
      const data = { name: body.name, scopes: body.scopes, endsUtc: body.endsUtc };
      this.audit.record(tx, { caller, action: 'api-key.make', subject: `api-key:${id}`, data });
      const made = this.repository.one(tx, caller.organisationId, id);
      if (!made) throw new Error('The key was not kept.');
      return { apiKey: viewOf(made, nowMs), secret };
    });
  }

  /** Throws `not-found` for a key of others, `wrong-state` for one that is revoked. */
  revoke(caller: Principal, id: string): { ok: true } {
    return write(this.db, (tx) => {
      const known = this.repository.one(tx, caller.organisationId, id);
      if (!known) throw notFound('API key');
      if (known.key.revokedMs !== null) throw new DomainError('wrong-state', `${known.key.name} is revoked already.`);
      this.repository.revoke(tx, id, { revokedMs: this.clock.nowMs(), revokedBy: caller.personId });
      const data = { name: known.key.name };
      this.audit.record(tx, { caller, action: 'api-key.revoke', subject: `api-key:${id}`, data });
      return { ok: true };
    });
  }
}

/** Whether the key opens anything now. */
export function stateOf({ key, makerRole }: KnownKey, nowMs: number): ApiKeyState {
  if (key.revokedMs !== null) return 'revoked';
  if (key.endsMs !== null && key.endsMs <= nowMs) return 'ended';
  return makerRole === null ? 'maker left' : 'in force';
}

function viewOf(known: KnownKey, nowMs: number): ApiKey {
  const { key, makerName } = known;
  return {
    id: key.id,
    name: key.name,
    tail: key.tail,
    scopes: key.scopes,
    state: stateOf(known, nowMs),
    madeByName: makerName,
    createdUtc: utc(key.createdMs),
    endsUtc: key.endsMs === null ? null : utc(key.endsMs),
    lastUsedUtc: key.lastUsedMs === null ? null : utc(key.lastUsedMs),
    revokedUtc: key.revokedMs === null ? null : utc(key.revokedMs),
  };
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();
const refused = (pointer: string, detail: string) => new DomainError('bad-input', detail, [{ pointer, detail }]);
