/**
 * The provider's own books: what it did, read instead of told. Everything may be read again. Throws `payment-unavailable`
 * where the provider did not answer. Amounts are whole minor units, signed; currencies are ISO 4217 in capitals.
 */
import type { ProviderEvent } from './payment.port.js';

/** One movement of the provider's balance. */
export interface ProviderMovement {
  readonly id: string;
  readonly type: string;
  readonly category: string;
  /** What caused it: a charge, a refund, a dispute, a transfer, a payout. */
  readonly sourceId: string | null;
  /** The payment that the source belongs to, where it can be told. */
  readonly intentId: string | null;
  readonly amountMinor: number;
  readonly feeMinor: number;
  readonly netMinor: number;
  readonly currency: string;
  readonly atMs: number;
  readonly availableMs: number;
  readonly description: string;
}

/** A payment that the buyer's bank disputes. `withdrawn` and `reinstated` say which way money has gone so far. */
export interface ChargebackFacts {
  readonly chargebackId: string;
  readonly chargeId: string;
  readonly intentId: string | null;
  readonly amountMinor: number;
  readonly currency: string;
  readonly reason: string;
  readonly state: 'open' | 'won' | 'lost';
  readonly withdrawn: boolean;
  readonly reinstated: boolean;
}

export interface ReadEvent extends ProviderEvent {
  /** The event as the provider keeps it. */
  readonly payload: string;
  readonly createdMs: number;
}

export type RefundedFacts = Extract<ProviderEvent['about'], { kind: 'refunded' }>;

export interface ProviderBooks {
  /** All money that the provider holds, settled or on its way, by currency. */
  balances(): Promise<ReadonlyMap<string, number>>;
  /** Movements made at or after `sinceMs`, newest first, a page at a time. */
  movements(sinceMs: number): AsyncIterable<readonly ProviderMovement[]>;
  /** Events made at or after `sinceMs`, newest first, a page at a time. */
  events(sinceMs: number): AsyncIterable<readonly ReadEvent[]>;
  chargeback(chargebackId: string): Promise<ChargebackFacts>;
  /** How much of the charge behind this refund was given back so far. */
  refunded(refundId: string): Promise<RefundedFacts>;
}
export const PROVIDER_BOOKS = Symbol('ProviderBooks');
