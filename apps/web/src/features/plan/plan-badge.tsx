import type { PlanSummary } from '@skyberth/shared';
import { type BadgeTone, StateBadge } from '../../ui/state-badge.js';

type Standing = Pick<PlanSummary, 'state' | 'work' | 'status'>;

/** How a plan stands, in a few words. */
export function PlanBadge(standing: Standing) {
  const [tone, text] = words(standing);
  return <StateBadge tone={tone}>{text}</StateBadge>;
}

function words({ state, work, status }: Standing): readonly [BadgeTone, string] {
  if (state === 'bought') return ['good', 'Bought'];
  if (state === 'held') return ['waiting', 'Held'];
  if (state === 'given up') return ['quiet', 'Given up'];
  if (work === 'working') return ['active', 'Being made'];
  if (work === 'failed') return ['bad', 'Cannot be planned'];
  if (status === null) return ['quiet', 'Stopped'];
  if (status === 'met') return ['good', 'Meets the need'];
  return status === 'partly' ? ['look', 'Meets a part'] : ['bad', 'Nothing found'];
}
