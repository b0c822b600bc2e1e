/** Chance that is the same in every run of a seed (linear congruence of Numerical Recipes). */
export function chance(seed) {
  let state = (seed * 2_654_435_761 + 12_345) >>> 0;
  const next = () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 2 ** 32;
  };
  return {
    next,
    /** Whether something of this probability happens. */
    is: (probability) => next() < probability,
    whole: (from, to) => from + Math.floor(next() * (to - from + 1)),
    one: (list) => list[Math.floor(next() * list.length)],
  };
}
