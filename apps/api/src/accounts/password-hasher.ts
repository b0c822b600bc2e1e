/** Passwords as argon2id (RFC 9106), and nothing else. */
import { Injectable } from '@nestjs/common';
import { hash, verify } from '@node-rs/argon2';

/** 19 MiB, two passes, one lane: common practice for sign-in servers, no source kept beside it. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

@Injectable()
export class PasswordHasher {
  /** Verified against where there is no account, so that its absence takes as long as a wrong password. */
  private readonly decoy = this.hash('nobody signs in with this');

  hash(password: string): Promise<string> {
    return hash(password.normalize('NFKC'), COST);
  }

  /** Whether the password is right; null (no account, or no password yet) never is, and takes the same time. */
  async matches(passwordHash: string | null, password: string): Promise<boolean> {
    const right = await verify(passwordHash ?? (await this.decoy), password.normalize('NFKC'));
    return right && passwordHash !== null;
  }
}
