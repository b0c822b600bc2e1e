/** One dish at this moment: the contact on it, or when it moves next by itself, and who is inside its fence. */
import { Anchor, Button, TextInput } from '@mantine/core';
import type { SheetContact } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { bookingQueries } from '../../lib/booking-queries.js';
import { liveQueries } from '../../lib/live.js';
import { paths } from '../../lib/paths.js';
import { usePositionAt } from '../../lib/position.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { Caution } from '../../ui/caution.js';
import { DayTime } from '../../ui/day-time.js';
import { formatBytes, formatCountdown, formatDegrees, formatNumber, formatTime } from '../../ui/format.js';
import { LiveReport } from '../../ui/live-report.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { Figure, Figures } from '../../ui/values.js';
import { PassCurve } from './pass-curve.js';
import classes from './run-sheet.module.css';
import { useEnter, useLeave, useRelease, useStop } from './run-sheet-queries.js';
import { type DishNow, NEED_WORDS, slewWords } from './sheet-view.js';

/** The next contact is near enough to say what it waits for. */
const SOON_MS = 3_600_000;

interface DishProps {
  readonly dish: DishNow;
  readonly nowMs: number;
}

export function DishCard({ dish, nowMs }: DishProps) {
  const { antenna, now } = dish;
  return (
    <section className={classes.dish} data-busy={now.length > 0 || undefined} aria-label={antenna.name}>
      {now.length === 0 && <Parked dish={dish} nowMs={nowMs} />}
      {now.map((contact) => (
        <Running key={contact.bookingId} contact={contact} antennaName={antenna.name} nowMs={nowMs} />
      ))}
      <AtTheDish dish={dish} nowMs={nowMs} />
    </section>
  );
}

function Parked({ dish, nowMs }: DishProps) {
  const { antenna, next } = dish;
  return (
    <>
      <h3 className={classes.dishTitle}>{antenna.name}: free</h3>
      {next ? (
        <>
          <Figures columns={1}>
            <Figure
              label="Turns by itself in"
              value={formatCountdown(Date.parse(next.setupStartsUtc) - nowMs)}
              size="countdown"
            />
          </Figures>
          <p className={classes.quiet}>
            at {formatTime(Date.parse(next.setupStartsUtc))} for {next.spacecraftName}, {slewWords(next)}
          </p>
        </>
      ) : (
        <p className={classes.quiet}>No contact in the next 24 hours.</p>
      )}
    </>
  );
}

interface RunningProps {
  readonly contact: SheetContact;
  readonly antennaName: string;
  readonly nowMs: number;
}

function Running({ contact, antennaName, nowMs }: RunningProps) {
  const { bookingId, reported } = contact;
  const mayReport = useCan()('bookings.report');
  const geometry = useQuery(bookingQueries.geometry(bookingId));
  const orbit = useQuery(liveQueries.orbit(bookingId));
  const positionAt = usePositionAt(orbit.data);
  const [aosMs, losMs] = [Date.parse(contact.aosUtc), Date.parse(contact.losUtc)];
  const [label, untilMs] =
    nowMs < aosMs
      ? ['Until AOS', aosMs]
      : nowMs < losMs
        ? ['Until LOS', losMs]
        : ['Teardown', Date.parse(contact.teardownEndsUtc)];
  const position = positionAt?.(nowMs);
  return (
    <>
      <h3 className={classes.dishTitle}>
        {antennaName}:{' '}
        <Anchor component={Link} to={paths.booking(bookingId)} inherit>
          {contact.spacecraftName}
        </Anchor>
        <small>
          {contact.operatorName}, berth {contact.number}, {NEED_WORDS[contact.need]}
        </small>
      </h3>
      <div className={classes.running}>
        <div>
          <Figures columns={1}>
            <Figure label={label} value={formatCountdown(untilMs - nowMs)} size="countdown" />
          </Figures>
          {position && (
            <Figures columns={2}>
              <Figure label="Azimuth" value={formatDegrees(position.azimuthDeg)} size="large" />
              <Figure label="Elevation" value={formatDegrees(position.elevationDeg)} size="large" />
            </Figures>
          )}
          <p className={classes.quiet}>
            {reported.bytes === null ? 'No bytes reported yet' : formatBytes(reported.bytes)}
            {reported.ebN0Db !== null && `, Eb/N0 ${formatNumber(reported.ebN0Db, 1)} dB`}
          </p>
        </div>
        {geometry.data && <PassCurve detail={geometry.data} nowMs={nowMs} />}
      </div>
      {contact.need !== 'downlink' && (
        <p className={classes.transmits}>
          This contact transmits. Check interlock and beam path; the licence, local rules and a licensed person decide.
        </p>
      )}
      {mayReport && (
        <LiveReport
          bookingId={bookingId}
          name={contact.spacecraftName}
          reported={reported}
          isUnderWay={contact.state === 'under way'}
        />
      )}
    </>
  );
}

/** The two acts that matter at a dish: saying who is there, and keeping it still. */
function AtTheDish({ dish, nowMs }: DishProps) {
  const { antenna, next, isClear, now } = dish;
  const mayAct = useCan()('bookings.report');
  const [asking, setAsking] = useState<'enter' | 'stop' | null>(null);
  const enter = useEnter(antenna.id);
  const stop = useStop(antenna.id);
  const leave = useLeave();
  const release = useRelease(antenna.id);
  const error = enter.error ?? stop.error ?? leave.error ?? release.error;
  const people = antenna.visits.map((visit) => visit.name).join(', ');
  const moves = now[0] ?? next;
  const isMoving = now.some((contact) => contact.state === 'under way');
  const done = () => setAsking(null);
  return (
    <>
      {!isClear && (
        <Caution title={antenna.stop ? `${antenna.name} is kept still` : 'The dish moves without warning'}>
          {antenna.stop && (
            <>
              {antenna.stop.byName} since <DayTime atMs={Date.parse(antenna.stop.sinceUtc)} show="time" />:{' '}
              {antenna.stop.reason}.{' '}
            </>
          )}
          {people && <>Signed in: {people}. </>}
          {isMoving && <strong>The dish moves now: get them out, the emergency stop comes before the contact. </strong>}
          {!isMoving && moves && Date.parse(moves.setupStartsUtc) - nowMs < SOON_MS && (
            <strong>Nothing begins here until {people ? 'they are signed out' : 'it is released'}. </strong>
          )}
          This list stops no motor: lock the drive out by local rules before anybody goes in.
        </Caution>
      )}
      {error && <ProblemNotice title="That was not taken">{sentenceOf(error)}</ProblemNotice>}
      {mayAct && asking && (
        <OneLine
          label={
            asking === 'enter'
              ? `Who goes inside the fence of ${antenna.name}?`
              : `Why is ${antenna.name} to stay still?`
          }
          button={asking === 'enter' ? 'Sign in' : 'Keep it still'}
          isSending={enter.isPending || stop.isPending}
          onSend={(text) => (asking === 'enter' ? enter : stop).mutate(text, { onSuccess: done })}
          onClose={done}
        />
      )}
      {mayAct && !asking && (
        <div className={classes.acts}>
          {antenna.visits.map((visit) => (
            <Button
              key={visit.id}
              variant="default"
              loading={leave.isPending && leave.variables === visit.id}
              onClick={() => leave.mutate(visit.id)}
            >
              {visit.name} has left
            </Button>
          ))}
          <Button variant="default" onClick={() => setAsking('enter')}>
            Someone goes to the dish
          </Button>
          {antenna.stop ? (
            <Button variant="default" loading={release.isPending} onClick={() => release.mutate(undefined)}>
              Let {antenna.name} move
            </Button>
          ) : (
            <Button variant="outline" color="buoy" onClick={() => setAsking('stop')}>
              Keep {antenna.name} still
            </Button>
          )}
        </div>
      )}
    </>
  );
}

interface OneLineProps {
  readonly label: string;
  readonly button: string;
  readonly isSending: boolean;
  readonly onSend: (text: string) => void;
  readonly onClose: () => void;
}

function OneLine({ label, button, isSending, onSend, onClose }: OneLineProps) {
  const [text, setText] = useState('');
  return (
    <form
      className={classes.oneLine}
      onSubmit={(event) => {
        event.preventDefault();
        if (text.trim()) onSend(text);
      }}
    >
      <TextInput
        label={label}
        maxLength={120}
        value={text}
        onChange={(event) => setText(event.currentTarget.value)}
        data-autofocus
      />
      <Button type="submit" loading={isSending}>
        {button}
      </Button>
      <Button variant="default" onClick={onClose}>
        Back
      </Button>
    </form>
  );
}
