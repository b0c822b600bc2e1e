import { Anchor } from '@mantine/core';
import { useState } from 'react';
import { TideBoard } from '../drawing/tide-board/tide-board.js';
import { FilterPart, FilterSentence } from '../ui/filter-sentence.js';
import { ReasonBubble } from '../ui/reason-bubble.js';
import { at, BLACKOUTS, HUMPS, NOW, OTHERS, PICKED, REFUSED, STATIONS } from './invented.js';

const isPhone = window.innerWidth < 768;
const bubbleAsked = new URLSearchParams(location.search).has('bubble');

export default function PlateBoard() {
  const [view, setView] = useState(() => ({ fromMs: at(13, 50), toMs: isPhone ? at(15, 15) : at(16, 50) }));
  const [picked, setPicked] = useState<string[]>([PICKED.id]);
  const [opened, setOpened] = useState<string | null>(bubbleAsked ? REFUSED.id : null);
  return (
    <>
      <FilterSentence>
        Passes of{' '}
        <FilterPart name="Spacecraft" value="4 spacecraft">
          Whimbrel 1 to 5
        </FilterPart>{' '}
        for{' '}
        <FilterPart name="Link" value="downlink in S or X">
          Bands
        </FilterPart>{' '}
        from{' '}
        <FilterPart name="Period" value="now to 17:00">
          Period
        </FilterPart>{' '}
        at{' '}
        <FilterPart name="Stations" value="5 stations">
          Stations
        </FilterPart>
        , rising above{' '}
        <FilterPart name="Lowest elevation" value="10°">
          x
        </FilterPart>
        .
      </FilterSentence>
      <div style={{ maxWidth: isPhone ? undefined : 1066, marginTop: 20 }}>
        <TideBoard
          label="Passes of 4 spacecraft at 5 stations"
          stations={STATIONS}
          humps={HUMPS}
          blackouts={BLACKOUTS}
          othersBlocks={OTHERS}
          nowMs={NOW}
          view={view}
          onViewChange={setView}
          pickedIds={picked}
          onPick={(id, additive) => setPicked(additive ? [...picked, id] : [id])}
          onOpen={setOpened}
          onClear={() => {
            setPicked([]);
            setOpened(null);
          }}
          variant={isPhone ? 'phone' : 'wide'}
          maxHeightPx={720}
          {...(opened === REFUSED.id
            ? {
                bubble: {
                  humpId: REFUSED.id,
                  content: (
                    <ReasonBubble
                      title="Whimbrel 5 at 16:07:50: not for sale as a whole"
                      action={<Anchor href="#part">Show that part, €50</Anchor>}
                    >
                      The dish cannot turn in time. It leaves another contact at 16:07:22 facing 214.6°; turning 169.6°
                      at 1.8° a second, and 45 s of set-up, take <strong>2 min 19 s</strong>. From 16:09:41 the last{' '}
                      <strong>7 min 34 s</strong> could be sold.
                    </ReasonBubble>
                  ),
                },
              }
            : {})}
        />
      </div>
    </>
  );
}
