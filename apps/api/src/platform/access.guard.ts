/** Nobody gets in unless the route's contract says so: deny by default. */
import { type CanActivate, type ExecutionContext, Inject, Injectable } from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import { API_KEY_PREFIX, can, type Permission, type RouteContract, scopeOf } from '@skyberth/shared';
import type { Request } from 'express';
import type { Authenticator } from 'passport';
import { CONFIG, type Config } from './config.js';
import { type Caller, CONTRACT, type SkyberthRequest } from './contract.js';
import { DomainError } from './domain-error.js';
import { KEPT_WHEN_SUSPENDED, StandingService } from './standing.js';

/** Each application has its own: the strategy that features register on it reads that application's database. */
export const AUTHENTICATOR = Symbol('Authenticator');

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS']);

@Injectable()
export class AccessGuard implements CanActivate {
  constructor(
    private readonly reflector: Reflector,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(AUTHENTICATOR) private readonly authenticator: Authenticator,
    private readonly standing: StandingService,
  ) {}

  async canActivate(context: ExecutionContext): Promise<boolean> {
    const contract = this.reflector.get<RouteContract | undefined>(CONTRACT, context.getHandler());
    if (!contract) throw new DomainError('not-found', 'There is nothing at this address.');
    const request = context.switchToHttp().getRequest<SkyberthRequest>();
    this.refuseOtherSites(request);
    const principal = await this.authenticate(request);
    if (principal) request.principal = principal;
    if (principal?.apiKey) refuseBeyondScopes(principal.apiKey.scopes, contract);
    if (contract.access === 'public') return true;
    if (!principal) throw new DomainError('not-signed-in', 'Sign in to go on.');
    if (contract.access === 'signed-in') return true;
    if (!can(principal, contract.access)) {
      throw new DomainError(
        'not-allowed',
        `As ${principal.role} of this organisation you cannot do this. Ask a manager of your organisation.`,
      );
    }
    if (!SAFE_METHODS.has(request.method)) this.refuseSuspended(principal, contract.access);
    return true;
  }

  /** A suspended organisation reads on; it changes nothing but what its sold contacts need. */
  private refuseSuspended(caller: Caller, permission: Permission): void {
    if (KEPT_WHEN_SUSPENDED.includes(permission)) return;
    const reason = this.standing.suspendedFor(caller.organisationId);
    if (reason === null) return;
    throw new DomainError(
      'not-allowed',
      `Your organisation is suspended: ${reason} Write to the marketplace to have it lifted.`,
    );
  }

  /**
   * Cookies travel with requests that another site makes a browser send; browsers name that site in Origin.
   * Programs send none and carry no cookies of a person, so an absent Origin is let through.
   */
  private refuseOtherSites(request: SkyberthRequest): void {
    if (SAFE_METHODS.has(request.method)) return;
    const origin = request.headers.origin;
    if (origin === undefined) return;
    const host = request.headers.host;
    const own =
      origin === this.config.publicUrl ||
      (host !== undefined && (origin === `http://${host}` || origin === `https://${host}`));
    if (!own) throw new DomainError('cross-site', 'This action can only be started from Skyberth itself.');
  }

  /** Runs the passport strategy; resolves to null where there is no valid access token, rejects for a key that is not good. */
  private authenticate(request: SkyberthRequest): Promise<Caller | null> {
    return new Promise((resolve, reject) => {
      const done = (error: unknown, user: Caller | false | null | undefined) =>
        error ? reject(error) : resolve(user || null);
      const handler = this.authenticator.authenticate(
        keyOf(request) === null ? 'jwt' : 'api-key',
        { session: false },
        done,
      ) as (req: unknown, res: unknown, next: (error?: unknown) => void) => void;
      handler(request, undefined, (error) => (error ? reject(error) : resolve(null)));
    });
  }
}

/** The API key of a request, in the Authorization header (RFC 6750, section 2.1); null where it carries none. */
export function keyOf(request: Request): string | null {
  const [scheme = '', token = ''] = (request.headers.authorization ?? '').split(' ');
  return scheme.toLowerCase() === 'bearer' && token.startsWith(API_KEY_PREFIX) ? token : null;
}

/** A key opens what its scopes name and nothing else, not even what is open to everybody. */
function refuseBeyondScopes(scopes: readonly Permission[], contract: RouteContract): void {
  const scope = scopeOf(contract);
  if (scope === null) throw new DomainError('not-allowed', 'No API key is taken here. A person must sign in for this.');
  if (!scopes.includes(scope)) throw new DomainError('not-allowed', `This API key lacks the scope ${scope}.`);
}
