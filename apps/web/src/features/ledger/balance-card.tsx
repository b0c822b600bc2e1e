import { Anchor, Paper } from '@mantine/core';
import { formatMoney } from '../../ui/format.js';
import { Sign } from '../../ui/signs.js';
import classes from './ledger.module.css';
import { type CurrencyBalances, SIDE_WORDS } from './ledger-view.js';

interface BalanceCardProps {
  readonly balances: CurrencyBalances;
  readonly picked: string | undefined;
  readonly onPick: (account: string | undefined) => void;
}

/** What each account holds in one currency, and whether both sides are level. */
export function BalanceCard({ balances, picked, onPick }: BalanceCardProps) {
  const { currency, rows, sumMinor } = balances;
  return (
    <Paper component="section" withBorder className={classes.card} aria-label={`Balances in ${currency}`}>
      <h2>Balances, {currency}</h2>
      <table className={classes.balances}>
        <tbody>
          {rows.map((row, index) => (
            <tr
              key={row.account}
              data-picked={row.account === picked || undefined}
              data-first={row.side !== rows[index - 1]?.side || undefined}
            >
              <th scope="row">
                {row.side !== rows[index - 1]?.side && row.side && <small>{SIDE_WORDS[row.side]}</small>}
                <Anchor
                  component="button"
                  type="button"
                  aria-pressed={row.account === picked}
                  onClick={() => onPick(row.account === picked ? undefined : row.account)}
                >
                  {row.account}
                </Anchor>
                <span className={classes.holds}>{row.holds}</span>
              </th>
              <td data-quiet={row.balanceMinor === 0 || undefined}>
                {formatMoney({ amountMinor: row.balanceMinor, currency })}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className={sumMinor === 0 ? classes.level : classes.off}>
        <Sign shape={sumMinor === 0 ? 'check' : 'square'} />
        {sumMinor === 0
          ? 'Debits and credits are level to the cent.'
          : `Debits and credits differ by ${formatMoney({ amountMinor: sumMinor, currency })}. Stop and look.`}
      </p>
    </Paper>
  );
}
