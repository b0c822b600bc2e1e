/** How one stands in a line, in words. */
import type { StandbyEntry } from '@skyberth/shared';

export function standingOf(entry: Pick<StandbyEntry, 'state' | 'place' | 'note'>): string {
  switch (entry.state) {
    case 'waiting':
      return entry.place === 1 ? 'Next in line.' : `Number ${entry.place} in line.`;
    case 'offered':
      return 'Held for you.';
    case 'bought':
      return 'Taken up.';
    case 'left':
      return 'You left the line.';
    default:
      return entry.note || 'Over.';
  }
}
