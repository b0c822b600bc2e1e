/** The ephemerides of a spacecraft, and the way to withdraw one. */
import { Anchor, Button, Skeleton } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { type EphemerisSummary, routes, type Spacecraft } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { spacecraftQueries } from '../../lib/spacecraft-queries.js';
import { DayTime } from '../../ui/day-time.js';
import { formatNumber } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { StateBadge } from '../../ui/state-badge.js';
import { ephemerisState } from './ephemeris-words.js';
import classes from './spacecraft.module.css';

interface EphemerisListProps {
  readonly craft: Spacecraft;
  readonly mayWrite: boolean;
}

export function EphemerisList({ craft, mayWrite }: EphemerisListProps) {
  const kept = useQuery(spacecraftQueries.ephemerides(craft.id));
  const items = kept.data?.items ?? [];
  return (
    <section aria-labelledby="ephemerides">
      <div className={classes.headingLine}>
        <h2 id="ephemerides" className={classes.heading}>
          Own ephemerides
        </h2>
        {mayWrite && (
          <Anchor component={Link} to={`${paths.addElements}?craft=${craft.id}&kind=ephemeris`}>
            Give an ephemeris
          </Anchor>
        )}
      </div>
      {kept.error && (
        <ProblemNotice title="The ephemerides could not be read" onRetry={() => void kept.refetch()}>
          {sentenceOf(kept.error)}
        </ProblemNotice>
      )}
      {kept.isPending && <Skeleton height={60} />}
      {kept.data && items.length === 0 && (
        <p className={classes.help}>
          None. Passes of {craft.name} come from its element sets; an orbit ephemeris message is used instead inside its
          span.
        </p>
      )}
      {items.length > 0 && (
        <ul className={classes.plainList}>
          {items.map((one) => (
            <OneEphemeris key={one.id} craftId={craft.id} one={one} mayWrite={mayWrite} />
          ))}
        </ul>
      )}
    </section>
  );
}

const TONES = { withdrawn: 'quiet', 'to come': 'quiet', 'in use': 'good', over: 'quiet' } as const;
const WORDS = { withdrawn: 'Withdrawn', 'to come': 'To come', 'in use': 'In use', over: 'Over' } as const;

interface OneEphemerisProps {
  readonly craftId: string;
  readonly one: EphemerisSummary;
  readonly mayWrite: boolean;
}

function OneEphemeris({ craftId, one, mayWrite }: OneEphemerisProps) {
  const state = ephemerisState(one, serverNowMs());
  return (
    <li data-on={state === 'in use' || undefined}>
      <strong>
        <DayTime atMs={Date.parse(one.startUtc)} /> to <DayTime atMs={Date.parse(one.stopUtc)} />
      </strong>{' '}
      <StateBadge tone={TONES[state]}>{WORDS[state]}</StateBadge>
      <div>
        {formatNumber(one.states)} states in {one.segments === 1 ? 'one segment' : `${one.segments} segments`},{' '}
        {one.frame}. {one.interpolation}. {one.objectName}, {one.objectId}, from {one.originator}.
      </div>
      <div className={classes.quiet}>
        {one.source}, by {one.addedByName} on <DayTime atMs={Date.parse(one.addedUtc)} />
        {one.withdrawnUtc && (
          <>
            ; withdrawn by {one.withdrawnByName} on <DayTime atMs={Date.parse(one.withdrawnUtc)} />
          </>
        )}
      </div>
      {mayWrite && state !== 'withdrawn' && <Withdraw craftId={craftId} one={one} />}
    </li>
  );
}

function Withdraw({ craftId, one }: Omit<OneEphemerisProps, 'mayWrite'>) {
  const client = useQueryClient();
  const withdraw = useMutation({
    mutationFn: () => call(routes.withdrawEphemeris, { params: { id: craftId, ephemerisId: one.id } }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: spacecraftQueries.all });
      void client.invalidateQueries({ queryKey: ['passes'] });
      void client.invalidateQueries({ queryKey: ['bookings'] });
      notifications.show({ message: 'The ephemeris is withdrawn. It stays in the record.' });
    },
  });
  const ask = () =>
    modals.openConfirmModal({
      title: 'Withdraw this ephemeris?',
      children:
        'Passes in its span are computed from the element set again, or from another ephemeris that reaches them. Booked contacts keep their times; what they were sold on stays on record.',
      labels: { confirm: 'Withdraw it', cancel: 'Keep using it' },
      confirmProps: { color: 'buoy', variant: 'outline' },
      onConfirm: () => withdraw.mutate(),
    });
  return (
    <div>
      {withdraw.error && <ProblemNotice title="It stays in use">{sentenceOf(withdraw.error)}</ProblemNotice>}
      <Button variant="default" size="compact-sm" onClick={ask} loading={withdraw.isPending}>
        Withdraw
      </Button>
    </div>
  );
}
