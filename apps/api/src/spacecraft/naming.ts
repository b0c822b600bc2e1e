/** Names for spacecraft that come from element sets. */
import type { ElementSet } from '@skyberth/orbit';

const SHORT_LENGTH = 6;

/** The name in the set, or one made of its number where it has none. */
export const nameOf = (set: ElementSet): string => set.objectName.trim().slice(0, 100) || `Object ${set.catalogNumber}`;

/** Up to six characters for the board: initials and number of a name of several words, else its beginning. */
export function shortNameOf(name: string): string {
  const words = name.match(/[\p{L}\p{N}]+/gu) ?? [];
  const [first = name] = words;
  if (words.length < 2) return first.slice(0, SHORT_LENGTH);
  const initials = words.map((word) => (/^\p{N}+$/u.test(word) ? word : (word[0] ?? ''))).join('');
  return initials.slice(0, SHORT_LENGTH).toUpperCase();
}

/** The name, with its number or a count added where another spacecraft has it. Adds the result to `taken`. */
export function freeName(set: ElementSet, taken: Set<string>): string {
  const name = nameOf(set);
  const candidates = [name, `${name} (${set.catalogNumber})`];
  let free = candidates.find((each) => !taken.has(each.toLowerCase()));
  for (let n = 2; free === undefined; n += 1) {
    const next = `${name} (${set.catalogNumber}) ${n}`;
    if (!taken.has(next.toLowerCase())) free = next;
  }
  taken.add(free.toLowerCase());
  return free;
}
