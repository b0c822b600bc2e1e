import { Switch, Table } from '@mantine/core';
import { useMemo, useState } from 'react';
import { StateGlyph } from '../../drawing/tide-board/state-glyph.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { Pager } from '../../ui/pager.js';
import { Degrees, Duration, MoneyText } from '../../ui/values.js';
import classes from './find-time.module.css';
import { type PassRow, passRows, type Sort, sortRows } from './pass-rows.js';
import type { ResultsProps } from './search-results.js';

const PAGE = 50;

/** The same passes as a table; default export so that it loads only when asked for. */
export default function ResultsTable({ result, filter, onChange }: ResultsProps) {
  const [offeredOnly, setOfferedOnly] = useState(false);
  const rows = useMemo(() => passRows(result), [result]);
  const shown = offeredOnly ? rows.filter((row) => row.priceMinor !== null) : rows;
  return (
    <>
      <Switch
        label="Only what is for sale, as a whole or in part"
        checked={offeredOnly}
        onChange={(event) => setOfferedOnly(event.currentTarget.checked)}
        mb="sm"
      />
      <PassTable rows={shown} pickedKey={filter.passKey} onPick={(passKey) => onChange({ passKey, part: null })} />
    </>
  );
}

interface PassTableProps {
  readonly rows: readonly PassRow[];
  readonly pickedKey: string | null;
  readonly onPick: (key: string) => void;
}

export function PassTable({ rows, pickedKey, onPick }: PassTableProps) {
  const [sort, setSort] = useState<Sort>('aos');
  const [page, setPage] = useState(1);
  const sorted = useMemo(() => sortRows(rows, sort), [rows, sort]);
  const pages = Math.max(1, Math.ceil(sorted.length / PAGE));
  const at = Math.min(page, pages);
  if (rows.length === 0)
    return (
      <EmptyState level={3} title="No pass to show">
        Nothing rises high and long enough in this period. Widen the limits of the sentence above.
      </EmptyState>
    );
  const head = (label: string, by: Sort, align: 'left' | 'right' = 'left') => (
    <Table.Th
      ta={align}
      aria-sort={sort === by ? (by === 'aos' || by === 'price' ? 'ascending' : 'descending') : 'none'}
    >
      <button type="button" className={classes.sort} onClick={() => setSort(by)} data-on={sort === by || undefined}>
        {label}
      </button>
    </Table.Th>
  );
  return (
    <>
      <div className={classes.scroll}>
        <Table>
          <Table.Thead>
            <Table.Tr>
              {head('AOS', 'aos')}
              <Table.Th>Spacecraft</Table.Th>
              <Table.Th>Antenna</Table.Th>
              {head('Length', 'length', 'right')}
              {head('Highest', 'highest', 'right')}
              <Table.Th>Standing</Table.Th>
              {head('Price before VAT', 'price', 'right')}
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {sorted.slice((at - 1) * PAGE, at * PAGE).map((row) => (
              <Row key={row.key} row={row} isPicked={row.key === pickedKey} onPick={onPick} />
            ))}
          </Table.Tbody>
        </Table>
      </div>
      <Pager pages={pages} page={at} onChange={setPage} />
    </>
  );
}

const WORDS: Readonly<Record<PassRow['pass']['state'], string>> = {
  'for sale': 'for sale',
  'part for sale': 'in part',
  'not for sale': 'not for sale',
  held: 'held by you',
  asked: 'owner asked',
  berth: 'your berth',
  'under way': 'under way',
  done: 'done',
};

const GLYPHS = {
  'for sale': 'forSale',
  'part for sale': 'notForSale',
  'not for sale': 'notForSale',
  held: 'held',
  asked: 'asked',
  berth: 'berth',
  'under way': 'berth',
  done: 'berth',
} as const;

function Row({ row, isPicked, onPick }: { row: PassRow; isPicked: boolean; onPick: (key: string) => void }) {
  const { pass } = row;
  const [reason] = pass.reasons;
  return (
    <Table.Tr className={classes.row} data-picked={isPicked || undefined} onClick={() => onPick(row.key)}>
      <Table.Td>
        <button type="button" className={classes.link} aria-pressed={isPicked} onClick={() => onPick(row.key)}>
          <DayTime atMs={row.aosMs} />
        </button>
      </Table.Td>
      <Table.Td>{row.spacecraftName}</Table.Td>
      <Table.Td>{row.antennaName}</Table.Td>
      <Table.Td ta="right">
        <Duration ms={row.lengthMs} />
      </Table.Td>
      <Table.Td ta="right">
        <Degrees deg={row.highestDeg} />
      </Table.Td>
      <Table.Td title={reason?.sentence}>
        <span className={classes.standing}>
          <StateGlyph glyph={GLYPHS[pass.state]} />
          {reason && !pass.bookingId ? reason.word : WORDS[pass.state]}
        </span>
      </Table.Td>
      <Table.Td ta="right">
        {row.priceMinor !== null && pass.currency ? (
          <MoneyText amountMinor={row.priceMinor} currency={pass.currency} />
        ) : (
          <span className={classes.small}>none</span>
        )}
      </Table.Td>
    </Table.Tr>
  );
}
