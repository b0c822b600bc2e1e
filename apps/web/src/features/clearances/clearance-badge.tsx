import type { ClearanceState } from '@skyberth/shared';
import { type BadgeTone, StateBadge } from '../../ui/state-badge.js';

const BADGES: Readonly<Record<ClearanceState, { readonly tone: BadgeTone; readonly text: string }>> = {
  requested: { tone: 'waiting', text: 'Station asked' },
  granted: { tone: 'look', text: 'Papers being checked' },
  'in force': { tone: 'good', text: 'In force' },
  refused: { tone: 'bad', text: 'Refused' },
  withdrawn: { tone: 'bad', text: 'Withdrawn' },
  expired: { tone: 'quiet', text: 'Expired' },
};

/** `In force`, `Station asked` */
export function ClearanceBadge({ state }: { readonly state: ClearanceState }) {
  return <StateBadge tone={BADGES[state].tone}>{BADGES[state].text}</StateBadge>;
}
