/**
 * What a network can do to deliveries, on demand: tests of a receiver need duplicates, losses, delays and a wrong order.
 * Rules are kept in memory only; a restart forgets them.
 */
export type Mischief = 'duplicate' | 'drop' | 'delay' | 'reorder' | 'hold';
export const MISCHIEFS: readonly Mischief[] = ['duplicate', 'drop', 'delay', 'reorder', 'hold'];

export interface MischiefRule {
  mode: Mischief;
  /** Event types it applies to; all, if empty. */
  types: readonly string[];
  /** How many more deliveries it applies to. For `reorder` it is also how many are turned round together. */
  times: number;
  delayMs: number;
}

export interface Plan {
  copies: number;
  state: 'waiting' | 'held' | 'dropped';
  delayMs: number;
  /** Set when a reorder window is full: everything held so far goes out, last one first. */
  releaseReversed: boolean;
}

const UNHARMED: Plan = { copies: 1, state: 'waiting', delayMs: 0, releaseReversed: false };

export class MischiefMaker {
  rules: MischiefRule[] = [];

  add(rule: MischiefRule): void {
    this.rules.push(rule);
  }

  clear(): void {
    this.rules = [];
  }

  /** What happens to the next delivery of this event type. Uses up one turn of the first rule that fits. */
  planFor(eventType: string): Plan {
    const rule = this.rules.find((candidate) => candidate.types.length === 0 || candidate.types.includes(eventType));
    if (!rule) return UNHARMED;
    rule.times -= 1;
    const last = rule.times <= 0;
    if (last) this.rules = this.rules.filter((candidate) => candidate !== rule);
    switch (rule.mode) {
      case 'duplicate':
        return { ...UNHARMED, copies: 2 };
      case 'drop':
        return { ...UNHARMED, state: 'dropped' };
      case 'delay':
        return { ...UNHARMED, delayMs: rule.delayMs };
      case 'hold':
        return { ...UNHARMED, state: 'held' };
      case 'reorder':
        return { ...UNHARMED, state: 'held', releaseReversed: last };
    }
  }
}
