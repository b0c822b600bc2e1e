/** Disputes of the organisation, or for an admin all of them. */
import { Anchor, SegmentedControl, Skeleton, Table } from '@mantine/core';
import { DISPUTE_STATES } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useTitle } from '../../lib/use-title.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatDuration } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { Pager } from '../../ui/pager.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StateBadge } from '../../ui/state-badge.js';
import { MoneyText } from '../../ui/values.js';
import { disputeQueries } from './dispute-queries.js';
import { REASON_WORDS, STATE_BADGES } from './dispute-words.js';
import classes from './disputes.module.css';

const PAGE_SIZE = 50;
const CHOICES = ['waiting', 'decided', 'closed', 'all'] as const;
const CHOICE_WORDS = { waiting: 'Waiting', decided: 'Decided', closed: 'Closed', all: 'All' } as const;

export function DisputesPage() {
  useTitle('Disputes');
  const [search, setSearch] = useSearchParams();
  const choice = CHOICES.find((one) => one === search.get('state')) ?? 'waiting';
  const page = Math.max(1, Math.floor(Number(search.get('page'))) || 1);
  const state =
    choice === 'all' ? undefined : choice === 'waiting' ? choice : DISPUTE_STATES.find((one) => one === choice);
  const { data, error, isPending, refetch } = useQuery(
    disputeQueries.list({ page, pageSize: PAGE_SIZE, ...(state ? { state } : {}) }),
  );
  return (
    <>
      <PageTitle
        title="Disputes"
        actions={
          <SegmentedControl
            aria-label="Disputes by state"
            data={CHOICES.map((value) => ({ value, label: CHOICE_WORDS[value] }))}
            value={choice}
            onChange={(next) => setSearch(next === 'waiting' ? {} : { state: next })}
          />
        }
      >
        {data && `${data.total} ${data.total === 1 ? 'dispute' : 'disputes'} here.`}
      </PageTitle>
      {error && (
        <ProblemNotice title="The disputes could not be read" onRetry={() => void refetch()}>
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      {isPending && <Skeleton height={240} aria-label="Loading disputes" />}
      {data?.items.length === 0 && (
        <EmptyState title={choice === 'waiting' ? 'No dispute waits' : 'No dispute in this state'}>
          An operator may dispute a contact within 14 days of its LOS, on its page.
        </EmptyState>
      )}
      {data && data.items.length > 0 && (
        <div className={classes.scroll}>
          <Table>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>Dispute</Table.Th>
                <Table.Th>Contact</Table.Th>
                <Table.Th>AOS</Table.Th>
                <Table.Th>Reason</Table.Th>
                <Table.Th ta="right">Without data</Table.Th>
                <Table.Th ta="right">Price</Table.Th>
                <Table.Th>Decide by</Table.Th>
                <Table.Th>State</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {data.items.map((one) => (
                <Table.Tr key={one.id}>
                  <Table.Td>
                    <Anchor component={Link} to={paths.dispute(one.id)}>
                      {one.number}
                    </Anchor>
                  </Table.Td>
                  <Table.Td>
                    {one.spacecraftName} at {one.antennaName}
                    <div className={classes.quiet}>
                      {one.operatorName}, {one.ownerName}
                    </div>
                  </Table.Td>
                  <Table.Td>
                    <DayTime atMs={Date.parse(one.aosUtc)} />
                  </Table.Td>
                  <Table.Td>{REASON_WORDS[one.reason]}</Table.Td>
                  <Table.Td ta="right">{one.gapS === null ? 'not named' : formatDuration(one.gapS * 1000)}</Table.Td>
                  <Table.Td ta="right">
                    <MoneyText amountMinor={one.priceMinor} currency={one.currency} />
                  </Table.Td>
                  <Table.Td>
                    <DayTime atMs={Date.parse(one.decideByUtc)} />
                  </Table.Td>
                  <Table.Td>
                    <StateBadge tone={STATE_BADGES[one.state].tone}>{STATE_BADGES[one.state].words}</StateBadge>
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
          <Pager
            pages={Math.ceil(data.total / PAGE_SIZE)}
            page={data.page}
            onChange={(next) => setSearch({ state: choice, page: String(next) })}
          />
        </div>
      )}
    </>
  );
}
