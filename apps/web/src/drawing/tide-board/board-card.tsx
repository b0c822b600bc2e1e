import { formatDegrees } from '../../ui/format.js';
import classes from './tide-board.module.css';
import type { BoardHump } from './tide-board-types.js';
import { stateWords, timeWords } from './words.js';

/** Where a card or bubble stands: beside a point of the field. */
export interface CardPlace {
  readonly xPx: number;
  readonly topPx: number;
  readonly bottomPx: number;
}

const CARD_PX = 250;
const BUBBLE_PX = 400;
const EDGE_PX = 6;
const ROOM_ABOVE_PX = 170;

/** The pointer's card: what had no room in the hump. The same words are in the button's name, so it is hidden from readers. */
export function BoardCard({
  hump,
  rowName,
  place,
  widthPx,
}: {
  hump: BoardHump;
  rowName: string;
  place: CardPlace;
  widthPx: number;
}) {
  const left = clamp(place.xPx - CARD_PX / 2, EDGE_PX, widthPx - CARD_PX - EDGE_PX);
  const isBelow = place.topPx < 110;
  return (
    <div
      className={classes.card}
      aria-hidden="true"
      style={{
        left,
        width: CARD_PX,
        ...(isBelow ? { top: place.bottomPx + 4 } : { top: place.topPx - 4, transform: 'translateY(-100%)' }),
      }}
    >
      <strong>
        {hump.spacecraftName} over {rowName}
      </strong>
      <div>{timeWords(hump)}</div>
      <div>
        highest {formatDegrees(hump.highestDeg)}, {hump.reason ? hump.reason.word : stateWords(hump)}
        {hump.priceText && (
          <>
            , <b>{hump.priceText}</b>
          </>
        )}
      </div>
    </div>
  );
}

/** A bubble whose tip stands on a pass: the caller's sentence about it. */
export function BoardBubble({
  place,
  widthPx,
  children,
}: {
  place: CardPlace;
  widthPx: number;
  children: React.ReactNode;
}) {
  const width = Math.min(BUBBLE_PX, widthPx - 2 * EDGE_PX);
  const left = clamp(place.xPx - width * 0.5, EDGE_PX, widthPx - width - EDGE_PX);
  const isBelow = place.topPx < ROOM_ABOVE_PX;
  const tailX = clamp(place.xPx - left, 18, width - 18);
  return (
    <div
      className={classes.bubble}
      role="status"
      data-below={isBelow || undefined}
      style={{
        left,
        width,
        ...(isBelow ? { top: place.bottomPx + 10 } : { top: place.topPx - 8, transform: 'translateY(-100%)' }),
      }}
    >
      {children}
      <svg
        className={classes.bubbleTail}
        style={{ left: tailX - 10 }}
        width="20"
        height="16"
        viewBox="0 0 20 16"
        aria-hidden="true"
        focusable="false"
      >
        <path d="M1 0 L10 14 L19 0" fill="var(--sk-sheet)" stroke="var(--sk-buoy)" strokeWidth="1.5" />
      </svg>
    </div>
  );
}

function clamp(value: number, least: number, most: number): number {
  return Math.max(least, Math.min(Math.max(least, most), value));
}
