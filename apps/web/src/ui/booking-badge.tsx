import type { BookingState } from '@skyberth/shared';
import { BOOKING_STATE_BADGES, StateBadge } from './state-badge.js';

/** The state of a booking as a word with a shape. */
export function BookingBadge({ state }: { readonly state: BookingState }) {
  const badge = BOOKING_STATE_BADGES[state];
  return <StateBadge tone={badge?.tone ?? 'quiet'}>{badge?.text ?? state}</StateBadge>;
}
