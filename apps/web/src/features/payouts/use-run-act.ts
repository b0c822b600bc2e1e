import { notifications } from '@mantine/notifications';
import type { PayoutRun } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { sentenceOf } from '../../lib/problem-fields.js';
import { payoutQueries } from './payout-queries.js';

export const isOpen = (run: PayoutRun): boolean => run.state === 'draft' || run.state === 'reviewed';

/** An act on a run: shows its answer, or says why not. */
export function useRunAct<T>(act: (input: T) => Promise<PayoutRun>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: act,
    onSuccess: (run) => {
      client.setQueryData(payoutQueries.run(run.id).queryKey, run);
      void client.invalidateQueries({ queryKey: payoutQueries.all });
    },
    onError: (error) => notifications.show({ message: sentenceOf(error), color: 'buoy', autoClose: false }),
  });
}
