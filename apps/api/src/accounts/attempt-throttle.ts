/**
 * Slows down guessing without locking anyone out: after some free attempts each further one must wait, twice as long
 * each time up to a limit, and a quiet hour forgets everything. Attempts made while waiting are refused unlooked at and
 * do not lengthen the wait, so nobody can keep a stranger out for ever. Counted in memory: a restart forgives.
 */
import { DomainError } from '../platform/domain-error.js';

export interface ThrottleRule {
  readonly freeAttempts: number;
  readonly firstWaitMs: number;
  readonly longestWaitMs: number;
}

interface Count {
  attempts: number;
  lastMs: number;
  blockedUntilMs: number;
}

const FORGET_AFTER_MS = 3_600_000;
/** Beyond so many addresses the ones that were quiet longest are forgotten: memory stays bounded under attack. */
const MOST_KEYS = 20_000;

export class AttemptThrottle {
  private readonly counts = new Map<string, Count>();

  constructor(private readonly rule: ThrottleRule) {}

  /**
   * Counts an attempt before it is looked at, so that parallel attempts are counted too. Throws `too-many` with the
   * time to wait.
   */
  begin(key: string, nowMs: number): void {
    const known = this.counts.get(key);
    const count =
      known && nowMs - known.lastMs < FORGET_AFTER_MS ? known : { attempts: 0, lastMs: 0, blockedUntilMs: 0 };
    if (nowMs < count.blockedUntilMs) {
      const seconds = Math.ceil((count.blockedUntilMs - nowMs) / 1000);
      throw new DomainError('too-many', `Too many attempts. Wait ${waitText(seconds)} and try again.`);
    }
    count.attempts += 1;
    count.lastMs = nowMs;
    const over = count.attempts - this.rule.freeAttempts;
    if (over >= 0) {
      count.blockedUntilMs = nowMs + Math.min(this.rule.firstWaitMs * 2 ** over, this.rule.longestWaitMs);
    }
    this.counts.delete(key);
    this.counts.set(key, count);
    if (this.counts.size > MOST_KEYS) this.counts.delete(this.counts.keys().next().value ?? '');
  }

  /** The attempt was honest and does not count; earlier ones still do. */
  giveBack(key: string): void {
    const count = this.counts.get(key);
    if (!count) return;
    count.attempts -= 1;
    count.blockedUntilMs = 0;
  }

  /** The attempt succeeded: the key starts afresh. */
  clear(key: string): void {
    this.counts.delete(key);
  }
}

const waitText = (seconds: number): string => (seconds <= 90 ? `${seconds} s` : `${Math.ceil(seconds / 60)} min`);
