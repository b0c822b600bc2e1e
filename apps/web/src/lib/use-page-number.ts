import { useSearchParams } from 'react-router-dom';

/** The page of a list, from 1, kept in the address as `?page=2` so that a list keeps its place. */
export function usePageNumber(): readonly [page: number, setPage: (page: number) => void] {
  const [search, setSearch] = useSearchParams();
  const setPage = (page: number) =>
    setSearch((now) => {
      const next = new URLSearchParams(now);
      if (page === 1) next.delete('page');
      else next.set('page', String(page));
      return next;
    });
  return [readPage(search.get('page')), setPage];
}

const LAST_PAGE = 100_000;

/** A whole number from 1; anything else is the first page. */
export function readPage(text: string | null): number {
  const page = Number(text);
  return Number.isInteger(page) && page >= 1 && page <= LAST_PAGE ? page : 1;
}
