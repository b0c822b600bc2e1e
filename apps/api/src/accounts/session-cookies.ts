/** The two cookies of a session. Scripts can't read them, other sites can't send them. */
import { Inject, Injectable } from '@nestjs/common';
import type { CookieOptions, Request, Response } from 'express';
import { CONFIG, type Config } from '../platform/config.js';
import { ACCESS_TOKEN_MS } from './access-tokens.js';
import { REFRESH_TOKEN_MS, type SessionTokens } from './sessions.service.js';

export const ACCESS_COOKIE = 'skyberth_access';
export const REFRESH_COOKIE = 'skyberth_refresh';

@Injectable()
export class SessionCookies {
  private readonly access: CookieOptions;
  private readonly refresh: CookieOptions;

  constructor(@Inject(CONFIG) config: Config) {
    const both = { httpOnly: true, sameSite: 'strict', secure: config.publicUrl.startsWith('https:') } as const;
    this.access = { ...both, path: '/api' };
    this.refresh = { ...both, path: '/api/auth' };
  }

  set(response: Response, tokens: SessionTokens): void {
    response.cookie(ACCESS_COOKIE, tokens.access, { ...this.access, maxAge: ACCESS_TOKEN_MS });
    if (tokens.refresh === null) return;
    response.cookie(REFRESH_COOKIE, tokens.refresh, { ...this.refresh, maxAge: REFRESH_TOKEN_MS });
  }

  clear(response: Response): void {
    response.clearCookie(ACCESS_COOKIE, this.access);
    response.clearCookie(REFRESH_COOKIE, this.refresh);
  }

  refreshTokenOf(request: Request): string | null {
    const token: unknown = (request.cookies as Record<string, unknown> | undefined)?.[REFRESH_COOKIE];
    return typeof token === 'string' && token !== '' ? token : null;
  }
}
