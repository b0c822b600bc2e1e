/**
 * Access tokens: signed, short, and good for nothing else. After RFC 8725: one fixed algorithm (3.1), a key with entropy
 * (3.5), issuer (3.8), audience (3.9) and explicit type (3.11) set here and checked in the strategy.
 */
import { Inject, Injectable } from '@nestjs/common';
import { JwtService } from '@nestjs/jwt';
import { Id } from '@skyberth/shared';
import { z } from 'zod';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';

export const ACCESS_TOKEN_MS = 15 * 60_000;
export const ACCESS_TOKEN = {
  algorithm: 'HS256',
  typ: 'at+jwt',
  issuer: 'https://skyberth.example/auth',
  audience: 'https://skyberth.example/api',
} as const;

/** `sub` is the person, `sid` the session family; what they may do is looked up at each request, never carried. */
export const AccessClaims = z.object({ sub: Id, sid: Id, iat: z.int(), exp: z.int() });

@Injectable()
export class AccessTokens {
  constructor(
    private readonly jwt: JwtService,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  issue(personId: string, familyId: string): string {
    const issuedS = Math.floor(this.clock.nowMs() / 1000);
    const claims: z.infer<typeof AccessClaims> = {
      sub: personId,
      sid: familyId,
      iat: issuedS,
      exp: issuedS + ACCESS_TOKEN_MS / 1000,
    };
    return this.jwt.sign(claims, {
      secret: this.config.tokenSecret,
      algorithm: ACCESS_TOKEN.algorithm,
      issuer: ACCESS_TOKEN.issuer,
      audience: ACCESS_TOKEN.audience,
      header: { alg: ACCESS_TOKEN.algorithm, typ: ACCESS_TOKEN.typ },
    });
  }
}
