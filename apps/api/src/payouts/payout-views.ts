/** Runs and lines as they leave the server. */
import type { PayoutLine, PayoutRun } from '@skyberth/shared';
import type { LineRow, PayoutRepository, RunRow } from './payouts.repository.js';

type Head = Omit<PayoutRun, 'lines' | 'mayApprove'>;

export function headView(run: RunRow, lines: readonly LineRow[], names: Pick<PayoutRepository, 'personName'>): Head {
  const sent = lines.filter((line) => ['ready', 'paying', 'paid'].includes(line.state));
  const moving = lines.some((line) => line.state === 'paying');
  return {
    id: run.id,
    number: run.number,
    currency: run.currency,
    state: run.state === 'approved' ? (moving ? 'paying' : 'done') : run.state,
    preparedUtc: new Date(run.preparedMs).toISOString(),
    preparedBy: names.personName(run.preparedBy) ?? '',
    reviewedBy: names.personName(run.reviewedBy),
    approvedBy: names.personName(run.approvedBy),
    sendsMinor: run.state === 'dropped' ? 0 : sent.reduce((sum, line) => sum + line.toPayMinor, 0),
    transfers: run.state === 'dropped' ? 0 : sent.length,
    failed: lines.filter((line) => line.state === 'failed').length,
  };
}

export function lineView(line: LineRow, ownerName: string): PayoutLine {
  const { runId: _run, transferId: _transfer, paidMs, ...rest } = line;
  return { ...rest, ownerName, paidUtc: paidMs === null ? null : new Date(paidMs).toISOString() };
}
