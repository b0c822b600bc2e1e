import { memo } from 'react';
import { type Glyph, StateGlyph } from './state-glyph.js';
import classes from './tide-board.module.css';
import type { Interval } from './tide-board-types.js';
import { spanText } from './view.js';

const ENTRIES: readonly (readonly [Glyph, string])[] = [
  ['forSale', 'For sale'],
  ['held', 'Held by you'],
  ['asked', 'Owner asked'],
  ['berth', 'Your berth'],
  ['others', 'Someone else’s'],
  ['notForSale', 'Not for sale'],
  ['blackout', 'Blackout'],
  ['night', 'Night there'],
  ['land', 'Its horizon'],
];

/** What the signs mean, and the zoom. */
export const BoardLegend = memo(function BoardLegend() {
  return (
    <>
      <ul className={classes.legend} aria-label="Signs on the board">
        {ENTRIES.map(([glyph, word]) => (
          <li key={glyph}>
            <StateGlyph glyph={glyph} /> {word}
          </li>
        ))}
      </ul>
      <p className={classes.legendNote}>
        A hump’s height is the elevation, stretched near the horizon where masks matter. Prices on the board are to the
        nearest unit of the currency; the card has the cents.
      </p>
    </>
  );
});

/** Minus, how much is in view, plus. */
export function BoardZoom({ view, onZoom }: { readonly view: Interval; readonly onZoom: (factor: number) => void }) {
  return (
    <fieldset className={`${classes.zoom} sk-no-print`}>
      <legend className="sk-hidden">Time in view</legend>
      <button type="button" aria-label="Show more time" onClick={() => onZoom(1.6)}>
        −
      </button>
      <span aria-live="polite">{spanText(view)}</span>
      <button type="button" aria-label="Show less time" onClick={() => onZoom(1 / 1.6)}>
        +
      </button>
    </fieldset>
  );
}
