/** Sends one change of an antenna and puts the answer in place. */
import { notifications } from '@mantine/notifications';
import type { Antenna } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { antennaChanged } from '../../lib/station-queries.js';

/** `saved` is the sentence that says it is done. */
export function useAntennaChange<Input>(send: (input: Input) => Promise<Antenna>, saved: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: (antenna) => {
      antennaChanged(client, antenna);
      notifications.show({ message: saved });
    },
  });
}
