/** Repeatable chance: the same seed makes the same three months (mulberry32, a public-domain generator). */
export class Chance {
  constructor(private state: number) {}

  /** 0 <= x < 1. */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) | 0;
    let t = Math.imul(this.state ^ (this.state >>> 15), 1 | this.state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  }

  pick<T>(list: readonly T[]): T {
    const item = list[Math.floor(this.next() * list.length)];
    if (item === undefined) throw new Error('There is nothing to choose from.');
    return item;
  }

  /** A whole number whose mean is `mean`. */
  about(mean: number): number {
    return Math.floor(mean) + (this.next() < mean % 1 ? 1 : 0);
  }
}
