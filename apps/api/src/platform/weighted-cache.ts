/** A cache that forgets what was used longest ago, bounded by the weight of what it holds. */

export class WeightedCache<V> {
  private readonly entries = new Map<string, { readonly value: V; readonly weight: number }>();
  private total = 0;

  constructor(private readonly maxWeight: number) {}

  get(key: string): V | undefined {
    const entry = this.entries.get(key);
    if (entry === undefined) return undefined;
    this.entries.delete(key);
    this.entries.set(key, entry);
    return entry.value;
  }

  /** Keeps the value. One that is heavier than the whole cache is not kept. */
  set(key: string, value: V, weight: number): void {
    this.drop(key);
    if (weight > this.maxWeight) return;
    this.entries.set(key, { value, weight });
    this.total += weight;
    for (const oldest of this.entries.keys()) {
      if (this.total <= this.maxWeight) break;
      this.drop(oldest);
    }
  }

  get weight(): number {
    return this.total;
  }

  get size(): number {
    return this.entries.size;
  }

  private drop(key: string): void {
    const entry = this.entries.get(key);
    if (entry === undefined) return;
    this.entries.delete(key);
    this.total -= entry.weight;
  }
}
