import type Stripe from 'stripe';
import type { Desk } from './desk.js';
import { newId } from './ids.js';

export interface BalancePosting {
  account: string;
  type: Stripe.BalanceTransaction.Type;
  reportingCategory: string;
  /** Signed: positive when the account gains. */
  amountMinor: number;
  feeMinor?: number;
  feeDescription?: string;
  currency: string;
  sourceId: string;
  description?: string | null;
  /** When the money can be moved on; now, if left out. */
  availableOnS?: number;
}

/** Writes one movement of an account's balance; the balance is the sum of these rows and nothing else. */
export function postBalance(desk: Desk, posting: BalancePosting): Stripe.BalanceTransaction {
  const nowS = desk.clock.nowS();
  const feeMinor = posting.feeMinor ?? 0;
  const availableOnS = Math.max(nowS, posting.availableOnS ?? nowS);
  const row: Stripe.BalanceTransaction = {
    id: newId('txn'),
    object: 'balance_transaction',
    amount: posting.amountMinor,
    available_on: availableOnS,
    balance_type: 'payments',
    created: nowS,
    currency: posting.currency,
    description: posting.description ?? null,
    exchange_rate: null,
    fee: feeMinor,
    fee_details:
      feeMinor === 0
        ? []
        : [
            {
              amount: feeMinor,
              application: null,
              currency: posting.currency,
              description: posting.feeDescription ?? 'Processing fee',
              type: 'stripe_fee',
            },
          ],
    net: posting.amountMinor - feeMinor,
    reporting_category: posting.reportingCategory,
    source: posting.sourceId,
    status: availableOnS <= nowS ? 'available' : 'pending',
    type: posting.type,
  };
  desk.insert('balance_transaction', row, posting.account);
  desk.store
    .sql('INSERT INTO balance_rows (id, account, currency, net_minor, available_on) VALUES (?, ?, ?, ?, ?)')
    .run(row.id, posting.account, posting.currency, row.net, availableOnS);
  if (availableOnS > nowS) desk.schedule('funds_available', posting.account, availableOnS);
  return row;
}

/** The row as it reads now: `status` follows the clock, everything else was fixed when it was written. */
export function currentBalanceTransaction(desk: Desk, row: Stripe.BalanceTransaction): Stripe.BalanceTransaction {
  return { ...row, status: row.available_on <= desk.clock.nowS() ? 'available' : 'pending' };
}

/** Money that can be moved on now. */
export function availableMinor(desk: Desk, account: string, currency: string): number {
  const row = desk.store
    .sql(
      'SELECT coalesce(sum(net_minor), 0) AS total FROM balance_rows WHERE account = ? AND currency = ? AND available_on <= ?',
    )
    .get(account, currency, desk.clock.nowS());
  return (row as { total: number }).total;
}

/** All money, settled or still on its way. */
export function totalMinor(desk: Desk, account: string, currency: string): number {
  const row = desk.store
    .sql('SELECT coalesce(sum(net_minor), 0) AS total FROM balance_rows WHERE account = ? AND currency = ?')
    .get(account, currency);
  return (row as { total: number }).total;
}

export function balanceOf(desk: Desk, account: string): Stripe.Balance {
  const rows = desk.store
    .sql(
      `SELECT currency, sum(iif(available_on <= @nowS, net_minor, 0)) AS available, sum(iif(available_on > @nowS, net_minor, 0)) AS pending
       FROM balance_rows WHERE account = @account GROUP BY currency ORDER BY currency`,
    )
    .all({ account, nowS: desk.clock.nowS() }) as { currency: string; available: number; pending: number }[];
  return {
    object: 'balance',
    available: rows.map((row) => ({
      amount: row.available,
      currency: row.currency,
      source_types: { card: row.available },
    })),
    livemode: false,
    pending: rows.map((row) => ({ amount: row.pending, currency: row.currency, source_types: { card: row.pending } })),
  };
}

/**
 * The fee of a card charge: a share of the amount, half a unit rounded up, plus a fixed part, never more than the amount.
 * Integer arithmetic throughout.
 */
export function chargeFeeMinor(desk: Desk, amountMinor: number): number {
  const share = Math.floor((amountMinor * desk.settings.feeBasisPoints + 5000) / 10_000);
  return Math.min(amountMinor, share + desk.settings.feeFixedMinor);
}
