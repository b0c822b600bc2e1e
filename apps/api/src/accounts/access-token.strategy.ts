/** Who calls: reads the access token from its cookie, checks it, and looks up what the session still stands for. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { Request } from 'express';
import type { Authenticator } from 'passport';
import { Strategy } from 'passport-jwt';
import { z } from 'zod';
import { AUTHENTICATOR } from '../platform/access.guard.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { ACCESS_TOKEN, AccessClaims } from './access-tokens.js';
import { ACCESS_COOKIE } from './session-cookies.js';
import { SessionsRepository } from './sessions.repository.js';

const Header = z.strictObject({ alg: z.literal(ACCESS_TOKEN.algorithm), typ: z.literal(ACCESS_TOKEN.typ) });

@Injectable()
export class AccessTokenStrategy implements OnModuleInit {
  constructor(
    @Inject(AUTHENTICATOR) private readonly authenticator: Authenticator,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly sessions: SessionsRepository,
  ) {}

  /** Expiry is checked in `principalOf`, against the application's own clock. */
  onModuleInit(): void {
    const options = {
      jwtFromRequest: tokenOf,
      secretOrKeyProvider: (_request: Request, token: string, done: KeyDone) =>
        headerIsOurs(token) ? done(null, this.config.tokenSecret) : done(new Error('another kind of token')),
      algorithms: [ACCESS_TOKEN.algorithm],
      issuer: ACCESS_TOKEN.issuer,
      audience: ACCESS_TOKEN.audience,
      ignoreExpiration: true,
    };
    this.authenticator.use(
      'jwt',
      new Strategy(options, (claims: unknown, done) => done(null, this.principalOf(claims))),
    );
  }

  /** A revoked session, a removed member or a changed role counts at the next request, not when the token ends. */
  private principalOf(claims: unknown) {
    const token = AccessClaims.safeParse(claims);
    if (!token.success || token.data.exp * 1000 <= this.clock.nowMs()) return false;
    return this.sessions.principalOf(token.data.sid, token.data.sub) ?? false;
  }
}

type KeyDone = (error: Error | null, key?: string) => void;

function tokenOf(request: Request): string | null {
  const token: unknown = (request.cookies as Record<string, unknown> | undefined)?.[ACCESS_COOKIE];
  return typeof token === 'string' && token !== '' ? token : null;
}

/** The type is checked before the signature, so that no other token of ours could ever stand in for this one. */
function headerIsOurs(token: string): boolean {
  try {
    const header: unknown = JSON.parse(Buffer.from(token.split('.')[0] ?? '', 'base64url').toString('utf8'));
    return Header.safeParse(header).success;
  } catch {
    return false;
  }
}
