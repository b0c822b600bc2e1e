/** Plans in the form of the wire. */
import type { Plan, PlanProgress, PlanState, PlanSummary } from '@skyberth/shared';
import type { PlanRow } from './planning.repository.js';

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

/** `running` tells whether this server is computing it: work of a server that stopped is stopped work. */
export const workOf = (row: PlanRow, running: boolean): Plan['work'] =>
  row.work === 'working' && !running ? 'stopped' : row.work;

export function planView(row: PlanRow, state: PlanState, progress: PlanProgress | null): Plan {
  return {
    id: row.id,
    state,
    work: workOf(row, progress !== null),
    need: row.need,
    pinnedKeys: row.pinnedKeys,
    struckKeys: row.struckKeys,
    failure: row.failure,
    groupId: state === 'draft' ? null : row.groupId,
    progress,
    outcome: row.outcome,
    createdByName: row.createdByName,
    createdUtc: utc(row.createdMs),
    changedUtc: utc(row.changedMs),
  };
}

export function planSummary(row: PlanRow, state: PlanState, running: boolean): PlanSummary {
  const { need, outcome } = row;
  return {
    id: row.id,
    name: need.name,
    state,
    work: workOf(row, running),
    status: outcome?.status ?? null,
    firstDay: need.firstDay,
    days: need.days,
    spacecraft: need.craft.length,
    contacts: outcome?.passes.length ?? 0,
    sums: outcome?.sums ?? [],
    changedUtc: utc(row.changedMs),
  };
}
