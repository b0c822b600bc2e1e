/** What may be done with the booking now; only what the API says this person may do is offered. */
import { Button, Textarea } from '@mantine/core';
import type { Booking } from '@skyberth/shared';
import { useState } from 'react';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useSession } from '../../lib/session.js';
import { DayTime } from '../../ui/day-time.js';
import { formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { useAccept, useCancel, useDecline, useLetGo } from './booking-mutations.js';
import classes from './contact.module.css';
import { PaySection } from './pay-section.js';

export function Actions({ booking }: { readonly booking: Booking }) {
  const { actions } = booking;
  return (
    <>
      {actions.includes('pay') && <PaySection booking={booking} />}
      {actions.includes('let go') && <LetGo booking={booking} />}
      {actions.includes('accept') && <Answer booking={booking} />}
      {actions.includes('cancel') && <Cancel booking={booking} />}
    </>
  );
}

function LetGo({ booking }: { readonly booking: Booking }) {
  const letGo = useLetGo(booking.id);
  return (
    <div className={classes.stack}>
      {letGo.error && <ProblemNotice title="The hold stays">{sentenceOf(letGo.error)}</ProblemNotice>}
      <Button variant="default" loading={letGo.isPending} onClick={() => letGo.mutate(undefined)}>
        Let the hold go
      </Button>
    </div>
  );
}

/** The owner's answer to a request. */
function Answer({ booking }: { readonly booking: Booking }) {
  const accept = useAccept(booking.id);
  const decline = useDecline(booking.id);
  const [isDeclining, setDeclining] = useState(false);
  const [reason, setReason] = useState('');
  const error = accept.error ?? decline.error;
  return (
    <section className={classes.box} aria-labelledby="answer-title">
      <h2 id="answer-title" className={classes.heading}>
        Your answer
      </h2>
      {booking.answerByUtc && (
        <p>
          {booking.operatorName} waits for it until <DayTime atMs={Date.parse(booking.answerByUtc)} />. Then the request
          lapses.
        </p>
      )}
      {error && <ProblemNotice title="The answer was not taken">{sentenceOf(error)}</ProblemNotice>}
      {isDeclining ? (
        <>
          <Textarea
            label="Reason; the buyer reads it"
            required
            autosize
            minRows={2}
            maxLength={300}
            value={reason}
            onChange={(event) => setReason(event.currentTarget.value)}
            data-autofocus
          />
          <div className={classes.buttons}>
            <Button
              variant="outline"
              color="buoy"
              disabled={reason.trim() === ''}
              loading={decline.isPending}
              onClick={() => decline.mutate(reason.trim())}
            >
              Decline and release the funds
            </Button>
            <Button variant="default" onClick={() => setDeclining(false)}>
              Back
            </Button>
          </div>
        </>
      ) : (
        <div className={classes.buttons}>
          <Button size="md" loading={accept.isPending} onClick={() => accept.mutate(undefined)}>
            Accept the contact
          </Button>
          <Button size="md" variant="outline" color="buoy" onClick={() => setDeclining(true)}>
            Decline ...
          </Button>
        </div>
      )}
    </section>
  );
}

/** Cancelling in two steps, the second with the sum that comes back. */
function Cancel({ booking }: { readonly booking: Booking }) {
  const isOperator = useSession().active.organisationKind === 'operator';
  const cancel = useCancel(booking.id);
  const [isAsking, setAsking] = useState(false);
  const [reason, setReason] = useState('');
  const refundMinor = booking.refundNowMinor ?? 0;
  const refund = formatMoney({ amountMinor: refundMinor, currency: booking.currency });
  const price = formatMoney({ amountMinor: booking.toPayMinor, currency: booking.currency });
  if (!isAsking)
    return (
      <div className={classes.stack}>
        <Button variant="outline" color="buoy" onClick={() => setAsking(true)}>
          Cancel the contact ...
        </Button>
        <p className={classes.small}>
          {isOperator ? `${refund} of ${price} would come back to you now.` : `The buyer gets all of ${price} back.`}
        </p>
      </div>
    );
  return (
    <section className={classes.box} aria-labelledby="cancel-title">
      <h2 id="cancel-title" className={classes.heading}>
        Cancel this contact?
      </h2>
      <p>
        The time goes back on sale and cannot be had back for certain.{' '}
        {isOperator
          ? `Of ${price}, ${refund} comes back to you by the agreed steps.`
          : `The buyer is refunded ${price}.`}
      </p>
      {cancel.error && <ProblemNotice title="The contact stands">{sentenceOf(cancel.error)}</ProblemNotice>}
      <Textarea
        label="Reason, for the other side"
        autosize
        minRows={2}
        maxLength={300}
        value={reason}
        onChange={(event) => setReason(event.currentTarget.value)}
      />
      <div className={classes.buttons}>
        <Button
          variant="outline"
          color="buoy"
          loading={cancel.isPending}
          onClick={() => cancel.mutate({ reason: reason.trim(), expectedRefundMinor: refundMinor })}
        >
          {isOperator ? `Cancel and get ${refund} back` : `Cancel and refund ${refund}`}
        </Button>
        <Button variant="default" onClick={() => setAsking(false)}>
          Keep the contact
        </Button>
      </div>
    </section>
  );
}
