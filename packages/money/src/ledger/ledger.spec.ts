import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { percentOf } from '../rounding.js';
import { balancesOf, checkLedger } from './balances.js';
import {
  adjustmentEntry,
  captureEntry,
  chargebackEntry,
  feeEntry,
  payoutArrivedEntry,
  payoutEntry,
  providerCostEntry,
  refundCreditedEntry,
  refundEntry,
  refundReturnedEntry,
  releaseEntry,
  reserveEntry,
  roundingEntry,
  saleEntry,
  withdrawalEntry,
  writeOffEntry,
} from './builders.js';
import { credit, debit, type EntryHead, type JournalEntry, journalEntry, reverseEntry } from './entry.js';

const operatorId = 'operator';
const ownerId = 'owner';
let serial = 0;
const head = (cause: string, currency = 'EUR'): EntryHead => ({ causeKey: `${cause}:${++serial}`, cause, currency });
const balance = (entries: readonly JournalEntry[], account: string): number =>
  balancesOf(entries)
    .filter((each) => each.account === account)
    .reduce((sum, each) => sum + each.amountMinor, 0);

describe('journal entries', () => {
  it('cannot be built out of balance, without a cause, or with nothing in them', () => {
    expect(() => journalEntry(head('odd'), [debit('bank', 2), credit('rounding', 1)])).toThrow(
      'out of balance by 1 minor units of EUR',
    );
    expect(() => journalEntry({ ...head('x'), cause: ' ' }, [debit('bank', 1), credit('rounding', 1)])).toThrow(
      'needs its cause',
    );
    expect(() => journalEntry(head('nothing'), [debit('bank', 0)])).toThrow('moves nothing');
  });

  it('want the organisation where the account has one, and none elsewhere', () => {
    expect(() => journalEntry(head('x'), [debit('owner payable', 1), credit('bank', 1)])).toThrow(
      '“owner payable” needs the organisation',
    );
    expect(() => journalEntry(head('x'), [debit('bank', 1, ownerId), credit('rounding', 1)])).toThrow(
      'belongs to the marketplace alone',
    );
  });

  it('take back a mistake by its opposite', () => {
    const entry = payoutEntry(head('payout'), { ownerId, amountMinor: 500 });
    const both = [entry, reverseEntry(entry, { causeKey: 'payout failed', cause: 'the transfer failed' })];
    expect(balancesOf(both).every((each) => each.amountMinor === 0)).toBe(true);
  });

  it('refuse amounts below zero and a reserve larger than the refund', () => {
    expect(() => captureEntry(head('capture'), { operatorId, amountMinor: -1 })).toThrow('never below zero');
    expect(() =>
      refundEntry(head('refund'), {
        operatorId,
        ownerId,
        netMinor: 5,
        vatMinor: 0,
        fromReserveMinor: 6,
        feeMinor: 0,
        feeVatMinor: 0,
      }),
    ).toThrow('cannot come out of the reserve');
  });
});

describe('the life of a contact', () => {
  it('leaves the owner net less fee, the tax office VAT, and nobody else anything', () => {
    const entries = [
      saleEntry(head('sale'), { operatorId, ownerId, netMinor: 10_000, vatMinor: 2_500 }),
      captureEntry(head('capture'), { operatorId, amountMinor: 12_500 }),
      feeEntry(head('fee'), { ownerId, feeMinor: 800, vatMinor: 200 }),
      providerCostEntry(head('cost'), { amountMinor: 150 }),
      payoutEntry(head('payout'), { ownerId, amountMinor: 9_000 }),
      payoutArrivedEntry(head('arrived'), { ownerId, amountMinor: 9_000 }),
    ];
    expect(checkLedger(entries, { providerBalanceMinor: { EUR: 3_350 } })).toEqual([]);
    expect([
      balance(entries, 'operator receivable'),
      balance(entries, 'owner payable'),
      balance(entries, 'VAT'),
      balance(entries, 'marketplace fee'),
    ]).toEqual([0, 0, -2_700, -800]);
  });

  it('undoes everything with a full refund out of the reserve', () => {
    const entries = [
      saleEntry(head('sale'), { operatorId, ownerId, netMinor: 10_000, vatMinor: 0 }),
      captureEntry(head('capture'), { operatorId, amountMinor: 10_000 }),
      feeEntry(head('fee'), { ownerId, feeMinor: 800, vatMinor: 0 }),
      reserveEntry(head('reserve'), { ownerId, amountMinor: 9_200 }),
      refundEntry(head('refund'), {
        operatorId,
        ownerId,
        netMinor: 10_000,
        vatMinor: 0,
        fromReserveMinor: 9_200,
        feeMinor: 800,
        feeVatMinor: 0,
      }),
      refundReturnedEntry(head('returned'), { operatorId, amountMinor: 10_000 }),
    ];
    expect(checkLedger(entries, { providerBalanceMinor: { EUR: 0 } })).toEqual([]);
    expect(balancesOf(entries).every((each) => each.amountMinor === 0)).toBe(true);
  });

  it('finds a refund returned twice, a cause written twice, an owner in debt and a provider that differs', () => {
    const returned = refundReturnedEntry(head('returned'), { operatorId, amountMinor: 100 });
    const entries = [
      refundEntry(head('refund'), {
        operatorId,
        ownerId,
        netMinor: 100,
        vatMinor: 0,
        fromReserveMinor: 0,
        feeMinor: 0,
        feeVatMinor: 0,
      }),
      returned,
      returned,
    ];
    expect(checkLedger(entries, { providerBalanceMinor: { EUR: -100 } }).map((fault) => fault.kind)).toEqual([
      'repeated cause',
      'owner owes',
      'wrong side',
      'provider differs',
    ]);
    expect(checkLedger(entries.slice(0, 2), { ownersInDebtWithCause: new Set([ownerId]) })).toEqual([]);
  });

  it('finds an entry that was changed after it was written', () => {
    const entry = captureEntry(head('capture'), { operatorId, amountMinor: 100 });
    const changed = {
      ...entry,
      postings: entry.postings.map((posting, index) => (index === 0 ? { ...posting, amountMinor: 99 } : posting)),
    };
    expect(checkLedger([changed]).map((fault) => fault.kind)).toEqual(['unbalanced entry', 'unbalanced currency']);
  });
});

describe('any sequence of entries', () => {
  const amount = fc.integer({ min: 1, max: 10_000_000 });
  const currency = fc.constantFrom('EUR', 'JPY', 'KWD');
  const any = fc
    .tuple(fc.integer({ min: 0, max: 13 }), amount, amount, currency)
    .map(([kind, a, b, code]): JournalEntry => {
      const of = head('step', code);
      const small = percentOf(a, 800);
      const all: (() => JournalEntry)[] = [
        () => saleEntry(of, { operatorId, ownerId, netMinor: a, vatMinor: b }),
        () => captureEntry(of, { operatorId, amountMinor: a }),
        () => feeEntry(of, { ownerId, feeMinor: small + 1, vatMinor: small }),
        () => providerCostEntry(of, { amountMinor: a }),
        () =>
          refundEntry(of, {
            operatorId,
            ownerId,
            netMinor: a,
            vatMinor: b,
            fromReserveMinor: small,
            feeMinor: small,
            feeVatMinor: 0,
          }),
        () => refundReturnedEntry(of, { operatorId, amountMinor: a }),
        () => refundCreditedEntry(of, { operatorId, amountMinor: a }),
        () => reserveEntry(of, { ownerId, amountMinor: a }),
        () => releaseEntry(of, { ownerId, amountMinor: a }),
        () => payoutArrivedEntry(of, { ownerId, amountMinor: a }),
        () => adjustmentEntry(of, { ownerId, amountMinor: a - b || 1 }),
        () => chargebackEntry(of, { operatorId, amountMinor: a }),
        () => writeOffEntry(of, { operatorId, amountMinor: a }),
        () => (a > b ? withdrawalEntry(of, { amountMinor: a }) : roundingEntry(of, { differenceMinor: -a })),
      ];
      return (all[kind] as () => JournalEntry)();
    });

  it('sums to zero in every currency, and balances are the same in any order', () => {
    fc.assert(
      fc.property(fc.array(any, { maxLength: 40 }), (entries) => {
        const balances = balancesOf(entries);
        for (const code of ['EUR', 'JPY', 'KWD'])
          expect(
            balances.filter((each) => each.currency === code).reduce((sum, each) => sum + each.amountMinor, 0),
          ).toBe(0);
        expect(balancesOf([...entries].reverse())).toEqual(balances);
        expect(
          checkLedger(entries).some(
            (fault) => fault.kind === 'unbalanced entry' || fault.kind === 'unbalanced currency',
          ),
        ).toBe(false);
      }),
    );
  });
});
