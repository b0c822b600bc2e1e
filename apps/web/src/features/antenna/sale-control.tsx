/** Puts an antenna on sale or pauses it; says first what that does. */
import { Button } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { type Antenna, routes } from '@skyberth/shared';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useAntennaChange } from './use-antenna-change.js';

const FOR_SALE =
  'Operators find it from this moment, at the price and hours it has now. Transmit bands are sold only to spacecraft that you have cleared.';
const PAUSE = 'From now on nobody finds or books time on it. Sold contacts stay, and are yours to serve.';

export function SaleControl({ antenna }: { readonly antenna: Antenna }) {
  const isOnSale = antenna.state === 'on sale';
  const change = useAntennaChange(
    (onSale: boolean) => call(routes.putOnSale, { params: { id: antenna.id }, body: { onSale } }),
    isOnSale ? `${antenna.name} is paused. Nothing new is sold on it.` : `${antenna.name} is on sale.`,
  );
  const ask = () =>
    modals.openConfirmModal({
      title: isOnSale ? `Pause ${antenna.name}?` : `Put ${antenna.name} on sale?`,
      children: isOnSale ? PAUSE : FOR_SALE,
      labels: { confirm: isOnSale ? 'Pause it' : 'Put on sale', cancel: 'Leave it' },
      ...(isOnSale ? { confirmProps: { color: 'buoy', variant: 'outline' } } : {}),
      onConfirm: () =>
        change.mutate(!isOnSale, {
          onError: (error) =>
            notifications.show({ title: `${antenna.name} stays as it is`, message: sentenceOf(error), color: 'buoy' }),
        }),
    });
  if (isOnSale)
    return (
      <Button variant="outline" color="buoy" onClick={ask} loading={change.isPending}>
        Pause
      </Button>
    );
  const missing = antenna.missing.length;
  return (
    <Button onClick={ask} loading={change.isPending} disabled={missing > 0}>
      {missing > 0 ? `Sale waits for ${missing} ${missing === 1 ? 'thing' : 'things'}` : 'Put on sale'}
    </Button>
  );
}
