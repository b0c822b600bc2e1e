/**
 * Paying owners, as the application sees the provider. Every call may be repeated. Throws `payment-unavailable` where the
 * provider did not answer, so that it is not known whether anything happened.
 */
export interface TransferOrder {
  /** The line of the run: one transfer for each, however often it is ordered. */
  readonly lineId: string;
  readonly accountId: string;
  readonly amountMinor: number;
  readonly currency: string;
  readonly description: string;
}

export type TransferAnswer =
  | { readonly kind: 'sent'; readonly transferId: string }
  /** Nothing was moved, and a repeat would not change that. */
  | { readonly kind: 'refused'; readonly why: string };

export interface PayoutPort {
  createAccount(owner: { organisationId: string; email: string; country: string }): Promise<string>;
  /** The provider's page on which the owner says who they are; it works for a few minutes. */
  onboardingUrl(accountId: string, backUrl: string): Promise<string>;
  transfer(order: TransferOrder): Promise<TransferAnswer>;
}
export const PAYOUT_PORT = Symbol('PayoutPort');
