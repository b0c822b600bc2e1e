/** The horizon of the antenna: the rose, the same points as a table, and what a change does. */
import { Button, TextInput } from '@mantine/core';
import { notifications } from '@mantine/notifications';
import { routes } from '@skyberth/shared';
import { useMemo, useReducer, useState } from 'react';
import { MaskEditor } from '../../drawing/mask-editor/mask-editor.js';
import type { EditableMaskPoint } from '../../drawing/mask-editor/mask-editor-types.js';
import { addPoint, azimuthAfter, removePoint } from '../../drawing/mask-editor/mask-points.js';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useLeaveGuard } from '../../lib/use-leave-guard.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { MaskCsv } from './mask-csv.js';
import { beginDraft, isSameMask, maskDraft, maskOf, pointsOf } from './mask-draft.js';
import { MaskEffect } from './mask-effect.js';
import { MaskHistory } from './mask-history.js';
import classes from './mask-tab.module.css';
import { MaskTable } from './mask-table.js';
import { minutesBySector } from './sold-contacts.js';
import type { TabProps } from './tab-props.js';
import { useAntennaChange } from './use-antenna-change.js';
import { useSoldTracks } from './use-sold-tracks.js';

/** An antenna that never had a mask is shown one at its lowest elevation; it still has to be published. */
export function MaskTab({ antenna, mayWrite }: TabProps) {
  const isPublished = !antenna.missing.some((sentence) => /mask/i.test(sentence));
  const inForce = useMemo(() => pointsOf(antenna.mask), [antenna.mask]);
  const [draft, act] = useReducer(maskDraft, inForce, beginDraft);
  const [pickedId, pick] = useState<string | null>(null);
  const [reason, setReason] = useState('');
  const isChanged = !isSameMask(draft.points, inForce);
  const tracks = useSoldTracks(antenna.id);
  useLeaveGuard(isChanged, 'this mask', true);
  const publish = useAntennaChange(
    () => call(routes.setMask, { params: { id: antenna.id }, body: { points: maskOf(draft.points), reason } }),
    'The mask is published. Passes are cut to it from now on.',
  );
  const send = () =>
    publish.mutate(undefined, {
      onSuccess: (next) => {
        act({ kind: 'begin', points: pointsOf(next.mask) });
        setReason('');
      },
    });
  const change = (points: readonly EditableMaskPoint[], settled: boolean) => act({ kind: 'change', points, settled });
  const add = () => {
    const id = crypto.randomUUID();
    const from = pickedId ?? draft.points[0]?.id ?? '';
    const more = addPoint(draft.points, azimuthAfter(draft.points, from) ?? 0, id);
    if (more === draft.points) return;
    change(more, true);
    pick(id);
  };
  const minutes = tracks.length > 0 ? minutesBySector(tracks, inForce, draft.settled) : undefined;
  return (
    <div className={classes.layout}>
      <div className={classes.rose}>
        <MaskEditor
          label={`Horizon mask of ${antenna.name}`}
          points={draft.points}
          {...(isPublished ? { before: inForce } : {})}
          pickedId={pickedId}
          onPick={pick}
          onChange={change}
          readOnly={!mayWrite}
          {...(minutes ? { minutes } : {})}
        />
        <p className={classes.caption}>
          {minutes
            ? `Outer bars: minutes of the next ${tracks.length} sold contacts above the mask, in each 10° of azimuth.`
            : mayWrite && 'Drag a point, double-click to add one, or use arrow keys for 0.1°.'}
        </p>
      </div>
      <MaskTable
        points={draft.points}
        before={isPublished ? inForce : []}
        pickedId={pickedId}
        onPick={pick}
        onChange={change}
        readOnly={!mayWrite}
      >
        <MaskCsv
          points={draft.points}
          antennaName={antenna.name}
          mayWrite={mayWrite}
          onRead={(points) => change(points, true)}
        />
        {mayWrite && (
          <>
            <Button variant="default" onClick={add}>
              Add
            </Button>
            <Button
              variant="default"
              disabled={pickedId === null || draft.points.length < 2}
              onClick={() => {
                change(removePoint(draft.points, pickedId ?? ''), true);
                pick(null);
              }}
            >
              Remove
            </Button>
            <Button variant="default" disabled={draft.past.length === 0} onClick={() => act({ kind: 'undo' })}>
              Undo
            </Button>
          </>
        )}
      </MaskTable>
      <MaskEffect
        before={inForce}
        now={draft.settled}
        isPublished={isPublished}
        antennaId={antenna.id}
        isChanged={mayWrite && isChanged}
        reason={antenna.maskReason}
      >
        {mayWrite && (
          <div className={classes.publish}>
            {publish.error && (
              <ProblemNotice title="The mask was not published">{sentenceOf(publish.error)}</ProblemNotice>
            )}
            <TextInput
              label="Reason, kept in the history"
              placeholder="surveyed on 28 November"
              maxLength={200}
              value={reason}
              onChange={(event) => setReason(event.currentTarget.value)}
            />
            <Button size="md" onClick={send} loading={publish.isPending} disabled={!isChanged && isPublished}>
              {isChanged || !isPublished ? 'Publish this mask' : 'Nothing to publish'}
            </Button>
            {isChanged && (
              <Button
                variant="default"
                onClick={() => {
                  act({ kind: 'begin', points: inForce });
                  notifications.show({ message: 'The mask in force is back.' });
                }}
              >
                Drop the changes
              </Button>
            )}
          </div>
        )}
      </MaskEffect>
      <MaskHistory antennaId={antenna.id} mayWrite={mayWrite} onTake={(mask) => change(pointsOf(mask.points), true)} />
    </div>
  );
}
