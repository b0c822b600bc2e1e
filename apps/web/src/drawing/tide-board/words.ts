/** What the board says in words: to a screen reader, in the pointer's card and in the table. */
import { formatDegrees, formatDuration, formatTime } from '../../ui/format.js';
import { statedPart } from './curve.js';
import type { BoardHump, HumpState } from './tide-board-types.js';

const STATES: Readonly<Record<HumpState, string>> = {
  forSale: 'for sale',
  held: 'held by you',
  asked: 'owner asked, not yet yours',
  berth: 'your berth',
  underWay: 'your berth, under way',
  done: 'done',
  taken: 'taken by someone else',
  notForSale: 'not for sale',
};

/** `for sale`, `held by you`. */
export function stateWords(hump: BoardHump): string {
  const words = STATES[hump.state];
  return hump.part && hump.state !== 'forSale' ? `${words}, in part` : words;
}

/** `15:00:05 to 15:09:35, 9 min 30 s` of what the state is about. */
export function timeWords(hump: BoardHump): string {
  const { fromMs, toMs } = statedPart(hump);
  return `${formatTime(fromMs)} to ${formatTime(toMs)}, ${formatDuration(toMs - fromMs)}`;
}

/** The whole pass in one sentence, as a button's name. */
export function humpSentence(hump: BoardHump, rowName: string, isPicked: boolean): string {
  const parts = [
    `${hump.spacecraftName} over ${rowName}`,
    timeWords(hump),
    `highest ${formatDegrees(hump.highestDeg)}`,
    stateWords(hump),
    ...(hump.priceText ? [hump.priceText] : []),
    ...(isPicked ? ['picked'] : []),
  ];
  return `${parts.join(', ')}${hump.reason ? `. ${hump.reason.sentence}` : ''}`;
}
