/** The ledger as finance reads it: pages that go back in time from a place, and balances that are sums of few rows. */
import { Injectable } from '@nestjs/common';
import { monthOf, monthSpan } from '@skyberth/money';
import type { QueryOf, ResponseOf, routes } from '@skyberth/shared';
import { LedgerRepository, type Place, type Span, type StoredLine } from './ledger.repository.js';

type JournalQuery = QueryOf<typeof routes.journal>;
type LinesQuery = QueryOf<typeof routes.ledgerLines>;

@Injectable()
export class LedgerReading {
  constructor(private readonly repository: LedgerRepository) {}

  journal(query: JournalQuery): ResponseOf<typeof routes.journal> {
    const { currency, bookingNumber, limit } = query;
    const after = placeOf(query.after);
    const found = this.repository.entries({ span: spanOf(query), currency, bookingNumber, after, limit: limit + 1 });
    const entries = found.slice(0, limit);
    const ids = entries.flatMap((entry) => entry.postings.flatMap((posting) => posting.organisationId ?? []));
    const names = this.repository.names([...new Set(ids)]);
    const last = entries.at(-1);
    return {
      items: entries.map((entry) => ({
        id: entry.id,
        atUtc: new Date(entry.atMs).toISOString(),
        cause: entry.cause,
        bookingNumber: entry.bookingNumber,
        bookingId: entry.bookingId,
        currency: entry.currency,
        postings: entry.postings.map(({ account, organisationId, amountMinor }) => ({
          account,
          organisationId,
          organisationName: nameOf(names, organisationId),
          amountMinor,
        })),
      })),
      next: found.length > limit && last ? cursorOf({ atMs: last.atMs, entryId: last.id, line: 0 }) : null,
    };
  }

  /** Postings of an account with the balance after each; one walk along an index and a sum within the first line's month. */
  lines(query: LinesQuery): ResponseOf<typeof routes.ledgerLines> {
    const { account, currency, organisationId, limit } = query;
    const filter = { account, currency, organisationId };
    const found = this.repository.lines(filter, { span: spanOf(query), after: placeOf(query.after), limit: limit + 1 });
    const lines = found.slice(0, limit);
    const names = this.repository.names([...new Set(lines.flatMap((line) => line.organisationId ?? []))]);
    const [first, last] = [lines[0], lines.at(-1)];
    let balanceMinor = first ? this.balanceAfter(filter, first) : 0;
    const items = lines.map(({ line: _line, atMs, ...rest }) => {
      const after = balanceMinor;
      balanceMinor -= rest.amountMinor;
      return {
        ...rest,
        atUtc: new Date(atMs).toISOString(),
        organisationName: nameOf(names, rest.organisationId),
        balanceMinor: after,
      };
    });
    return {
      items,
      next: found.length > limit && last ? cursorOf(last) : null,
      ...this.sumsOf(query),
    };
  }

  balances(): ResponseOf<typeof routes.balances> {
    const balances = new Map<string, { account: string; currency: string; balanceMinor: number }>();
    for (const { account, currency, debitMinor, creditMinor } of this.repository.sums({})) {
      const key = `${currency} ${account}`;
      const before = balances.get(key)?.balanceMinor ?? 0;
      balances.set(key, { account, currency, balanceMinor: before + debitMinor - creditMinor });
    }
    return { items: [...balances.values()] };
  }

  parties(query: { account: string; currency: string }): ResponseOf<typeof routes.partyBalances> {
    const sums = this.repository.sums(query).filter((one) => one.organisationId !== '');
    const names = this.repository.names(sums.map((one) => one.organisationId));
    const items = sums.map(({ organisationId, debitMinor, creditMinor }) => ({
      organisationId,
      organisationName: names.get(organisationId) ?? organisationId,
      balanceMinor: debitMinor - creditMinor,
    }));
    return { items: items.sort((a, b) => Math.abs(b.balanceMinor) - Math.abs(a.balanceMinor)) };
  }

  months(query: QueryOf<typeof routes.ledgerMonths>): ResponseOf<typeof routes.ledgerMonths> {
    const running = new Map<string, number>();
    const items = this.repository.months(query.currency).map((row) => {
      const balanceMinor = (running.get(row.account) ?? 0) + row.debitMinor - row.creditMinor;
      running.set(row.account, balanceMinor);
      return { ...row, balanceMinor };
    });
    const { fromMonth = '', toMonth = '9999-12' } = query;
    return { items: items.filter(({ month }) => month >= fromMonth && month <= toMonth) };
  }

  private balanceAfter(
    filter: { account: string; currency: string; organisationId: string | undefined },
    line: StoredLine,
  ): number {
    const month = monthOf(line.atMs);
    const earlier = this.repository
      .sums({ ...filter, before: month })
      .reduce((sum, one) => sum + one.debitMinor - one.creditMinor, 0);
    return earlier + this.repository.movedUpTo(filter, monthSpan(month), line);
  }

  private sumsOf({ account, currency, organisationId, fromMonth, toMonth }: LinesQuery) {
    const filter = { account, currency, organisationId };
    const inside = this.repository.sums({ ...filter, fromMonth, toMonth });
    const earlier = fromMonth === undefined ? [] : this.repository.sums({ ...filter, before: fromMonth });
    const openingMinor = earlier.reduce((sum, one) => sum + one.debitMinor - one.creditMinor, 0);
    const debitMinor = inside.reduce((sum, one) => sum + one.debitMinor, 0);
    const creditMinor = inside.reduce((sum, one) => sum + one.creditMinor, 0);
    return {
      openingMinor,
      debitMinor,
      creditMinor,
      closingMinor: openingMinor + debitMinor - creditMinor,
      postings: inside.reduce((sum, one) => sum + one.postings, 0),
    };
  }
}

const nameOf = (names: ReadonlyMap<string, string>, id: string | null): string | null =>
  id === null ? null : (names.get(id) ?? null);

const spanOf = (query: { fromMonth?: string | undefined; toMonth?: string | undefined }): Span => ({
  fromMs: query.fromMonth === undefined ? null : monthSpan(query.fromMonth).fromMs,
  toMs: query.toMonth === undefined ? null : monthSpan(query.toMonth).toMs,
});

const cursorOf = (place: Place): string => `${place.atMs}_${place.entryId}_${place.line}`;

/** The contract has checked the form. */
function placeOf(cursor: string | undefined): Place | null {
  if (cursor === undefined) return null;
  const [atMs = '', entryId = '', line = ''] = cursor.split('_');
  return { atMs: Number(atMs), entryId, line: Number(line) };
}
