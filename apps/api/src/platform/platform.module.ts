/** What every feature stands on: configuration, clock, guard, contract, errors, audit. */
import { type DynamicModule, Global, Module } from '@nestjs/common';
import { APP_FILTER, APP_GUARD, APP_INTERCEPTOR } from '@nestjs/core';
import passport from 'passport';
import { AccessGuard, AUTHENTICATOR } from './access.guard.js';
import { AuditService } from './audit.service.js';
import { CLOCK, type ClockPort } from './clock.js';
import { CONFIG, type Config } from './config.js';
import { ContractInterceptor } from './contract.interceptor.js';
import { DatabaseModule } from './database.module.js';
import { IdempotencyStore } from './idempotency.store.js';
import { ProblemFilter } from './problem.filter.js';
import { StandingService } from './standing.js';

@Global()
@Module({})
export class PlatformModule {
  static forRoot(config: Config, clock: ClockPort): DynamicModule {
    return {
      module: PlatformModule,
      imports: [DatabaseModule],
      providers: [
        { provide: CONFIG, useValue: config },
        { provide: CLOCK, useValue: clock },
        { provide: AUTHENTICATOR, useFactory: () => new passport.Authenticator() },
        AuditService,
        IdempotencyStore,
        StandingService,
        { provide: APP_GUARD, useClass: AccessGuard },
        { provide: APP_INTERCEPTOR, useClass: ContractInterceptor },
        { provide: APP_FILTER, useClass: ProblemFilter },
      ],
      exports: [CONFIG, CLOCK, AUTHENTICATOR, AuditService, IdempotencyStore, StandingService],
    };
  }
}
