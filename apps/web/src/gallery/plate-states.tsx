import { TideBoard } from '../drawing/tide-board/tide-board.js';
import type { BoardHump } from '../drawing/tide-board/tide-board-types.js';
import { at, FLAT_MASK, hump, NOW, TARNWICK_MASK } from './invented.js';

const pass = { highestMs: at(14, 5), highestDeg: 34, azimuthAtHighestDeg: 95 };
const reason = { word: 'no time to turn', sentence: 'The dish cannot turn in time.' };
const part = { fromMs: at(14, 4), toMs: at(14, 8) };
const make = (state: BoardHump['state'], extra: Partial<BoardHump> = {}) =>
  hump('r', 'W4', pass, TARNWICK_MASK, state, extra);
const CASES: readonly (readonly [string, BoardHump[], object?])[] = [
  ['For sale', [make('forSale', { priceLabel: '€68' })]],
  ['Picked', [make('forSale', { priceLabel: '€82' })], { picked: true }],
  ['Held by you', [hump('r', 'W1', { ...pass, highestDeg: 60 }, FLAT_MASK, 'held', { holdEndsMs: NOW + 462_000 })]],
  ['Owner asked', [make('asked')]],
  ['Your berth', [make('berth')]],
  ['Part of a pass', [make('berth', { part, priceLabel: '€30' })]],
  ['Under way', [make('underWay')], { now: at(14, 4) }],
  ['Done', [make('done')]],
  ['Taken', [make('taken', { reason: { ...reason, word: 'taken' } })], { others: true }],
  ['Not for sale', [make('notForSale', { reason: { ...reason, refused: true } })]],
  ['Blackout', [make('notForSale', { reason: { ...reason, word: 'blackout' } })], { blackout: true }],
  ['Night there', [make('forSale', { priceLabel: '€74' })], { night: true }],
];

export default function PlateStates() {
  return (
    <div style={{ display: 'grid', gridTemplateColumns: 'repeat(auto-fill, minmax(320px, 1fr))', gap: 20 }}>
      {CASES.map(([title, humps, flags = {}]) => {
        const on = flags as { picked?: boolean; now?: number; others?: boolean; blackout?: boolean; night?: boolean };
        return (
          <div key={title}>
            <h2 style={{ fontSize: 15, margin: 0 }}>{title}</h2>
            <TideBoard
              bare
              label={title}
              stations={[
                {
                  id: 's',
                  name: 'Tarnwick',
                  timeZone: 'Europe/London',
                  nights: on.night ? [{ fromMs: at(13, 0), toMs: at(14, 30) }] : [],
                  rows: [{ id: 'r', name: 'East', detail: [] }],
                },
              ]}
              humps={humps}
              nowMs={on.now ?? at(12, 0)}
              view={{ fromMs: at(13, 56), toMs: at(14, 14) }}
              onViewChange={() => undefined}
              onPick={() => undefined}
              onOpen={() => undefined}
              pickedIds={on.picked ? humps.map((one) => one.id) : []}
              othersBlocks={on.others ? [{ id: 'o', rowId: 'r', fromMs: at(13, 57), toMs: at(14, 12) }] : []}
              blackouts={
                on.blackout
                  ? [{ id: 'b', rowId: 'r', fromMs: at(13, 58), toMs: at(14, 12), reason: 'Feed change' }]
                  : []
              }
            />
          </div>
        );
      })}
    </div>
  );
}
