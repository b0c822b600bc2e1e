/** The words of disputes. */
import type { Dispute, DisputeReason, DisputeState, DisputeSummary } from '@skyberth/shared';
import type { BadgeTone } from '../../ui/state-badge.js';

export const REASON_WORDS: Readonly<Record<DisputeReason, string>> = {
  'no signal': 'No signal at all',
  'signal broken off': 'The signal broke off',
  'poor signal': 'The signal was too poor',
  'data missing': 'Data are missing',
  'wrong configuration': 'The station was set up wrongly',
  other: 'Something else',
};

export const STATE_BADGES: Readonly<Record<DisputeState, { readonly tone: BadgeTone; readonly words: string }>> = {
  open: { tone: 'look', words: 'Waits for a decision' },
  decided: { tone: 'quiet', words: 'Decided, may be appealed' },
  appealed: { tone: 'look', words: 'Appealed' },
  closed: { tone: 'quiet', words: 'Closed' },
};

export const disputeTitle = (dispute: DisputeSummary): string =>
  `Dispute ${dispute.number}: ${dispute.spacecraftName} at ${dispute.antennaName}`;

/** `43.2 %` of basis points. */
export const shareText = (basisPoints: number): string => `${(basisPoints / 100).toFixed(basisPoints % 100 ? 1 : 0)} %`;

/** What both sides and the system say, as one log each, for the shared scale. */
export interface LogEntry {
  readonly key: string;
  readonly atMs: number;
  readonly kind: 'heard' | 'stopped' | 'note';
  readonly words: string;
}

export function stationLog(dispute: Dispute): LogEntry[] {
  const kinds: Readonly<Record<string, LogEntry['kind']>> = { acquired: 'heard', bytes: 'heard', lost: 'stopped' };
  return [
    ...dispute.evidence.station.map((line, index) => ({
      key: `live ${index}`,
      atMs: Date.parse(line.atUtc),
      kind: kinds[line.kind] ?? ('note' as const),
      words: line.words,
    })),
    ...observed(dispute, 'owner'),
  ];
}

export const observed = (dispute: Dispute, side: 'operator' | 'owner'): LogEntry[] =>
  dispute.statements
    .filter((said) => said.side === side)
    .flatMap((said) =>
      said.observations.map((one, index) => ({
        key: `${said.id} ${index}`,
        atMs: Date.parse(one.atUtc),
        kind: one.kind,
        words: one.words,
      })),
    );
