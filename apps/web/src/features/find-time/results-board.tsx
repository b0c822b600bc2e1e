import { useEffect, useMemo, useState } from 'react';
import { TideBoard } from '../../drawing/tide-board/tide-board.js';
import type { Interval } from '../../drawing/tide-board/tide-board-types.js';
import { useNow } from '../../lib/use-now.js';
import { useIsPhone } from '../../lib/use-phone.js';
import { EmptyState } from '../../ui/empty-state.js';
import { boardModel, firstView } from './board-model.js';
import { PassReasons } from './pass-reasons.js';
import type { ResultsProps } from './search-results.js';

const WIDE_SPAN_MS = 4 * 3_600_000;
/** A little of the past, so that 'now' and a contact under way do not stand on the edge. */
const BEFORE_MS = 12 * 60_000;
const PHONE_SPAN_MS = 85 * 60_000;

export function ResultsBoard({ result, bookings, limits: asked, filter, onChange }: ResultsProps) {
  const limits = useMemo(() => ({ fromMs: asked.fromMs - BEFORE_MS, toMs: asked.toMs }), [asked]);
  const nowMs = useNow();
  const isPhone = useIsPhone();
  const model = useMemo(() => boardModel(result, bookings), [result, bookings]);
  const [view, setView] = useBoardView(model.humps, limits, isPhone);
  const picked = result.passes.find((one) => one.key === filter.passKey);
  const explains =
    picked && filter.part === null && !picked.bookingId && picked.state !== 'for sale' && picked.reasons.length > 0;
  const pick = (passKey: string) => onChange({ passKey, part: null });
  return (
    <TideBoard
      label={`Passes of ${result.spacecraft.length} spacecraft at ${result.stations.length} stations`}
      stations={model.stations}
      humps={model.humps}
      blackouts={model.blackouts}
      othersBlocks={model.others}
      nowMs={nowMs}
      view={view}
      onViewChange={setView}
      limits={limits}
      pickedIds={picked ? [picked.key] : []}
      onPick={pick}
      onOpen={pick}
      onClear={() => onChange({ passKey: null, part: null })}
      variant={isPhone ? 'phone' : 'wide'}
      maxHeightPx={isPhone ? 470 : 640}
      empty={
        <EmptyState level={3} title="No antenna fits this search">
          No station on sale shares a band with these spacecraft. Widen the stations or bands of the sentence above.
        </EmptyState>
      }
      {...(explains && !isPhone
        ? {
            bubble: {
              humpId: picked.key,
              content: <PassReasons pass={picked} names={result.spacecraft} onPart={(part) => onChange({ part })} />,
            },
          }
        : {})}
    />
  );
}

/** Opens where something is for sale; a new period opens anew, a fresher answer to the same question stays in place. */
function useBoardView(
  humps: Parameters<typeof firstView>[0],
  limits: Interval,
  isPhone: boolean,
): [Interval, (view: Interval) => void] {
  const spanMs = isPhone ? PHONE_SPAN_MS : WIDE_SPAN_MS;
  const [view, setView] = useState(() => firstView(humps, limits, spanMs));
  const isInside = view.fromMs < limits.toMs && view.toMs > limits.fromMs;
  // biome-ignore lint/correctness/useExhaustiveDependencies: only a view outside the new limits is thrown away
  useEffect(() => {
    if (!isInside) setView(firstView(humps, limits, spanMs));
  }, [isInside]);
  return [view, setView];
}
