/** Turns the database's refusal of a second row of one name into a sentence. */
import { DomainError } from './domain-error.js';
import { refusalOf } from './transaction.js';

/** Runs a write; where a UNIQUE rule refuses it, throws `refusal` instead. */
export function uniqueOr(refusal: DomainError, work: () => void): void {
  try {
    work();
  } catch (error) {
    if (refusalOf(error)?.includes('UNIQUE')) throw refusal;
    throw error;
  }
}

export const nameTaken = (what: string, name: string): DomainError =>
  new DomainError('already-exists', `There is a ${what} called ${name} already.`, [
    { pointer: '/name', detail: 'This name is taken.' },
  ]);
