/** One contact, from the hold to the report: where it goes, what it costs, what happened and what may be done now. */
import { Skeleton } from '@mantine/core';
import type { Booking, PassDetail } from '@skyberth/shared';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { useParams, useSearchParams } from 'react-router-dom';
import { bookingQueries } from '../../lib/booking-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useSession } from '../../lib/session.js';
import { useNow } from '../../lib/use-now.js';
import { useTitle } from '../../lib/use-title.js';
import { BookingBadge } from '../../ui/booking-badge.js';
import { Caution } from '../../ui/caution.js';
import { DayTime } from '../../ui/day-time.js';
import { formatDuration, formatNumber } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Actions } from './actions.js';
import classes from './contact.module.css';
import { ContactFiles } from './contact-files.js';
import { ContactPicture } from './contact-picture.js';
import { DisputeSection } from './dispute-section.js';
import { DriftSection } from './drift-section.js';
import { countdown } from './in-order.js';
import { InOrderList } from './in-order-list.js';
import { LiveSection, useLiveContact } from './live-section.js';
import { MessagesSection } from './messages-section.js';
import { MoneySection } from './money-section.js';
import { PaymentReturn } from './payment-return.js';
import { ReportSection } from './report-section.js';

const POLL_MS = 1_500;
const LOOK_AGAIN_MS = 30_000;

export function ContactPage() {
  const { id = '' } = useParams();
  const [search] = useSearchParams();
  const isBack = search.get('paid') === '1';
  const booking = useQuery({
    ...bookingQueries.one(id),
    // Back from the payment page the provider's word may be seconds behind; otherwise things change slowly.
    refetchInterval: ({ state }) => (isBack && state.data?.state === 'held' ? POLL_MS : LOOK_AGAIN_MS),
  });
  useListsFollow(booking.data?.state);
  useTitle(booking.data ? `Berth ${booking.data.number}` : 'Contact');
  if (booking.error && !booking.data)
    return (
      <ProblemNotice title="This contact could not be opened" onRetry={() => void booking.refetch()}>
        {sentenceOf(booking.error)}
      </ProblemNotice>
    );
  if (!booking.data) return <Skeleton height={600} aria-label="Loading the contact" />;
  return <Contact booking={booking.data} isBack={isBack} />;
}

/** A state that changed while the page looked on (paid, begun, ended) is news for the tray, the lists and the board. */
function useListsFollow(state: Booking['state'] | undefined): void {
  const client = useQueryClient();
  const [known, setKnown] = useState(state);
  useEffect(() => {
    if (state === known) return;
    setKnown(state);
    if (known === undefined) return;
    void client.invalidateQueries({ queryKey: ['bookings', 'list'] });
    void client.invalidateQueries({ queryKey: ['passes'] });
  }, [client, state, known]);
}

function Contact({ booking, isBack }: { readonly booking: Booking; readonly isBack: boolean }) {
  const geometry = useQuery(bookingQueries.geometry(booking.id));
  const detail = geometry.data;
  const live = useLiveContact(booking);
  return (
    <>
      <PageTitle
        title={`${booking.spacecraftName} at ${booking.antennaName}`}
        badge={<BookingBadge state={booking.state} />}
        actions={<CountdownFigure booking={booking} />}
      >
        <Summary booking={booking} detail={detail} />
      </PageTitle>
      {isBack && <PaymentReturn booking={booking} />}
      <div className={classes.columns}>
        <div className={classes.picture}>
          {geometry.error && (
            <ProblemNotice title="The sky and the curves could not be computed" onRetry={() => void geometry.refetch()}>
              {sentenceOf(geometry.error)}
            </ProblemNotice>
          )}
          {geometry.isPending && <Skeleton height={420} />}
          {detail && <ContactPicture booking={booking} detail={detail} />}
          <div className={classes.below}>
            <ContactFiles booking={booking} />
            <MoneySection booking={booking} />
            <MessagesSection booking={booking} />
          </div>
        </div>
        <aside className={classes.side} aria-label="What happened and what to do">
          <LiveSection booking={booking} live={live} />
          <DriftSection booking={booking} spacecraftId={detail?.spacecraft.id} />
          <Actions booking={booking} />
          <ReportSection booking={booking} />
          <DisputeSection booking={booking} />
          {detail?.cautions.map((one) => (
            <Caution key={one.title} title={one.title}>
              {one.text}
            </Caution>
          ))}
          <InOrderList booking={booking} detail={detail} live={live.events} />
        </aside>
      </div>
    </>
  );
}

const NEED_WORDS: Readonly<Record<Booking['need'], string>> = {
  downlink: 'Downlink, receive only.',
  uplink: 'Uplink.',
  both: 'Downlink and uplink.',
};

function Summary({ booking, detail }: { readonly booking: Booking; readonly detail: PassDetail | undefined }) {
  const isOwner = useSession().active.organisationKind === 'owner';
  const [aosMs, losMs] = [Date.parse(booking.aosUtc), Date.parse(booking.losUtc)];
  return (
    <>
      Berth {booking.number}, <DayTime atMs={aosMs} placeTimeZone={booking.stationTimeZone} /> to{' '}
      <DayTime atMs={losMs} show="time" placeTimeZone={booking.stationTimeZone} />, {formatDuration(losMs - aosMs)}.{' '}
      {NEED_WORDS[booking.need]} {isOwner ? `For ${booking.operatorName}.` : `By ${booking.ownerName}.`}
      {detail && (
        <>
          <br />
          <SourceSentence booking={booking} detail={detail} />
        </>
      )}
    </>
  );
}

/** What the figures below were computed from, and what the contact was sold on where that was something else. */
function SourceSentence({ booking, detail }: { readonly booking: Booking; readonly detail: PassDetail }) {
  const { source, ephemeris, elements } = detail;
  const soldOn = booking.soldOn === source ? null : ` Sold on ${SOLD_ON_WORDS[booking.soldOn]}.`;
  if (elements.timingErrorS === null)
    return (
      <>
        By the operator’s own ephemeris ({ephemeris?.source}).{soldOn}
      </>
    );
  return (
    <>
      {source === 'both' && `By the operator’s own ephemeris (${ephemeris?.source ?? ''}) where it reaches, else by `}
      {source === 'both' ? 'elements' : 'Element set'} of <DayTime atMs={Date.parse(elements.epochUtc)} />,{' '}
      {formatDuration(elements.ageH * 3_600_000)} old, <strong>±{formatNumber(elements.timingErrorS, 1)} s</strong>
      {elements.freshness === 'fresh' ? '.' : `: ${elements.freshness}.`}
      {soldOn}
    </>
  );
}

const SOLD_ON_WORDS: Readonly<Record<Booking['soldOn'], string>> = {
  'element set': 'the element set',
  ephemeris: 'an ephemeris',
  both: 'an ephemeris and the element set',
};

function CountdownFigure({ booking }: { readonly booking: Booking }) {
  const left = countdown(booking, useNow());
  if (!left) return null;
  return (
    <div className={classes.countdown} role="timer" aria-live="off" aria-label={left.spoken}>
      <span aria-hidden="true">{left.label}</span>
      <strong aria-hidden="true">{left.text}</strong>
    </div>
  );
}
