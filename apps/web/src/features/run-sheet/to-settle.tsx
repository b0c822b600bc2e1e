/** What needs a person before the contacts can run, and which of them transmit. */
import { Anchor } from '@mantine/core';
import type { SheetAntenna, SheetConflict, SheetContact } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { Caution } from '../../ui/caution.js';
import { DayTime } from '../../ui/day-time.js';
import { formatTime } from '../../ui/format.js';
import classes from './run-sheet.module.css';

interface ToSettleProps {
  readonly conflicts: readonly SheetConflict[];
  readonly asked: readonly SheetContact[];
  readonly antennas: readonly SheetAntenna[];
}

export function ToSettle({ conflicts, asked, antennas }: ToSettleProps) {
  const count = conflicts.length + asked.length;
  if (count === 0) return null;
  return (
    <section className={classes.settle} aria-labelledby="settle-title">
      <h2 id="settle-title" className={classes.heading}>
        {count === 1 ? 'One thing to settle' : `${count} things to settle`}
      </h2>
      <ul>
        {asked.map((contact) => (
          <li key={contact.bookingId}>
            <strong>
              {formatTime(Date.parse(contact.aosUtc))}, {nameOf(antennas, contact.antennaId)}.
            </strong>{' '}
            {contact.spacecraftName} asks.{' '}
            {contact.answerByUtc && (
              <>
                Answer by <DayTime atMs={Date.parse(contact.answerByUtc)} show="time" />.{' '}
              </>
            )}
            <Anchor component={Link} to={paths.requests}>
              Answer it
            </Anchor>
          </li>
        ))}
        {conflicts.map((conflict) => (
          <li key={`${conflict.bookingId} ${conflict.kind} ${conflict.sentence}`}>
            {conflict.sentence}{' '}
            {conflict.kind === 'blackout' ? (
              <Anchor component={Link} to={paths.availabilityOf(conflict.antennaId)}>
                Move it
              </Anchor>
            ) : (
              <Anchor component={Link} to={paths.booking(conflict.bookingId)}>
                Open the contact
              </Anchor>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}

const nameOf = (antennas: readonly SheetAntenna[], id: string): string =>
  antennas.find((antenna) => antenna.id === id)?.name ?? '';

export function Transmitting({
  contacts,
  antennas,
}: Pick<ToSettleProps, 'antennas'> & { contacts: readonly SheetContact[] }) {
  if (contacts.length === 0) return null;
  return (
    <Caution title="Transmitting in the next 24 hours">
      {contacts
        .map((contact) => `${nameOf(antennas, contact.antennaId)} at ${formatTime(Date.parse(contact.aosUtc))}`)
        .join(', ')}
      . Check clearance, interlock and beam path before each. Uplink power is a hazard to people near the beam; local
      rules, the licence and licensed persons come first.
    </Caution>
  );
}
