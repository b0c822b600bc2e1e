/** For how long an answer about a pass may be given again, so that a repeated search works out only what time has changed. */
import type { Interval } from '@skyberth/market';
import { WeightedCache } from '../../platform/weighted-cache.js';
import type { AntennaInput, CraftInput, Wish } from '../workers/job-types.js';
import type { Fit } from './objections.js';
import type { Stay } from './stay.js';

const MINUTE_MS = 60_000;
const HOUR_MS = 3_600_000;
const DAY_MS = 86_400_000;
/** Questions remembered, one for each spacecraft and antenna. */
const MAX_KEPT = 20_000;

/**
 * The instants of asking at which offers and prices of a stay are all the same, other things being equal; null where each
 * instant has its own answer. Notice, set-up and the furthest date enter an answer only where they touch the pass, and a
 * surcharge for short notice only where its threshold does.
 */
export function sameAnswer(stay: Stay, antenna: AntennaInput, nowMs: number): Interval | null {
  const { setupS, minNoticeMin, horizonDays, price } = antenna;
  let fromMs = stay.losMs - horizonDays * DAY_MS;
  let toMs = stay.aosMs - Math.max(setupS * 1000, minNoticeMin * MINUTE_MS);
  if (price.shortNotice !== null) {
    const underMs = price.shortNotice.underHours * HOUR_MS;
    if (nowMs <= stay.aosMs - underMs) toMs = Math.min(toMs, stay.aosMs - underMs);
    else fromMs = Math.max(fromMs, stay.losMs - underMs + 1);
  }
  return nowMs >= fromMs && nowMs <= toMs ? { fromMs, toMs } : null;
}

/** Names everything besides time and geometry that an answer depends on; the same string object for the same question. */
export class QuestionNames {
  private readonly kept = new WeightedCache<string>(MAX_KEPT);

  of(craft: CraftInput, antenna: AntennaInput, fit: Fit, wish: Wish): string {
    const { id, version, site: _site, mask: _mask, ...terms } = antenna;
    const contacts = craft.contacts.filter((contact) => contact.antennaId !== id);
    const name = JSON.stringify([id, version, terms, craft.id, craft.name, contacts, fit, wish]);
    const key = `${craft.id}|${id}`;
    const known = this.kept.get(key);
    if (known === name) return known;
    this.kept.set(key, name, 1);
    return name;
  }
}
