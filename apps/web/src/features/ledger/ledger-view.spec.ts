import { describe, expect, it } from 'vitest';
import { byCurrency, readFilter, writeFilter } from './ledger-view.js';

describe('the ledger as it is read', () => {
  it('parts currencies, and sums each to zero when debits meet credits', () => {
    const [eur, usd] = byCurrency([
      { account: 'owner payable', currency: 'EUR', balanceMinor: -9_200 },
      { account: 'provider clearing', currency: 'EUR', balanceMinor: 10_000 },
      { account: 'marketplace fee', currency: 'EUR', balanceMinor: -800 },
      { account: 'bank', currency: 'USD', balanceMinor: 5 },
    ]);
    expect(eur?.rows.map((row) => row.account)).toEqual(['provider clearing', 'owner payable', 'marketplace fee']);
    expect(eur?.sumMinor).toBe(0);
    expect(usd?.sumMinor).toBe(5);
  });

  it('keeps an account it has no words for, last', () => {
    const [only] = byCurrency([
      { account: 'new thing', currency: 'EUR', balanceMinor: 1 },
      { account: 'bank', currency: 'EUR', balanceMinor: -1 },
    ]);
    expect(only?.rows.at(-1)).toEqual({ account: 'new thing', side: null, holds: '', balanceMinor: 1 });
  });

  it('carries the filter in the address, there and back', () => {
    const filter = { account: 'owner payable', page: 3 };
    expect(readFilter(new URLSearchParams(writeFilter(filter)))).toEqual(filter);
    expect(readFilter(new URLSearchParams('page=-2'))).toEqual({ account: undefined, page: 1 });
    expect(writeFilter({ account: undefined, page: 1 })).toEqual({});
  });
});
