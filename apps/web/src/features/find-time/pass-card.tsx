/** The picked pass: where it goes, what it carries, what it costs, and the one button that holds it. */
import { Anchor, Skeleton } from '@mantine/core';
import type { BookingSummary, FoundPass, PassDetail, SearchResult } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { RefundSteps } from '../../drawing/curves/refund-steps.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useNow } from '../../lib/use-now.js';
import { Caution } from '../../ui/caution.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './find-time.module.css';
import { findTimeQueries, type PassRequest } from './find-time-queries.js';
import { HoldButton } from './hold-button.js';
import { JoinLine } from './join-line.js';
import { PassFigures, SkyAndTimes } from './pass-figures.js';
import { PartLinks, ReasonSentences } from './pass-reasons.js';
import { refundSteps, standing } from './pass-words.js';
import { PriceSum } from './price-sum.js';
import type { SearchFilter } from './search-filter.js';

export interface PassCardProps {
  readonly result: SearchResult;
  readonly pass: FoundPass;
  readonly booking: BookingSummary | undefined;
  readonly filter: SearchFilter;
  readonly onChange: (part: Partial<SearchFilter>) => void;
  readonly onHeld: () => void;
}

export function PassCard(props: PassCardProps) {
  const { result, pass, booking, filter } = props;
  const nowMs = useNow();
  const request = requestOf(pass, filter, booking);
  const { data, error, refetch } = useQuery(findTimeQueries.detail(request));
  const antenna = result.stations.flatMap((one) => one.antennas).find((one) => one.id === pass.antennaId);
  const craft = result.spacecraft.find((one) => one.id === pass.spacecraftId);
  const [aosMs, losMs] = [Date.parse(request.aosUtc), Date.parse(request.losUtc)];
  const isPart = pass.state === 'part for sale' && filter.part !== null;
  return (
    <>
      <h2 className={classes.cardTitle}>
        {craft?.name} over {antenna?.name}
      </h2>
      <p className={classes.cardLead}>
        {standing(isPart ? 'for sale' : pass.state, aosMs, losMs, nowMs)}
        {isPart && ' This is the part that can be had.'}
      </p>
      {error && (
        <ProblemNotice title="This pass could not be shown in full" onRetry={() => void refetch()}>
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      {!data && !error && <CardSkeleton />}
      {data && <CardBody {...props} detail={data} request={request} />}
    </>
  );
}

/** What the card asks about: the part that was chosen, what was booked of it, or the whole pass. */
function requestOf(pass: FoundPass, filter: SearchFilter, booking: BookingSummary | undefined): PassRequest {
  const part = filter.part === null ? undefined : pass.parts[filter.part];
  const { aosUtc, losUtc } = booking ?? part ?? pass.parts.find(() => pass.state === 'for sale') ?? pass.geometry;
  const { need, bands } = filter;
  return { antennaId: pass.antennaId, spacecraftId: pass.spacecraftId, need, bands: [...bands], aosUtc, losUtc };
}

function CardBody(props: PassCardProps & { readonly detail: PassDetail; readonly request: PassRequest }) {
  const { pass, booking, detail, request, filter, onChange, onHeld } = props;
  const nowMs = useNow(30_000);
  const offersPart = pass.state === 'part for sale' && filter.part === null;
  const reasons = pass.bookingId ? [] : offersPart ? pass.reasons : detail.reasons;
  const { quote } = detail;
  const isTaken =
    !pass.bookingId && reasons.length > 0 && reasons.every(({ code }) => code === 'taken' || code === 'turn');
  const isForSale = quote !== null && !pass.bookingId && !offersPart && reasons.length === 0;
  return (
    <>
      <SkyAndTimes detail={detail} />
      <PassFigures detail={detail} />
      {reasons.length > 0 && (
        <section className={classes.part} aria-label="Why it is not for sale">
          <ReasonSentences pass={{ ...pass, reasons }} />
          {offersPart && <PartLinks pass={pass} onPart={(part) => onChange({ part })} />}
        </section>
      )}
      {isForSale && (
        <>
          <PriceSum quote={quote} />
          <section className={classes.part} aria-labelledby="refund-title">
            <h3 id="refund-title" className={classes.small}>
              Back to you if you cancel
            </h3>
            <RefundSteps steps={refundSteps(quote.ladder, nowMs)} />
          </section>
        </>
      )}
      {detail.cautions.map((one) => (
        <Caution key={one.title} title={one.title}>
          {one.text}
        </Caution>
      ))}
      {isForSale && <HoldButton detail={detail} quote={quote} request={request} onHeld={onHeld} />}
      {isTaken && !offersPart && (
        <JoinLine key={`${request.antennaId} ${request.spacecraftId} ${request.aosUtc}`} request={request} />
      )}
      {booking && (
        <Anchor component={Link} to={paths.booking(booking.id)}>
          Open berth {booking.number}
        </Anchor>
      )}
    </>
  );
}

function CardSkeleton() {
  return (
    <div role="status" aria-label="Loading the pass">
      <Skeleton height={150} mb="md" />
      <Skeleton height={120} mb="md" />
      <Skeleton height={100} />
    </div>
  );
}
