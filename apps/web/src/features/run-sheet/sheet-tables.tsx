/** What comes next, and later: the time, the dish, where it turns and whether it can. */
import { Anchor } from '@mantine/core';
import type { RunSheet, SheetContact } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { DayTime } from '../../ui/day-time.js';
import { formatDegrees, formatDuration } from '../../ui/format.js';
import { Sign } from '../../ui/signs.js';
import classes from './run-sheet.module.css';
import { NEED_WORDS, slewWords } from './sheet-view.js';

interface TableProps {
  readonly sheet: RunSheet;
  readonly contacts: readonly SheetContact[];
}

const dishName = (sheet: RunSheet, contact: SheetContact): string =>
  sheet.antennas.find((antenna) => antenna.id === contact.antennaId)?.name ?? '';

export function NextTable({ sheet, contacts, nowMs }: TableProps & { readonly nowMs: number }) {
  if (contacts.length === 0) return null;
  return (
    <section aria-labelledby="next-title">
      <h2 id="next-title" className={classes.heading}>
        Next
      </h2>
      <div className={classes.scroll}>
        <table className={classes.table}>
          <thead className="sk-hidden">
            <tr>
              <th>Set-up in</th>
              <th>Spacecraft</th>
              <th>Dish</th>
              <th>AOS to LOS</th>
              <th>Turn</th>
              <th>Direction</th>
            </tr>
          </thead>
          <tbody>
            {contacts.map((contact) => (
              <tr key={contact.bookingId} data-misfit={(contact.slew && !contact.slew.fits) || undefined}>
                <td>
                  <strong>{formatDuration(Date.parse(contact.setupStartsUtc) - nowMs)}</strong>
                  <small>to set-up</small>
                </td>
                <td>
                  <Anchor component={Link} to={paths.booking(contact.bookingId)} fw={700} inherit>
                    {contact.spacecraftName}
                  </Anchor>
                  <small>{contact.operatorName}</small>
                </td>
                <td>
                  <strong>{dishName(sheet, contact)}</strong>
                  <small>berth {contact.number}</small>
                </td>
                <td>
                  <strong>
                    <DayTime atMs={Date.parse(contact.aosUtc)} show="time" />
                  </strong>
                  <small>
                    to <DayTime atMs={Date.parse(contact.losUtc)} show="time" />,{' '}
                    {formatDegrees(contact.maxElevationDeg)}
                  </small>
                </td>
                <td>
                  {slewWords(contact)}
                  {contact.slew && !contact.slew.fits && <strong className={classes.bad}>not enough time</strong>}
                </td>
                <td>
                  <Direction contact={contact} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}

export function LaterTable({ sheet, contacts }: TableProps) {
  if (contacts.length === 0) return null;
  return (
    <section aria-labelledby="later-title">
      <h2 id="later-title" className={classes.heading}>
        Later
      </h2>
      <div className={classes.scroll}>
        <table className={classes.later}>
          <thead className="sk-hidden">
            <tr>
              <th>AOS</th>
              <th>Dish</th>
              <th>Spacecraft</th>
              <th>Length</th>
              <th>Highest</th>
              <th>Direction</th>
            </tr>
          </thead>
          <tbody>
            {contacts.map((contact) => (
              <tr key={contact.bookingId}>
                <td>
                  <strong>
                    <DayTime atMs={Date.parse(contact.aosUtc)} />
                  </strong>
                </td>
                <td>{dishName(sheet, contact)}</td>
                <td>
                  <Anchor component={Link} to={paths.booking(contact.bookingId)} fw={700} inherit>
                    {contact.spacecraftName}
                  </Anchor>
                </td>
                <td>{formatDuration(Date.parse(contact.losUtc) - Date.parse(contact.aosUtc))}</td>
                <td>{formatDegrees(contact.maxElevationDeg)}</td>
                <td>
                  <Direction contact={contact} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}

/** Red with an arrow up means transmitting; an asked contact never looks like a sold one. */
export function Direction({ contact }: { readonly contact: SheetContact }) {
  if (contact.state === 'awaiting owner') return <span className={classes.asked}>asked, not yet yours</span>;
  const isUp = contact.need !== 'downlink';
  return (
    <span className={classes.direction} data-up={isUp || undefined}>
      <Sign shape={isUp ? 'up' : 'down'} /> {NEED_WORDS[contact.need]}
    </span>
  );
}
