import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { readFilter, type SearchFilter, writeFilter } from './search-filter.js';

export interface FilterInAddress {
  readonly filter: SearchFilter;
  /** Puts a change into the address. A pass or a view replaces the entry; a change of the search is a step to go back. */
  readonly change: (part: Partial<SearchFilter>) => void;
}

export function useSearchFilter(): FilterInAddress {
  const [search, setSearch] = useSearchParams();
  const filter = useMemo(() => readFilter(search), [search]);
  const change = useCallback(
    (part: Partial<SearchFilter>) => {
      const isLook = Object.keys(part).every((name) => ['view', 'passKey', 'part'].includes(name));
      setSearch((now) => writeFilter({ ...readFilter(now), ...part }), { replace: isLook });
    },
    [setSearch],
  );
  return { filter, change };
}
