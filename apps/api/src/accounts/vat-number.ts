/** A VAT number as it is stored: checked in form, without spaces. */
import { checkVatNumber } from '@skyberth/money';
import { DomainError } from '../platform/domain-error.js';

/** Null stays null, and so does nothing but spaces. Throws `bad-input` at `pointer`. */
export function usableVatNumber(text: string | null, pointer: string): string | null {
  if (text === null || text.trim() === '') return null;
  const check = checkVatNumber(text);
  if (!check.ok) throw new DomainError('bad-input', check.sentence, [{ pointer, detail: check.sentence }]);
  return check.number;
}
