/** The run sheet for the wall of a control room: few words, to be read from four metres. */
import type { RunSheet, SheetContact } from '@skyberth/shared';
import { useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import { stationStream, useLive } from '../../lib/live.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useNow } from '../../lib/use-now.js';
import { useTitle } from '../../lib/use-title.js';
import { formatBytes, formatCountdown, formatDayTime, formatDegrees, formatTime } from '../../ui/format.js';
import { useRunSheet } from './run-sheet-queries.js';
import { Direction } from './sheet-tables.js';
import { type DishNow, sheetView } from './sheet-view.js';
import classes from './wall.module.css';

const NEXT_ON_THE_WALL = 3;

export function WallPage() {
  useTitle('Run sheet, wall');
  const [search] = useSearchParams();
  const stationId = search.get('station');
  const { sheet, isOld, error } = useRunSheet(stationId);
  return (
    <div className={classes.wall}>
      {sheet ? (
        <Wall sheet={sheet} isOld={isOld} />
      ) : (
        <h1 className={classes.station}>{error ? sentenceOf(error) : 'Loading the run sheet'}</h1>
      )}
      <Link to={stationId ? `${paths.runSheet}?station=${stationId}` : paths.runSheet} className={classes.close}>
        Back to the run sheet
      </Link>
    </div>
  );
}

function Wall({ sheet, isOld }: { readonly sheet: RunSheet; readonly isOld: boolean }) {
  const nowMs = useNow();
  const client = useQueryClient();
  const refresh = useCallback(() => void client.invalidateQueries({ queryKey: ['run-sheet'] }), [client]);
  useLive(stationStream(sheet.station.id), refresh);
  const view = sheetView(sheet, nowMs);
  const names = new Map(sheet.antennas.map((antenna) => [antenna.id, antenna.name]));
  return (
    <>
      <header className={classes.head}>
        <h1 className={classes.station}>{sheet.station.name}</h1>
        <time className={classes.clock}>{formatTime(nowMs)} UTC</time>
      </header>
      {isOld && (
        <p className={classes.old} role="alert">
          No line. List of {formatDayTime(Date.parse(sheet.asOfUtc))}
        </p>
      )}
      <div className={classes.dishes}>
        {view.dishes.map((dish) => (
          <WallDish key={dish.antenna.id} dish={dish} nowMs={nowMs} />
        ))}
      </div>
      <table className={classes.next}>
        <caption className="sk-hidden">Next contacts</caption>
        <tbody>
          {view.next.slice(0, NEXT_ON_THE_WALL).map((contact) => (
            <tr key={contact.bookingId}>
              <td>{formatTime(Date.parse(contact.aosUtc))}</td>
              <td>{names.get(contact.antennaId)}</td>
              <td>{contact.spacecraftName}</td>
              <td>{formatDegrees(contact.maxElevationDeg, 0)}</td>
              <td>
                <Direction contact={contact} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {view.next.length === 0 && <p className={classes.quiet}>Nothing else in the next 24 hours.</p>}
    </>
  );
}

function WallDish({ dish, nowMs }: { readonly dish: DishNow; readonly nowMs: number }) {
  const { antenna, now, next, isClear } = dish;
  const [first] = now;
  return (
    <section className={classes.dish} data-busy={now.length > 0 || undefined} aria-label={antenna.name}>
      <h2>{antenna.name}</h2>
      {!isClear && (
        <p className={classes.stop}>
          STOP: {antenna.visits.map((visit) => visit.name).join(', ') || antenna.stop?.reason}
        </p>
      )}
      {first && <WallContact contact={first} nowMs={nowMs} />}
      {!first && next && (
        <>
          <strong className={classes.count}>{formatCountdown(Date.parse(next.setupStartsUtc) - nowMs)}</strong>
          <p>turns for {next.spacecraftName}</p>
        </>
      )}
      {!first && !next && <p>free</p>}
    </section>
  );
}

function WallContact({ contact, nowMs }: { readonly contact: SheetContact; readonly nowMs: number }) {
  const [aosMs, losMs] = [Date.parse(contact.aosUtc), Date.parse(contact.losUtc)];
  const untilMs = nowMs < aosMs ? aosMs : losMs;
  const words = nowMs < aosMs ? 'to AOS' : nowMs < losMs ? 'to LOS' : 'teardown';
  const { acquiredUtc, bytes } = contact.reported;
  return (
    <>
      <strong className={classes.count}>{nowMs < losMs ? formatCountdown(untilMs - nowMs) : words}</strong>
      <p>
        {nowMs < losMs && `${words}, `}
        {contact.spacecraftName}
      </p>
      <p>
        {acquiredUtc ? 'acquired' : 'not acquired'}
        {bytes !== null && `, ${formatBytes(bytes)}`}
      </p>
      <p>
        <Direction contact={contact} />
      </p>
    </>
  );
}
