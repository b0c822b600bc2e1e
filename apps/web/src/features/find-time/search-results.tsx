/** What was found, in the view that the address asks for. */
import { Skeleton } from '@mantine/core';
import type { BookingSummary, SearchResult } from '@skyberth/shared';
import { lazy, Suspense } from 'react';
import { ResultsBoard } from './results-board.js';
import type { SearchFilter } from './search-filter.js';

const ResultsTable = lazy(() => import('./results-table.js'));
const ResultsCalendar = lazy(() => import('./results-calendar.js'));
const ResultsMap = lazy(() => import('./results-map.js'));

export interface ResultsProps {
  readonly result: SearchResult;
  readonly bookings: readonly BookingSummary[];
  readonly limits: { readonly fromMs: number; readonly toMs: number };
  readonly filter: SearchFilter;
  readonly onChange: (part: Partial<SearchFilter>) => void;
}

export function SearchResults(props: ResultsProps) {
  const { view } = props.filter;
  if (view === 'board') return <ResultsBoard {...props} />;
  return (
    <Suspense fallback={<Skeleton height={420} />}>
      {view === 'table' && <ResultsTable {...props} />}
      {view === 'calendar' && <ResultsCalendar {...props} />}
      {view === 'map' && <ResultsMap {...props} />}
    </Suspense>
  );
}
