/** The way to a dispute over this contact, or into the one that there is. */
import { Anchor, Button } from '@mantine/core';
import { type Booking, routes } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { useCan } from '../../lib/session.js';
import classes from './contact.module.css';

const OVER: readonly Booking['state'][] = ['reporting', 'settled', 'failed', 'in dispute'];

export function DisputeSection({ booking }: { readonly booking: Booking }) {
  const mayRead = useCan()('disputes.read');
  const { data } = useQuery({
    queryKey: ['disputes', 'of', booking.id, booking.state],
    queryFn: ({ signal }) => call(routes.listDisputes, { query: { bookingId: booking.id }, signal }),
    enabled: mayRead && OVER.includes(booking.state),
  });
  const dispute = data?.items[0];
  if (dispute)
    return (
      <section className={classes.box} aria-labelledby="dispute-title">
        <h2 id="dispute-title" className={classes.heading}>
          Dispute {dispute.number}
        </h2>
        <Anchor component={Link} to={paths.dispute(dispute.id)}>
          {dispute.state === 'open' || dispute.state === 'appealed'
            ? 'Evidence, statements and what comes next'
            : 'How it was decided'}
        </Anchor>
      </section>
    );
  if (!data || !booking.actions.includes('dispute')) return null;
  return (
    <section className={classes.box} aria-labelledby="dispute-title">
      <h2 id="dispute-title" className={classes.heading}>
        Not how it was?
      </h2>
      <p>Within 14 days of LOS you may dispute the contact. The money is then set aside until it is decided.</p>
      <div className={classes.buttons}>
        <Button component={Link} to={paths.openDispute(booking.id)} variant="default">
          Dispute this contact
        </Button>
      </div>
    </section>
  );
}
