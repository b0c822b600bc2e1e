/** Who calls with an API key: finds it by its hash and says for whom it acts, in whose name and how far. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import { type ApiKeyState, can } from '@skyberth/shared';
import type { Request } from 'express';
import type { Authenticator, Strategy, StrategyCreated } from 'passport';
import { AttemptThrottle } from '../accounts/attempt-throttle.js';
import { AUTHENTICATOR, keyOf } from '../platform/access.guard.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import type { Caller } from '../platform/contract.js';
import { DomainError } from '../platform/domain-error.js';
import { sha256 } from '../platform/ids.js';
import { ApiKeysRepository } from './api-keys.repository.js';
import { stateOf } from './api-keys.service.js';

const MINUTE_MS = 60_000;

const REFUSALS: Readonly<Record<Exclude<ApiKeyState, 'in force'>, string>> = {
  revoked: 'This API key was revoked. Ask a manager of your organisation for another.',
  ended: 'This API key has reached its end date. Ask a manager of your organisation for another.',
  'maker left': 'Who made this API key has left the organisation. Ask a manager for another.',
};

@Injectable()
export class ApiKeyStrategy implements OnModuleInit {
  private readonly wrongKeys = new AttemptThrottle({ freeAttempts: 20, firstWaitMs: 1_000, longestWaitMs: MINUTE_MS });

  constructor(
    @Inject(AUTHENTICATOR) private readonly authenticator: Authenticator,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: ApiKeysRepository,
  ) {}

  onModuleInit(): void {
    const callerOf = (request: Request) => this.callerOf(request);
    this.authenticator.use('api-key', {
      authenticate(this: StrategyCreated<Strategy>, request: Request) {
        try {
          this.success(callerOf(request));
        } catch (error) {
          this.error(error);
        }
      },
    });
  }

  private callerOf(request: Request): Caller {
    const nowMs = this.clock.nowMs();
    const known = this.repository.byHash(sha256(keyOf(request) ?? ''));
    const state = known && stateOf(known, nowMs);
    if (!known || state !== 'in force') {
      // Nobody guesses 256 bits; a program that goes on with a dead key is slowed down. Good keys from its address are not.
      this.wrongKeys.begin(request.ip ?? '', nowMs);
      throw new DomainError(
        'api-key-refused',
        state === undefined || state === 'in force' ? 'There is no such API key.' : REFUSALS[state],
      );
    }
    const { key, organisationKind, makerRole } = known;
    if (key.lastUsedMs === null || nowMs - key.lastUsedMs >= MINUTE_MS) this.repository.markUsed(key.id, nowMs);
    // What its maker may no longer do, the key may no longer do either.
    const scopes = key.scopes.filter(
      (scope) => makerRole !== null && can({ organisationKind, role: makerRole }, scope),
    );
    return {
      personId: key.personId,
      organisationId: key.organisationId,
      organisationKind,
      role: 'member',
      familyId: null,
      apiKey: { id: key.id, scopes },
    };
  }
}
