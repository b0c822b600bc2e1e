/** What is wrong with a need before any pass is looked at. */
import { DAY_MS, type PlanNeed } from './types.js';

export interface NeedFault {
  /** Path into the need, such as `craft/0/longestGapMs`. */
  readonly path: string;
  readonly sentence: string;
}

/** Every contradiction, not only the first; empty where there is none. */
export function needFaults(need: PlanNeed): NeedFault[] {
  const faults: NeedFault[] = [];
  const fault = (path: string, sentence: string): void => void faults.push({ path, sentence });
  const lengthMs = need.toMs - need.fromMs;
  if (!(lengthMs > 0) || lengthMs % DAY_MS !== 0) fault('toMs', 'A plan covers whole days, at least one.');
  const both = need.preferredStationIds.find((id) => need.bannedStationIds.includes(id));
  if (both !== undefined) fault('bannedStationIds', 'A station cannot be both preferred and banned.');
  const torn = need.pinnedIds.find((id) => need.struckIds.includes(id));
  if (torn !== undefined) fault('struckIds', 'A pass cannot be both kept in and struck out.');
  if (new Set(need.craft.map((each) => each.craftId)).size < need.craft.length)
    fault('craft', 'Each spacecraft can have one line only.');
  if (new Set(need.budgets.map((each) => each.currency)).size < need.budgets.length)
    fault('budgets', 'Give one budget for each currency.');
  for (const [place, craft] of need.craft.entries()) {
    const { contactsPerDay, volumeBitsPerDay, deliverByMs, longestGapMs, uplinkEveryMs, name } = craft;
    const at = (field: string): string => `craft/${place}/${field}`;
    if (contactsPerDay === 0 && volumeBitsPerDay === 0 && longestGapMs === null && uplinkEveryMs === null)
      fault(
        at('contactsPerDay'),
        `Nothing is asked for ${name}. Ask for contacts, a volume or a longest gap, or leave it out.`,
      );
    if (deliverByMs !== null && volumeBitsPerDay === 0)
      fault(at('deliverByMs'), `A time by which ${name} delivers needs a volume that it delivers.`);
    if (longestGapMs !== null && longestGapMs <= 0) fault(at('longestGapMs'), 'A longest gap is above zero.');
    if (uplinkEveryMs !== null && uplinkEveryMs <= 0)
      fault(at('uplinkEveryMs'), 'The time between uplinks is above zero.');
  }
  return faults;
}
