/** States of stations and antennas as a word with a shape, the same on every page. */
import type { Antenna, StationState } from '@skyberth/shared';
import { type BadgeTone, StateBadge } from './state-badge.js';

const STATIONS: Readonly<Record<StationState, { readonly tone: BadgeTone; readonly text: string }>> = {
  draft: { tone: 'quiet', text: 'Draft' },
  waiting: { tone: 'waiting', text: 'Waits for approval' },
  approved: { tone: 'good', text: 'Approved' },
  refused: { tone: 'bad', text: 'Refused' },
  suspended: { tone: 'bad', text: 'Suspended' },
};
const ANTENNAS: Readonly<Record<Antenna['state'], { readonly tone: BadgeTone; readonly text: string }>> = {
  draft: { tone: 'quiet', text: 'Draft' },
  'on sale': { tone: 'good', text: 'On sale' },
  paused: { tone: 'look', text: 'Paused' },
};

/** `Approved`, `Waits for approval` */
export function StationBadge({ state }: { readonly state: StationState }) {
  return <StateBadge tone={STATIONS[state].tone}>{STATIONS[state].text}</StateBadge>;
}

/** `On sale`, `Paused` */
export function AntennaBadge({ state }: { readonly state: Antenna['state'] }) {
  const { tone, text } = ANTENNAS[state];
  return state === 'paused' ? (
    <StateBadge tone={tone} sign="bars">
      {text}
    </StateBadge>
  ) : (
    <StateBadge tone={tone}>{text}</StateBadge>
  );
}
