import type Stripe from 'stripe';
import type { Input } from '../core/input.js';

export const EMPTY_BILLING: Stripe.Charge.BillingDetails = {
  address: null,
  email: null,
  name: null,
  phone: null,
  tax_id: null,
};

export function readAddress(input: Input): Stripe.Address {
  return {
    city: input.textOrNull('city') ?? null,
    country: input.textOrNull('country', 2) ?? null,
    line1: input.textOrNull('line1') ?? null,
    line2: input.textOrNull('line2') ?? null,
    postal_code: input.textOrNull('postal_code') ?? null,
    state: input.textOrNull('state') ?? null,
  };
}

/** The id in a field that may hold an object when expanded; stored documents always hold ids. */
export function idOf(value: string | { id: string } | null | undefined): string | null {
  if (value === null || value === undefined) return null;
  return typeof value === 'string' ? value : value.id;
}
