/** The week of one antenna: what is open, blocked out and sold, on the station's own clock. */
import '@mantine/schedule/styles.css';
import { Anchor, Button, Group, Modal, Select, Skeleton } from '@mantine/core';
import type { Station } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import { availabilityQueries } from '../../lib/availability-queries.js';
import { bookingQueries } from '../../lib/booking-queries.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { useCan } from '../../lib/session.js';
import { stationQueries } from '../../lib/station-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { instantOf, readWallText, wallText, wallTimeOf, weekStart } from '../../lib/zone-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { FilterPart, FilterSentence } from '../../ui/filter-sentence.js';
import { formatCalendarDay } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './availability.module.css';
import { BlackoutForm, type WallSpan } from './blackout-form.js';
import { SHOWN_STATES } from './calendar-events.js';
import { CalendarFileForm } from './calendar-file-form.js';
import { WeekCalendar } from './week-calendar.js';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const WEEK_MS = 7 * DAY_MS;

interface Choice {
  readonly antennaId: string;
  readonly name: string;
  readonly station: Station;
}

export function AvailabilityPage() {
  useTitle('Availability');
  const stations = useQuery(stationQueries.list({ pageSize: 200 }));
  const [search, setSearch] = useSearchParams();
  if (stations.error)
    return (
      <ProblemNotice title="The antennas could not be read" onRetry={() => void stations.refetch()}>
        {sentenceOf(stations.error)}
      </ProblemNotice>
    );
  if (!stations.data) return <Skeleton height={480} />;
  const choices: Choice[] = stations.data.items.flatMap((station) =>
    station.antennas.map((antenna) => ({ antennaId: antenna.id, name: antenna.name, station })),
  );
  const chosen = choices.find((one) => one.antennaId === search.get('antenna')) ?? choices[0];
  if (!chosen)
    return (
      <EmptyState
        title="No antenna yet"
        action={
          <Anchor component={Link} to={paths.stations}>
            Go to your stations
          </Anchor>
        }
      >
        The calendar shows the hours, blackouts and contacts of an antenna.
      </EmptyState>
    );
  const setPart = (name: string, value: string) => {
    const next = new URLSearchParams(search);
    next.set(name, value);
    setSearch(next, { replace: true });
  };
  return (
    <OneWeek
      key={chosen.antennaId}
      chosen={chosen}
      choices={choices}
      week={search.get('week')}
      onAntenna={(id) => setPart('antenna', id)}
      onWeek={(day) => setPart('week', day)}
    />
  );
}

interface OneWeekProps {
  readonly chosen: Choice;
  readonly choices: readonly Choice[];
  /** `2026-11-30`, any day of the week; null for this week. */
  readonly week: string | null;
  readonly onAntenna: (id: string) => void;
  readonly onWeek: (day: string) => void;
}

function OneWeek({ chosen, choices, week, onAntenna, onWeek }: OneWeekProps) {
  const mayWrite = useCan()('stations.write');
  const { timeZone } = chosen.station;
  const nowWallMs = wallTimeOf(serverNowMs(), timeZone);
  const asked = week ? readWallText(week) : Number.NaN;
  const startMs = weekStart(Number.isNaN(asked) ? nowWallMs : asked);
  const [blackout, setBlackout] = useState<WallSpan | null>(null);
  const [isReading, setReading] = useState(false);
  const shown = {
    fromUtc: new Date(instantOf(startMs, timeZone) - DAY_MS).toISOString(),
    toUtc: new Date(instantOf(startMs + WEEK_MS, timeZone) + DAY_MS).toISOString(),
  };
  const calendar = useQuery(availabilityQueries.calendar(chosen.antennaId, shown.fromUtc, shown.toUtc));
  const bookings = useQuery(
    bookingQueries.list({
      antennaId: chosen.antennaId,
      ...shown,
      state: SHOWN_STATES,
      sort: 'aos',
      pageSize: 200,
    }),
  );
  const dayOf = (wallMs: number) => wallText(wallMs).slice(0, 10);
  const error = calendar.error ?? bookings.error;
  const nextHour = Math.ceil(nowWallMs / HOUR_MS) * HOUR_MS;
  return (
    <>
      <div className={classes.head}>
        <FilterSentence>
          The week from <strong>{formatCalendarDay(startMs)}</strong> of{' '}
          <FilterPart name="Antenna" value={chosen.name}>
            {(close) => (
              <Select
                aria-label="Antenna"
                data={groupsOf(choices)}
                value={chosen.antennaId}
                allowDeselect={false}
                searchable
                comboboxProps={{ withinPortal: false }}
                onChange={(id) => {
                  if (id) onAntenna(id);
                  close();
                }}
              />
            )}
          </FilterPart>
        </FilterSentence>
        <Group gap={8}>
          <Button variant="default" onClick={() => onWeek(dayOf(startMs - WEEK_MS))}>
            Week before
          </Button>
          <Button variant="default" onClick={() => onWeek(dayOf(nowWallMs))}>
            This week
          </Button>
          <Button variant="default" onClick={() => onWeek(dayOf(startMs + WEEK_MS))}>
            Week after
          </Button>
          {mayWrite && (
            <>
              <Button variant="default" onClick={() => setReading(true)}>
                Read from a calendar file
              </Button>
              <Button onClick={() => setBlackout({ fromWallMs: nextHour, toWallMs: nextHour + 2 * HOUR_MS })}>
                Block out time
              </Button>
            </>
          )}
        </Group>
      </div>
      {error && (
        <ProblemNotice
          title="The week could not be read"
          onRetry={() => void (calendar.error ? calendar : bookings).refetch()}
        >
          {sentenceOf(error)}
        </ProblemNotice>
      )}
      {!error && (!calendar.data || !bookings.data) && <Skeleton height={560} />}
      {calendar.data && bookings.data && (
        <>
          <p className={classes.quiet}>
            Times on the station's clock, {timeZone.replaceAll('_', ' ')}.
            {mayWrite && ' Drag over free time to block it out.'}{' '}
            <Anchor component={Link} to={paths.antennaTab(chosen.antennaId, 'hours')}>
              Weekly hours
            </Anchor>
          </p>
          <WeekCalendar
            calendar={calendar.data}
            bookings={bookings.data.items}
            weekStartMs={startMs}
            mayWrite={mayWrite}
            onSelect={setBlackout}
          />
        </>
      )}
      <Modal
        opened={blackout !== null}
        onClose={() => setBlackout(null)}
        title="Block out time"
        size="lg"
        closeButtonProps={{ 'aria-label': 'Close' }}
      >
        {blackout && (
          <BlackoutForm
            antennaId={chosen.antennaId}
            antennas={groupsOf(choices)}
            timeZone={timeZone}
            initial={blackout}
            onDone={() => setBlackout(null)}
          />
        )}
      </Modal>
      <Modal
        opened={isReading}
        onClose={() => setReading(false)}
        title="Block out time from a calendar file"
        size="lg"
        closeButtonProps={{ 'aria-label': 'Close' }}
      >
        <CalendarFileForm
          antennaId={chosen.antennaId}
          antennas={groupsOf(choices)}
          timeZone={timeZone}
          onDone={() => setReading(false)}
        />
      </Modal>
    </>
  );
}

function groupsOf(choices: readonly Choice[]) {
  const stations = [...new Map(choices.map((choice) => [choice.station.id, choice.station])).values()];
  return stations.map((station) => ({
    group: station.name,
    items: choices
      .filter((choice) => choice.station.id === station.id)
      .map((choice) => ({ value: choice.antennaId, label: choice.name })),
  }));
}
