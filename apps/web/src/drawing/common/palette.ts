/** Lets canvas drawings use the same colours as the page: reads the tokens from the CSS variables of an element. */
import { useSyncExternalStore } from 'react';
import { cssName, LIGHT, type Tokens } from '../../theme/tokens.js';

const FONT_STACK = "'Manrope Variable', Manrope, system-ui, sans-serif";

/** The colours in force at an element. Call again after the scheme changed. */
export function readPalette(element: Element): Tokens {
  const style = getComputedStyle(element);
  const names = Object.keys(LIGHT) as (keyof Tokens)[];
  const entries = names.map((name) => [name, style.getPropertyValue(cssName(name)).trim() || LIGHT[name]]);
  return Object.fromEntries(entries) as unknown as Tokens;
}

/** A canvas font of our one family. */
export function canvasFont(sizePx: number, weight: number): string {
  return `${weight} ${sizePx}px ${FONT_STACK}`;
}

/** Rises by one whenever the colour scheme or the loaded fonts change: a canvas then has to be drawn again. */
export function useRepaintCount(): number {
  return useSyncExternalStore(
    subscribe,
    () => repaintCount,
    () => 0,
  );
}

let repaintCount = 0;
const listeners = new Set<() => void>();
let stopWatching: (() => void) | null = null;

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  stopWatching ??= watch();
  return () => {
    listeners.delete(listener);
    if (listeners.size === 0) {
      stopWatching?.();
      stopWatching = null;
    }
  };
}

function watch(): () => void {
  const rise = () => {
    repaintCount += 1;
    for (const listener of listeners) listener();
  };
  const observer = new MutationObserver(rise);
  observer.observe(document.documentElement, { attributeFilter: ['data-mantine-color-scheme'] });
  document.fonts.addEventListener('loadingdone', rise);
  return () => {
    observer.disconnect();
    document.fonts.removeEventListener('loadingdone', rise);
  };
}
