/** What an owner is paid in a run: settled contacts less fee, refunds and reserve, with adjustments, to the cent. */
import { sumMinor } from '../amount.js';
import { currencyExponent } from '../currencies.js';
import { MoneyError } from '../money-error.js';
import { percentOf } from '../rounding.js';

/** The marketplace's fee on one contact: basis points of its net, halves away from zero; contacts are rounded one by one. */
export const contactFeeMinor = (netMinor: number, feeBasisPoints: number): number =>
  percentOf(netMinor, feeBasisPoints);

/** One contact as the ledger has it; every amount is zero or more. */
export interface PayoutContact {
  readonly bookingId: string;
  readonly settledMinor: number;
  readonly feeMinor: number;
  readonly refundMinor: number;
  /** Set aside for an open dispute. */
  readonly reserveMinor: number;
}

export interface PayoutInput {
  readonly ownerId: string;
  readonly currency: string;
  readonly contacts: readonly PayoutContact[];
  /** Given (positive) or taken (negative), each with the reason that the owner reads. */
  readonly adjustments: readonly { readonly reason: string; readonly amountMinor: number }[];
  /** The owner's own least amount for a transfer. */
  readonly minimumMinor: number;
  /** Why finance holds the whole statement back, or `null`. */
  readonly heldBack: string | null;
}

export type PayoutState = 'ready' | 'below minimum' | 'held back' | 'nothing due';

export interface PayoutStatement {
  readonly ownerId: string;
  readonly currency: string;
  readonly contactCount: number;
  readonly settledMinor: number;
  readonly feeMinor: number;
  readonly refundMinor: number;
  readonly reserveMinor: number;
  readonly adjustedMinor: number;
  /** settled - fee - refunds - reserve + adjusted. Negative when the owner owes: nothing is sent, it is carried over. */
  readonly toPayMinor: number;
  readonly state: PayoutState;
  readonly sentence: string;
}

/** Throws `bad payout` for a contact listed twice, a negative amount, or an adjustment without a reason. */
export function buildPayout(input: PayoutInput): PayoutStatement {
  currencyExponent(input.currency);
  const seen = new Set<string>();
  for (const contact of input.contacts) {
    if (seen.has(contact.bookingId))
      throw new MoneyError(
        'bad payout',
        `The contact ${contact.bookingId} stands twice in the statement of ${input.ownerId}.`,
      );
    seen.add(contact.bookingId);
    if (Math.min(contact.settledMinor, contact.feeMinor, contact.refundMinor, contact.reserveMinor) < 0) {
      throw new MoneyError('bad payout', `The contact ${contact.bookingId} has an amount below zero.`, { contact });
    }
  }
  if (input.adjustments.some((adjustment) => adjustment.reason.trim() === ''))
    throw new MoneyError('bad payout', 'An adjustment needs a reason.');
  const settledMinor = sumMinor(input.contacts.map((contact) => contact.settledMinor));
  const feeMinor = sumMinor(input.contacts.map((contact) => contact.feeMinor));
  const refundMinor = sumMinor(input.contacts.map((contact) => contact.refundMinor));
  const reserveMinor = sumMinor(input.contacts.map((contact) => contact.reserveMinor));
  const adjustedMinor = sumMinor(input.adjustments.map((adjustment) => adjustment.amountMinor));
  const toPayMinor = sumMinor([settledMinor, -feeMinor, -refundMinor, -reserveMinor, adjustedMinor]);
  return {
    ownerId: input.ownerId,
    currency: input.currency,
    contactCount: input.contacts.length,
    settledMinor,
    feeMinor,
    refundMinor,
    reserveMinor,
    adjustedMinor,
    toPayMinor,
    ...stateOf(toPayMinor, input),
  };
}

function stateOf(toPayMinor: number, input: PayoutInput): { state: PayoutState; sentence: string } {
  if (toPayMinor <= 0)
    return {
      state: 'nothing due',
      sentence:
        toPayMinor === 0 ? 'Nothing is due.' : 'The owner owes this amount; it is carried over to the next run.',
    };
  if (input.heldBack !== null) return { state: 'held back', sentence: `Held back: ${input.heldBack}.` };
  if (toPayMinor < input.minimumMinor)
    return { state: 'below minimum', sentence: "Below the owner's own minimum; it stays for the next run." };
  return { state: 'ready', sentence: 'Ready to be sent.' };
}

export interface PayoutRunTotals {
  readonly currency: string;
  readonly contactCount: number;
  readonly settledMinor: number;
  readonly feeMinor: number;
  readonly refundMinor: number;
  readonly reserveMinor: number;
  readonly adjustedMinor: number;
  readonly toPayMinor: number;
  /** What the ready statements send, and how many transfers that is. */
  readonly sentMinor: number;
  readonly transfers: number;
  /** What is due but stays for the next run (negative balances included). */
  readonly staysMinor: number;
}

/**
 * Totals of a run in one currency; sent + stays + fee + refunds + reserve = settled + adjusted, always.
 * Throws `bad payout` when an owner stands twice, `different currencies` when a statement is in another.
 */
export function payoutRunTotals(statements: readonly PayoutStatement[], currency: string): PayoutRunTotals {
  const owners = new Set<string>();
  for (const statement of statements) {
    if (statement.currency !== currency)
      throw new MoneyError(
        'different currencies',
        `A run in ${currency} cannot hold a statement in ${statement.currency}.`,
      );
    if (owners.has(statement.ownerId))
      throw new MoneyError('bad payout', `The owner ${statement.ownerId} stands twice in the run.`);
    owners.add(statement.ownerId);
  }
  const total = (pick: (statement: PayoutStatement) => number): number => sumMinor(statements.map(pick));
  const ready = statements.filter((statement) => statement.state === 'ready');
  const sentMinor = sumMinor(ready.map((statement) => statement.toPayMinor));
  const toPayMinor = total((statement) => statement.toPayMinor);
  return {
    currency,
    contactCount: total((statement) => statement.contactCount),
    settledMinor: total((statement) => statement.settledMinor),
    feeMinor: total((statement) => statement.feeMinor),
    refundMinor: total((statement) => statement.refundMinor),
    reserveMinor: total((statement) => statement.reserveMinor),
    adjustedMinor: total((statement) => statement.adjustedMinor),
    toPayMinor,
    sentMinor,
    transfers: ready.length,
    staysMinor: toPayMinor - sentMinor,
  };
}
