/** What the organisation holds just now, at the foot of every page until it is paid or let go. */
import { notifications } from '@mantine/notifications';
import { type BookingSummary, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { type ReactNode, useEffect } from 'react';
import { useLocation, useNavigate } from 'react-router-dom';
import { call } from '../lib/api-client.js';
import { bookingQueries, paymentQueries } from '../lib/booking-queries.js';
import { paths } from '../lib/paths.js';
import { sentenceOf } from '../lib/problem-fields.js';
import { serverNowMs } from '../lib/server-clock.js';
import { useCan, useSession } from '../lib/session.js';
import { type CheckoutChoice, useCheckout } from '../lib/use-checkout.js';
import { formatDuration, formatMoney, formatTime } from '../ui/format.js';
import { HoldTray, TrayButton } from '../ui/hold-tray.js';

const HELD = bookingQueries.list({ state: 'held', sort: 'aos', pageSize: 20 });

/** The tray, or undefined where nothing is held; the frame keeps its foot free only for a tray that is there. */
export function useHoldsTray(): ReactNode {
  const isOperator = useSession().active.organisationKind === 'operator';
  const { data } = useQuery({ ...HELD, enabled: isOperator, refetchInterval: 30_000 });
  const held = (data?.items ?? []).filter(
    (one) => one.holdEndsUtc !== null && Date.parse(one.holdEndsUtc) > serverNowMs(),
  );
  const first = held.toSorted((a, b) => Date.parse(a.holdEndsUtc ?? '') - Date.parse(b.holdEndsUtc ?? ''))[0];
  return first ? <OneHold booking={first} others={held.length - 1} /> : undefined;
}

function OneHold({ booking, others }: { readonly booking: BookingSummary; readonly others: number }) {
  const client = useQueryClient();
  const mayBuy = useCan()('bookings.buy');
  const checkout = useCheckout();
  const payment = usePaying(booking, checkout.mutate);
  const refresh = () =>
    client.invalidateQueries({
      predicate: (query) => query.queryKey[0] === 'bookings' || query.queryKey[0] === 'passes',
    });
  const letGo = useMutation({
    mutationFn: () => call(routes.letGo, { params: { id: booking.id } }),
    onSuccess: refresh,
    onError: (error) => notifications.show({ title: 'The hold stays', message: sentenceOf(error), color: 'buoy' }),
  });
  const endsMs = Date.parse(booking.holdEndsUtc ?? booking.aosUtc);
  useEffect(() => {
    const timer = window.setTimeout(
      () => void client.invalidateQueries({ queryKey: bookingQueries.all }),
      Math.max(0, endsMs - serverNowMs()) + 1_500,
    );
    return () => window.clearTimeout(timer);
  }, [client, endsMs]);
  const aosMs = Date.parse(booking.aosUtc);
  const losMs = Date.parse(booking.losUtc);
  const more = others > 0 ? ` and ${others} more held` : '';
  return (
    <HoldTray
      title={`${booking.spacecraftName} over ${booking.antennaName}`}
      detail={`${formatTime(aosMs)} to ${formatTime(losMs)}, ${formatDuration(losMs - aosMs)}${more}`}
      endsMs={endsMs}
      clock={serverNowMs}
      price={formatMoney({ amountMinor: booking.toPayMinor, currency: booking.currency })}
      priceNote={checkout.error ? sentenceOf(checkout.error) : 'price frozen, not yet charged'}
    >
      {mayBuy && (
        <>
          <TrayButton onClick={() => letGo.mutate()} disabled={letGo.isPending}>
            Let it go
          </TrayButton>
          {payment && (
            <TrayButton main onClick={payment.pay} disabled={checkout.isPending}>
              {checkout.isPending ? 'Opening ...' : payment.words}
            </TrayButton>
          )}
        </>
      )}
    </HoldTray>
  );
}

/**
 * What the main button does: with a saved card the choice of cards stands on the contact's own page, which needs no button
 * here while it is open; otherwise straight to the payment page. Keeping a card is asked for on the contact's page only.
 */
function usePaying(
  booking: BookingSummary,
  checkout: (choice: CheckoutChoice) => void,
): { words: string; pay: () => void } | null {
  const navigate = useNavigate();
  const { pathname } = useLocation();
  const { data } = useQuery({ ...paymentQueries.cards(), enabled: useCan()('bookings.buy') });
  const page = paths.booking(booking.id);
  if (pathname === page) return null;
  if ((data?.items.length ?? 0) > 0) return { words: 'Choose card and pay', pay: () => navigate(page) };
  return { words: 'Pay and confirm', pay: () => checkout({ bookingId: booking.id }) };
}
