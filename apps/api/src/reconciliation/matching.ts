/** Which journal entry says the same as a movement of the provider, and what to do where none does. */
import type { MovementAction } from '@skyberth/shared';
import type { MovementRow } from './reconciliation.repository.js';

export type MovementKind =
  | 'charge'
  | 'refund'
  | 'chargeback'
  | 'chargeback back'
  | 'fee'
  | 'transfer'
  | 'to the bank'
  | 'other';

/** What a movement is, by the provider's own words for it. */
export function kindOf(movement: Pick<MovementRow, 'type' | 'category' | 'sourceId' | 'amountMinor'>): MovementKind {
  const { type, category, sourceId, amountMinor } = movement;
  if (type === 'charge' || type === 'payment') return 'charge';
  if (type === 'refund' || type === 'payment_refund') return 'refund';
  if (category === 'dispute_reversal') return 'chargeback back';
  if (category === 'dispute') return 'chargeback';
  if (type === 'adjustment' && sourceId?.startsWith('dp_')) return amountMinor < 0 ? 'chargeback' : 'chargeback back';
  if (type === 'stripe_fee' || category === 'fee') return 'fee';
  if (type === 'transfer') return 'transfer';
  if (type === 'payout') return 'to the bank';
  return 'other';
}

/** The cause that the entry of a movement must have; null where it has to be looked for. */
export function causeOf(
  kind: MovementKind,
  movement: Pick<MovementRow, 'id' | 'sourceId' | 'intentId'>,
): string | null {
  const { id, sourceId, intentId } = movement;
  switch (kind) {
    case 'charge':
      return intentId === null ? null : `capture:${intentId}`;
    case 'chargeback':
      return sourceId === null ? null : `chargeback:${sourceId}`;
    case 'chargeback back':
      return sourceId === null ? null : `chargeback-won:${sourceId}`;
    case 'fee':
      return `provider-fee:${id}`;
    case 'transfer':
      return sourceId === null ? null : `transfer:${sourceId}`;
    case 'to the bank':
      return `withdrawal:${id}`;
    case 'other':
      return sourceId === null ? null : `provider:${sourceId}:${id}`;
    case 'refund':
      return null;
  }
}

export interface Difference {
  readonly why: string;
  /** The best first. */
  readonly actions: readonly MovementAction[];
}

/** Why a movement has no entry, and what can be done. `ledgerMinor` is what the entry of the same cause says, where there is one. */
export function differenceOf(
  kind: MovementKind,
  facts: { readonly isOurs: boolean; readonly ledgerMinor: number | null; readonly amountMinor: number },
): Difference {
  const { isOurs, ledgerMinor, amountMinor } = facts;
  if (ledgerMinor !== null) {
    return {
      why: `The ledger says ${ledgerMinor} where the provider says ${amountMinor} minor units.`,
      actions: ['suspense'],
    };
  }
  switch (kind) {
    case 'charge':
      return isOurs
        ? {
            why: 'The news of this charge never came. Ask the provider for the payment.',
            actions: ['fetch', 'suspense'],
          }
        : { why: 'Nobody here asked for this payment.', actions: ['suspense'] };
    case 'refund':
      return isOurs
        ? { why: 'The news of this refund never came. Ask the provider for it.', actions: ['fetch', 'suspense'] }
        : { why: 'It returns a payment that nobody here asked for.', actions: ['suspense'] };
    case 'chargeback':
    case 'chargeback back':
      return {
        why: 'The news of this chargeback never came. Ask the provider for it.',
        actions: ['fetch', 'suspense'],
      };
    case 'to the bank':
      return { why: 'Money went to our own bank account and is not written yet.', actions: ['withdrawal', 'suspense'] };
    case 'transfer':
      return { why: 'No payout run here ordered this transfer.', actions: ['suspense'] };
    case 'fee':
    case 'other':
      return { why: 'Nothing in the ledger says the same.', actions: ['suspense'] };
  }
}

const AGES = [
  { label: 'up to 1 day', days: 1 },
  { label: '2 to 7 days', days: 7 },
  { label: '8 to 30 days', days: 30 },
  { label: 'over 30 days', days: Number.POSITIVE_INFINITY },
] as const;

/** How many of these ages, in days, fall in each band. */
export function ageing(agesDays: readonly number[]): { label: string; movements: number }[] {
  return AGES.map(({ label, days }, index) => {
    const above = AGES[index - 1]?.days ?? Number.NEGATIVE_INFINITY;
    return { label, movements: agesDays.filter((age) => age > above && age <= days).length };
  });
}
