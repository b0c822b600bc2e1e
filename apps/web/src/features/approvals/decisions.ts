/** What a station may be decided to be, from what it is; the API refuses the rest. */
import type { StationState } from '@skyberth/shared';

export type Decision = 'approve' | 'refuse' | 'suspend';

const OPEN: Readonly<Record<StationState, readonly Decision[]>> = {
  draft: [],
  waiting: ['approve', 'refuse', 'suspend'],
  approved: ['suspend'],
  refused: [],
  suspended: ['approve'],
};

export const decisionsFor = (state: StationState): readonly Decision[] => OPEN[state];

export interface DecisionWords {
  readonly button: string;
  readonly consequence: string;
  readonly done: string;
}

export const DECISION_WORDS: Readonly<Record<Decision, DecisionWords>> = {
  approve: {
    button: 'Approve the station',
    consequence: 'Its owner can put antennas on sale at once, and hears by mail.',
    done: 'The station is approved.',
  },
  refuse: {
    button: 'Refuse it',
    consequence: 'Nothing is sold. The owner reads your reason, can mend it and ask again.',
    done: 'The station is refused.',
  },
  suspend: {
    button: 'Suspend it',
    consequence: 'Nothing new is sold from now on. Sold contacts stay until someone cancels them.',
    done: 'The station is suspended.',
  },
};
