import { Paper } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { formatMoney } from '../../ui/format.js';
import classes from './ledger.module.css';
import { ledgerQueries } from './ledger-queries.js';
import { type ChartMonth, chartMonths } from './ledger-view.js';

const WIDTH = 300;
const HEIGHT = 120;

/** What operators were charged, what of it is ours and what owners were owed at the end, by month; drawn and as a table. */
export function LedgerChart({ currency }: { readonly currency: string }) {
  const months = useQuery(ledgerQueries.months(currency));
  const data = chartMonths(months.data?.items ?? []);
  if (data.length === 0) return null;
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency });
  return (
    <Paper component="section" withBorder className={classes.card} aria-label={`By month, ${currency}`}>
      <h2>By month, {currency}</h2>
      <Bars data={data} />
      <table className={classes.months}>
        <thead>
          <tr>
            <th scope="col">Month</th>
            <th scope="col" data-bar="sold">
              Charged
            </th>
            <th scope="col" data-bar="fee">
              Our fee
            </th>
            <th scope="col" data-bar="owed">
              Owed at its end
            </th>
          </tr>
        </thead>
        <tbody>
          {data.map((row) => (
            <tr key={row.month}>
              <th scope="row">{row.month}</th>
              <td>{money(row.soldMinor)}</td>
              <td>{money(row.feeMinor)}</td>
              <td>{money(row.owedMinor)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </Paper>
  );
}

/** Three bars a month: solid, brass, and an outline. The table below says the same, so the drawing is hidden from readers. */
function Bars({ data }: { readonly data: readonly ChartMonth[] }) {
  const top = Math.max(1, ...data.flatMap((row) => [row.soldMinor, row.feeMinor, row.owedMinor]));
  const step = WIDTH / data.length;
  const bar = Math.min(14, step / 4);
  const height = (minor: number) => (Math.max(0, minor) / top) * (HEIGHT - 8);
  return (
    <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} className={classes.bars} aria-hidden="true" focusable="false">
      {data.map((row, index) => (
        <g key={row.month} transform={`translate(${index * step + (step - 3 * bar) / 2} 0)`}>
          {(['sold', 'fee', 'owed'] as const).map((name, place) => {
            const tall = height({ sold: row.soldMinor, fee: row.feeMinor, owed: row.owedMinor }[name]);
            return <rect key={name} data-bar={name} x={place * bar} y={HEIGHT - tall} width={bar - 2} height={tall} />;
          })}
        </g>
      ))}
      <line x1="0" x2={WIDTH} y1={HEIGHT - 0.5} y2={HEIGHT - 0.5} />
    </svg>
  );
}
