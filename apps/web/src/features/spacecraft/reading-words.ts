/** What was read, in words, and what may be saved of it. Pure. */
import type { ElementFault, ReadElement } from '@skyberth/shared';

type Read = Pick<ReadElement, 'fate' | 'objectName' | 'objectId' | 'catalogNumber'>;

const setsWords = (count: number): string => `${count} element ${count === 1 ? 'set' : 'sets'}`;

/** `5 good: 3 are the newest of their spacecraft, 1 joins a history, 1 is kept already.` */
export function goodWords(good: readonly Pick<Read, 'fate'>[]): string {
  const counted = (fate: Read['fate'], one: string, many: string): string[] => {
    const count = good.filter((each) => each.fate === fate).length;
    return count > 0 ? [`${count} ${count === 1 ? one : many}`] : [];
  };
  const parts = [
    ...counted('new', 'is newer than what you have', 'are newer than what you have'),
    ...counted('new-spacecraft', 'is of a spacecraft you do not have yet', 'are of spacecraft you do not have yet'),
    ...counted('older', 'joins a history', 'join a history'),
    ...counted('duplicate', 'is kept already', 'are kept already'),
  ];
  return `${setsWords(good.length)} can be used: ${parts.join(', ')}.`;
}

/** Names of the spacecraft that saving would add, each once. */
export function newCraftNames(good: readonly Read[]): readonly string[] {
  const names = new Map<string, string>();
  for (const each of good) {
    if (each.fate !== 'new-spacecraft') continue;
    const key = each.catalogNumber > 0 ? `#${each.catalogNumber}` : `${each.objectId}|${each.objectName.toLowerCase()}`;
    if (!names.has(key)) names.set(key, each.objectName);
  }
  return [...names.values()];
}

/** How many sets saving would keep. */
export function countToSave(good: readonly Pick<Read, 'fate'>[], addSpacecraft: boolean): number {
  return good.filter((each) => each.fate !== 'duplicate' && (addSpacecraft || each.fate !== 'new-spacecraft')).length;
}

export interface SaveWish {
  readonly good: readonly Read[];
  readonly faultCount: number;
  readonly keepGoodOnes: boolean;
  readonly addSpacecraft: boolean;
}

/** Why nothing can be saved yet, or null. */
export function saveBlock({ good, faultCount, keepGoodOnes, addSpacecraft }: SaveWish): string | null {
  if (good.length === 0) return 'There is no good element set to save.';
  if (countToSave(good, addSpacecraft) === 0) return 'Nothing is new: every good set is kept already or was left out.';
  if (faultCount > 0 && !keepGoodOnes) return 'Mend the text, or agree to leave out what is wrong.';
  return null;
}

/** `Save 5 element sets` */
export const saveLabel = (count: number): string => `Save ${setsWords(count)}`;

/** `5 element sets are saved. 1 was kept already.` */
export function savedWords({ saved, duplicates }: { readonly saved: number; readonly duplicates: number }): string {
  const kept = duplicates === 0 ? '' : ` ${duplicates} ${duplicates === 1 ? 'was' : 'were'} kept already.`;
  return `${setsWords(saved)} ${saved === 1 ? 'is' : 'are'} saved.${kept}`;
}

/** `A, B and C`, `A, B and 5 more` */
export function listWords(names: readonly string[], most = 4): string {
  const rest = names.length - most;
  const shown = rest > 1 ? [...names.slice(0, most), `${rest} more`] : [...names];
  const last = shown.pop();
  return shown.length > 0 ? `${shown.join(', ')} and ${last ?? ''}` : (last ?? '');
}

/** The sentence of a fault where it says more than what was found and what was expected, which stand beside it; else null. */
export function ownSentence({
  message,
  found,
  expected,
}: Pick<ElementFault, 'message' | 'found' | 'expected'>): string | null {
  return expected !== '' && message.includes(expected) && message.includes(found) ? null : message;
}
