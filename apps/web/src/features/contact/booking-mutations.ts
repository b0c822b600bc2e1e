/** The moves of a booking. Each puts the answer in place and refreshes lists, the tray and the market. */
import { type Booking, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { bookingQueries } from '../../lib/booking-queries.js';

function useMove<T>(move: (input: T) => Promise<Booking>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: move,
    onSuccess: (booking) => client.setQueryData(bookingQueries.one(booking.id).queryKey, booking),
    // After a refusal as well: it means that something has changed meanwhile.
    onSettled: () =>
      client.invalidateQueries({
        predicate: ({ queryKey }) => ['bookings', 'passes', 'home', 'invoices'].includes(String(queryKey[0])),
      }),
  });
}

export const useLetGo = (id: string) => useMove((_: undefined) => call(routes.letGo, { params: { id } }));
export const useAccept = (id: string) => useMove((_: undefined) => call(routes.acceptBooking, { params: { id } }));
export const useDecline = (id: string) =>
  useMove((reason: string) => call(routes.declineBooking, { params: { id }, body: { reason } }));
export const useCancel = (id: string) =>
  useMove((input: { reason: string; expectedRefundMinor: number }) =>
    call(routes.cancelBooking, { params: { id }, body: input }),
  );
export const useReport = (id: string) =>
  useMove((body: NonNullable<Booking['report']>) => call(routes.reportContact, { params: { id }, body }));
