/** Paying for a held berth: leaves for the payment page, or waits for the provider's word about a saved card. */
import { routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { call } from './api-client.js';
import { bookingQueries } from './booking-queries.js';
import { paths } from './paths.js';

export interface CheckoutChoice {
  readonly bookingId: string;
  readonly savedCardId?: string | null;
  readonly saveCard?: boolean;
}

export function useCheckout() {
  const navigate = useNavigate();
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ bookingId, savedCardId = null, saveCard = false }: CheckoutChoice) =>
      call(routes.checkout, { params: { id: bookingId }, body: { savedCardId, saveCard } }),
    onSuccess: (result, { bookingId }) => {
      if (result.kind === 'redirect') {
        window.location.assign(result.url);
        return;
      }
      void client.invalidateQueries({ queryKey: bookingQueries.all });
      navigate(`${paths.booking(bookingId)}?paid=1`);
    },
  });
}
