import type Stripe from 'stripe';
import type { Desk } from '../core/desk.js';

/** Marks a connected account as having told who it is (or as being shut), as the provider's own forms would. */
export function setAccountActive(desk: Desk, account: Stripe.Account, active: boolean): Stripe.Account {
  const requested = Object.keys(account.capabilities ?? {}) as (keyof Stripe.Account.Capabilities)[];
  const after: Stripe.Account = {
    ...account,
    capabilities: Object.fromEntries(requested.map((name) => [name, active ? 'active' : 'inactive'])),
    charges_enabled: active && requested.includes('card_payments'),
    details_submitted: account.details_submitted || active,
    payouts_enabled: active,
    requirements: requirements(
      active ? [] : ['individual.verification.document'],
      active ? null : 'requirements.past_due',
    ),
  };
  desk.store.save<'account'>(after);
  // Connected accounts' own events go to the endpoints that listen to connected accounts.
  desk.emit('account.updated', after, after.id);
  return after;
}

export function requirements(
  due: string[],
  disabledReason: Stripe.Account.Requirements.DisabledReason | null,
): Stripe.Account.Requirements {
  return {
    alternatives: [],
    current_deadline: null,
    currently_due: due,
    disabled_reason: disabledReason,
    errors: [],
    eventually_due: due,
    past_due: [],
    pending_verification: [],
  };
}
