import { describe, expect, it } from 'vitest';
import { byCurrency, chartMonths, monthsBack, readFilter, writeFilter } from './ledger-view.js';

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
    const filter = {
      account: 'owner payable',
      currency: 'EUR',
      organisationId: '0190b6a8-0000-7000-8000-000000000001',
      bookingNumber: 1001,
      fromMonth: '2026-11',
      toMonth: undefined,
    };
    expect(readFilter(new URLSearchParams(writeFilter(filter)))).toEqual(filter);
    const nothing = readFilter(new URLSearchParams('berth=-2&currency=euro&fromMonth=2026-13'));
    expect(Object.values(nothing).every((value) => value === undefined)).toBe(true);
    expect(writeFilter(nothing)).toEqual({});
  });

  it('offers months back over the turn of a year', () => {
    expect(monthsBack(3, Date.UTC(2026, 0, 31))).toEqual(['2026-01', '2025-12', '2025-11']);
  });

  it('draws what owners were owed on, also in a month without a line of theirs', () => {
    const line = { debitMinor: 0, creditMinor: 0 };
    const rows = chartMonths([
      { ...line, month: '2026-01', account: 'owner payable', creditMinor: 900, balanceMinor: -900 },
      { ...line, month: '2026-02', account: 'marketplace fee', creditMinor: 80, balanceMinor: -80 },
    ]);
    expect(rows).toEqual([
      { month: '2026-01', soldMinor: 0, feeMinor: 0, owedMinor: 900 },
      { month: '2026-02', soldMinor: 0, feeMinor: 80, owedMinor: 900 },
    ]);
  });
});
