import { Controller, Req, Res } from '@nestjs/common';
import { type Done, routes, type Session } from '@skyberth/shared';
import type { Request, Response } from 'express';
import type { z } from 'zod';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { DomainError } from '../platform/domain-error.js';
import { SessionCookies } from './session-cookies.js';
import { type Device, type OpenSession, SessionsService } from './sessions.service.js';
import { SignUpService } from './sign-up.service.js';

type Ok = z.infer<typeof Done>;

@Controller()
export class AuthController {
  constructor(
    private readonly sessions: SessionsService,
    private readonly accounts: SignUpService,
    private readonly cookies: SessionCookies,
  ) {}

  @Handles(routes.signUp)
  async signUp(
    @Input() input: HandlerInput<typeof routes.signUp>,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ): Promise<Session> {
    return this.enter(response, await this.accounts.signUp(input.body, deviceOf(request)));
  }

  @Handles(routes.signIn)
  async signIn(
    @Input() input: HandlerInput<typeof routes.signIn>,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ): Promise<Session> {
    return this.enter(response, await this.sessions.signIn(input.body, deviceOf(request)));
  }

  /** A session that has ended takes its cookies with it. */
  @Handles(routes.refresh)
  refresh(@Req() request: Request, @Res({ passthrough: true }) response: Response): Session {
    try {
      return this.enter(response, this.sessions.refresh(this.cookies.refreshTokenOf(request)));
    } catch (error) {
      if (error instanceof DomainError && error.code === 'session-ended') this.cookies.clear(response);
      throw error;
    }
  }

  @Handles(routes.signOut)
  signOut(
    @Input() input: HandlerInput<typeof routes.signOut>,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ): Ok {
    this.cookies.clear(response);
    return this.sessions.signOut(this.cookies.refreshTokenOf(request), input.caller?.familyId ?? null);
  }

  @Handles(routes.session)
  session(@Input() input: HandlerInput<typeof routes.session>): Session {
    return this.sessions.current(input.caller);
  }

  @Handles(routes.switchOrganisation)
  switchOrganisation(
    @Input() input: HandlerInput<typeof routes.switchOrganisation>,
    @Res({ passthrough: true }) response: Response,
  ): Session {
    return this.enter(response, this.sessions.switchTo(input.caller, input.body.organisationId));
  }

  @Handles(routes.verifyEmail)
  verifyEmail(@Input() input: HandlerInput<typeof routes.verifyEmail>): Ok {
    return this.accounts.verifyEmail(input.body.token);
  }

  @Handles(routes.requestPasswordReset)
  requestPasswordReset(@Input() input: HandlerInput<typeof routes.requestPasswordReset>, @Req() request: Request): Ok {
    return this.accounts.requestReset(input.body.email, deviceOf(request));
  }

  @Handles(routes.setPassword)
  setPassword(@Input() input: HandlerInput<typeof routes.setPassword>): Promise<Ok> {
    return this.accounts.setPassword(input.body.token, input.body.password);
  }

  private enter(response: Response, { session, tokens }: OpenSession): Session {
    this.cookies.set(response, tokens);
    return session;
  }
}

const deviceOf = (request: Request): Device => ({
  address: request.ip ?? 'unknown',
  userAgent: request.headers['user-agent'] ?? '',
});
