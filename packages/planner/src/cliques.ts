/** Stretches of time that exclude one another, as the fewest and strongest rows. */

export interface Stretch {
  readonly fromMs: number;
  readonly toMs: number;
}

/**
 * The maximal sets of half-open stretches that share an instant, as indices, of those larger than `capacity`. In a graph of
 * intervals they say all that pairs of overlaps say, and their rows cut off far more fractions (Helly's property of
 * intervals; textbook knowledge, from memory). Order: by time.
 */
export function maximalCliques(stretches: readonly Stretch[], capacity: number): number[][] {
  const edges = stretches.flatMap(({ fromMs, toMs }, index) =>
    toMs > fromMs
      ? [
          { atMs: fromMs, begins: true, index },
          { atMs: toMs, begins: false, index },
        ]
      : [],
  );
  // Ends come first: what ends as another begins does not share an instant with it.
  edges.sort((a, b) => a.atMs - b.atMs || Number(a.begins) - Number(b.begins) || a.index - b.index);
  const active = new Set<number>();
  const cliques: number[][] = [];
  let grown = false;
  for (const edge of edges) {
    if (edge.begins) {
      active.add(edge.index);
      grown = true;
      continue;
    }
    if (grown && active.size > capacity) cliques.push([...active].sort((a, b) => a - b));
    grown = false;
    active.delete(edge.index);
  }
  return cliques;
}
