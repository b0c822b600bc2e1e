/** What was found: the price and its proof, what cannot be met, what holds the price up, and what each spacecraft gets. */
import { Paper, Table } from '@mantine/core';
import type { Plan, PlanOutcome } from '@skyberth/shared';
import { useIsPhone } from '../../lib/use-phone.js';
import { formatBytes, formatDuration, formatMoney, formatNumber } from '../../ui/format.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './plan.module.css';

const HOUR_MS = 3_600_000;

export function PlanPrice({ outcome }: { readonly outcome: PlanOutcome }) {
  const { sums, passes, gapPercent, proven, greedyMinor, costMinor, baseCurrency, offered, tookS } = outcome;
  const isPhone = useIsPhone();
  const fresh = passes.filter((pass) => pass.bookedBefore === null).length;
  const had = passes.length - fresh;
  const saved = greedyMinor === null ? null : greedyMinor - costMinor;
  return (
    <Figures columns={isPhone ? 1 : 4}>
      <Figure
        label="New contacts, with VAT"
        size="effect"
        value={sums.map((sum) => formatMoney(sum)).join(' and ') || 'nothing'}
        note={`${fresh} to buy${had > 0 ? `, ${had} bought before` : ''}`}
      />
      <Figure label="Proof" value={proofWords(gapPercent, proven)} note={`from ${formatNumber(offered)} offers`} />
      <Figure
        label="Saved against picking by hand"
        value={savedWords(saved, baseCurrency)}
        note="that is, taking the cheapest pass that helps, each time"
      />
      <Figure label="Took" value={formatNumber(tookS, 1)} unit="s" />
    </Figures>
  );
}

function savedWords(savedMinor: number | null, currency: string): string {
  if (savedMinor === null) return 'By hand it gets stuck';
  return savedMinor > 0 ? formatMoney({ amountMinor: savedMinor, currency }) : 'Nothing';
}

function proofWords(gapPercent: number, proven: boolean): string {
  if (!proven) return 'The best that was found in the time';
  if (gapPercent === 0) return 'Proven cheapest';
  return `At most ${formatNumber(Math.max(0.01, gapPercent), 2)} % could be saved`;
}

export function PlanFindings({ outcome }: { readonly outcome: PlanOutcome }) {
  const { unmet, binding, lostKeys } = outcome;
  return (
    <>
      {unmet.length > 0 && (
        <Paper component="section" withBorder className={classes.card} aria-label="What cannot be met">
          <h2>What cannot be met, and what would do</h2>
          <ul className={classes.findings}>
            {unmet.map((each) => (
              <li key={each.sentence}>{each.sentence}</li>
            ))}
          </ul>
        </Paper>
      )}
      {lostKeys.length > 0 && (
        <p className={classes.small} role="status">
          {lostKeys.length === 1 ? 'A pass' : `${lostKeys.length} passes`} that you kept in cannot be bought any more.
        </p>
      )}
      <Paper component="section" withBorder className={classes.card} aria-label="What binds">
        <h2>What holds the price up</h2>
        {binding.length === 0 ? (
          <p className={classes.small}>No single limit does: asking for a little less would save next to nothing.</p>
        ) : (
          <ul className={classes.findings}>
            {binding.map((each) => (
              <li key={each.sentence}>{each.sentence}</li>
            ))}
          </ul>
        )}
      </Paper>
    </>
  );
}

export function PlanFigures({ plan, outcome }: { readonly plan: Plan; readonly outcome: PlanOutcome }) {
  const names = new Map(outcome.passes.map((pass) => [pass.spacecraftId, pass.spacecraftName]));
  const commands = plan.need.craft.some((craft) => craft.uplinkEveryH !== null);
  return (
    <div className={classes.scroll}>
      <Table aria-label="What each spacecraft gets">
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Spacecraft</Table.Th>
            <Table.Th ta="right">Contacts</Table.Th>
            <Table.Th ta="right">Fewest on a day</Table.Th>
            <Table.Th ta="right">Least volume on a day</Table.Th>
            <Table.Th ta="right">Longest gap</Table.Th>
            {commands && <Table.Th ta="right">Longest without uplink</Table.Th>}
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {outcome.figures.map((each) => (
            <Table.Tr key={each.spacecraftId}>
              <Table.Td>{names.get(each.spacecraftId) ?? 'A spacecraft without a contact'}</Table.Td>
              <Table.Td ta="right">{each.contacts}</Table.Td>
              <Table.Td ta="right">{each.fewestPerDay}</Table.Td>
              <Table.Td ta="right">{formatBytes(each.leastBytesPerDay)}</Table.Td>
              <Table.Td ta="right">{formatDuration(each.longestGapH * HOUR_MS)}</Table.Td>
              {commands && <Table.Td ta="right">{formatDuration(each.longestUplinkGapH * HOUR_MS)}</Table.Td>}
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}
