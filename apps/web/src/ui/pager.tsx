import { Pagination } from '@mantine/core';

const WORDS = { first: 'First page', previous: 'Page before', next: 'Page after', last: 'Last page' } as const;

interface PagerProps {
  readonly pages: number;
  /** From 1. */
  readonly page: number;
  readonly onChange: (page: number) => void;
}

/** Pages of a list; nothing where there is only one. Every arrow has a name. */
export function Pager({ pages, page, onChange }: PagerProps) {
  if (pages <= 1) return null;
  return (
    <Pagination
      size="sm"
      withEdges
      total={pages}
      value={Math.min(page, pages)}
      onChange={onChange}
      getControlProps={(control) => ({ 'aria-label': WORDS[control] })}
    />
  );
}
