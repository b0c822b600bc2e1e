/** Blocks out time on several antennas at once, and offers the way back. */
import { Anchor, Group } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { type BodyInput, type ResponseOf, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { stationQueries } from '../../lib/station-queries.js';

type Wish = BodyInput<typeof routes.addBlackouts>;

export function useAddBlackouts(onDone: () => void) {
  const client = useQueryClient();
  const refresh = () => void client.invalidateQueries({ queryKey: stationQueries.all });
  const undo = (ids: string[]) =>
    call(routes.removeCalendarEntries, { body: { ids } }).then(
      () => {
        refresh();
        notifications.show({ message: 'That time is open again, within the opening hours.' });
      },
      (error: unknown) => notifications.show({ title: 'It stays closed', message: sentenceOf(error), color: 'buoy' }),
    );
  return useMutation({
    mutationFn: (wish: Wish) => call(routes.addBlackouts, { body: wish }),
    onSuccess: (added) => {
      refresh();
      const noticeId = `blocked ${added.ids[0]}`;
      notifications.show({
        id: noticeId,
        autoClose: 10_000,
        message: (
          <Group justify="space-between">
            {addedWords(added)}
            <Anchor
              component="button"
              type="button"
              onClick={() => {
                void undo(added.ids);
                notifications.hide(noticeId);
              }}
            >
              Undo
            </Anchor>
          </Group>
        ),
      });
      onDone();
    },
  });
}

function addedWords({ ids, touches }: ResponseOf<typeof routes.addBlackouts>): string {
  const what = ids.length === 1 ? 'The time is blocked out.' : `${ids.length} blackouts are in the calendar.`;
  if (touches.length === 0) return what;
  return touches.length === 1
    ? `${what} One contact sold inside stays yours to serve.`
    : `${what} ${touches.length} contacts sold inside stay yours to serve.`;
}
