/** Paying for a hold: a saved card at one click, or the payment page, where a card may be kept for next time. */
import { Button, Checkbox, Radio, Stack } from '@mantine/core';
import type { Booking } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { paymentQueries } from '../../lib/booking-queries.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCheckout } from '../../lib/use-checkout.js';
import { formatMoney } from '../../ui/format.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AccountChoice } from './account-choice.js';
import classes from './contact.module.css';

const OTHER = 'other';

export function PaySection({ booking }: { readonly booking: Booking }) {
  const { data } = useQuery(paymentQueries.cards());
  const checkout = useCheckout();
  const cards = data?.items ?? [];
  const [chosen, setChosen] = useState<string | null>(null);
  const [keeps, setKeeps] = useState(false);
  const card = cards.find((one) => one.id === (chosen ?? cards[0]?.id));
  const price = formatMoney({ amountMinor: booking.toPayMinor, currency: booking.currency });
  return (
    <section className={classes.box} aria-labelledby="pay-title">
      <h2 id="pay-title" className={classes.heading}>
        Pay and confirm
      </h2>
      {checkout.error && <ProblemNotice title="Nothing was paid">{sentenceOf(checkout.error)}</ProblemNotice>}
      {cards.length > 0 && (
        <Radio.Group aria-label="Card" value={card?.id ?? OTHER} onChange={setChosen}>
          <Stack gap="xs">
            {cards.map((one) => (
              <Radio
                key={one.id}
                value={one.id}
                label={`${one.brand} ending ${one.last4}`}
                description={`valid until ${one.expires}`}
              />
            ))}
            <Radio value={OTHER} label="Another card" />
          </Stack>
        </Radio.Group>
      )}
      {!card && (
        <Checkbox
          checked={keeps}
          onChange={(event) => setKeeps(event.currentTarget.checked)}
          label="Keep the card for the next contact"
        />
      )}
      <Button
        size="md"
        fullWidth
        loading={checkout.isPending}
        onClick={() =>
          checkout.mutate({ bookingId: booking.id, savedCardId: card?.id ?? null, saveCard: !card && keeps })
        }
      >
        {card ? `Pay ${price} with card ending ${card.last4}` : `Pay ${price} on the payment page`}
      </Button>
      <AccountChoice booking={booking} />
      <p className={classes.small}>
        By card, the sum is reserved now and taken once the contact has taken place. Until then you may cancel by the
        agreed steps.
      </p>
    </section>
  );
}
