import { Button, Skeleton } from '@mantine/core';
import { useInfiniteQuery } from '@tanstack/react-query';
import { sentenceOf } from '../../lib/problem-fields.js';
import { EmptyState } from '../../ui/empty-state.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { JournalTable } from './journal-table.js';
import { ledgerQueries } from './ledger-queries.js';
import type { LedgerFilter } from './ledger-view.js';

interface JournalSectionProps {
  readonly filter: LedgerFilter;
  readonly onAccount: (account: string, currency: string) => void;
}

/** Entries of every account, newest first, more of them on request. */
export function JournalSection({ filter, onAccount }: JournalSectionProps) {
  const { currency, bookingNumber, fromMonth, toMonth } = filter;
  const journal = useInfiniteQuery(ledgerQueries.journal({ currency, bookingNumber, fromMonth, toMonth }));
  const entries = journal.data?.pages.flatMap((page) => page.items) ?? [];
  return (
    <section aria-label="Journal" aria-busy={journal.isFetching}>
      {journal.error && (
        <ProblemNotice title="The journal could not be read" onRetry={() => void journal.refetch()}>
          {sentenceOf(journal.error)}
        </ProblemNotice>
      )}
      {journal.isPending && <Skeleton height={420} />}
      {journal.data && entries.length === 0 && (
        <EmptyState title="No entry here">The first one is written when a contact is reported and charged.</EmptyState>
      )}
      {entries.length > 0 && <JournalTable entries={entries} onAccount={onAccount} />}
      {journal.hasNextPage && (
        <Button
          variant="default"
          mt="md"
          loading={journal.isFetchingNextPage}
          onClick={() => void journal.fetchNextPage()}
        >
          Show older entries
        </Button>
      )}
    </section>
  );
}
