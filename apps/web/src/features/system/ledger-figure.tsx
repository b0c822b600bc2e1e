/** When the ledger was checked last, and what did not hold; the sentences themselves are finance's to read. */
import { routes } from '@skyberth/shared';
import { queryOptions, useQuery } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { DayTime } from '../../ui/day-time.js';
import { formatNumber } from '../../ui/format.js';
import { Figure } from '../../ui/values.js';

const ledgerCheckQuery = () =>
  queryOptions({
    queryKey: ['system', 'ledger-check'],
    queryFn: ({ signal }) => call(routes.systemLedgerCheck, { signal }),
  });

export function LedgerFigure() {
  const { data } = useQuery(ledgerCheckQuery());
  if (!data) return <Figure label="Check of the ledger" value="…" />;
  if (data.atUtc === null) return <Figure label="Check of the ledger" value="none yet" note="it runs every night" />;
  return (
    <Figure
      label="Check of the ledger"
      value={data.faults === 0 ? 'Everything holds' : `${data.faults} faults`}
      tone={data.faults === 0 ? 'good' : 'bad'}
      note={
        <>
          <DayTime atMs={Date.parse(data.atUtc)} />, {formatNumber(data.postings)} lines
        </>
      }
    />
  );
}
