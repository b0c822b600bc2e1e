/** Asks the pass engine about an antenna as it might become: the same engine that sells, so that both always agree. */
import { type Interval, mergeIntervals, totalMs } from '@skyberth/market';
import { FoundPass } from '@skyberth/shared';
import { z } from 'zod';
import { groupBy } from '../market/group-by.js';
import type { MarketInputs } from '../market/market-inputs.js';
import type { AntennaInput, SearchJob } from '../market/workers/job-types.js';
import type { PassEngine } from '../market/workers/pass-engine.js';
import type { SaleAntenna } from '../stations/antenna-catalogue.js';
import type { Buyer, SoldContact } from './availability.repository.js';

const DAY_MS = 86_400_000;
const MOST_PASSES = 20_000;
const Parts = z.array(FoundPass.pick({ parts: true }));
/** Whatever any radio of the spacecraft can use: the owner's question is about the antenna, not about one need. */
const ANYTHING: SearchJob['wish'] = {
  need: 'downlink',
  bands: [],
  lowestElevationDeg: 0,
  shortestS: 0,
  highestPriceMinor: null,
};

export interface PreviewTools {
  readonly inputs: MarketInputs;
  readonly engine: PassEngine;
  readonly nowMs: number;
}

/** Minutes of the period that could be sold to these buyers, times that several want counted once. */
export async function sellableMinutes(
  tools: PreviewTools,
  sale: SaleAntenna,
  buyers: readonly Buyer[],
  period: Interval,
): Promise<number> {
  const about = { fromMs: period.fromMs - DAY_MS, toMs: period.toMs + DAY_MS };
  const stretches: Interval[] = [];
  for (const [operatorId, own] of groupBy(buyers, (each) => each.operatorId)) {
    const craftIds = own.map((each) => each.spacecraftId);
    const spacecraft = tools.inputs.craft(operatorId, craftIds, about);
    const antennas = tools.inputs.forEngine(operatorId, [sale], about);
    const outcome = await tools.engine.run(
      {
        kind: 'search',
        nowMs: tools.nowMs,
        ...period,
        wish: ANYTHING,
        spacecraft,
        antennas,
        maxPasses: MOST_PASSES,
        pulse: null,
      },
      sale.id,
    );
    if (outcome.kind !== 'found') continue;
    const text = outcome.json.map((piece) => new TextDecoder().decode(Uint8Array.from(piece))).join('');
    for (const { parts } of Parts.parse(JSON.parse(`[${text.replace(/^,/, '')}]`)))
      for (const part of parts) stretches.push({ fromMs: Date.parse(part.aosUtc), toMs: Date.parse(part.losUtc) });
  }
  return totalMs(mergeIntervals(stretches)) / 60_000;
}

/** How much of a sold contact is above the mask of the antenna. */
export async function visibleMs(tools: PreviewTools, sale: SaleAntenna, contact: SoldContact): Promise<number> {
  const { operatorId, spacecraftId, need, aosMs, losMs } = contact;
  const about = { fromMs: aosMs - 2 * DAY_MS, toMs: losMs + 2 * DAY_MS };
  const [craft] = tools.inputs.craft(operatorId, [spacecraftId], about);
  const [antenna] = tools.inputs.forEngine(operatorId, [sale], about) as [AntennaInput];
  if (craft === undefined || craft.spans.length === 0) return 0;
  const outcome = await tools.engine.run(
    {
      kind: 'pass',
      nowMs: tools.nowMs,
      need,
      bands: [],
      aosMs,
      losMs,
      spacecraft: craft,
      antenna,
      withTrack: false,
      booked: true,
    },
    sale.id,
  );
  if (outcome.kind !== 'pass') return 0;
  const [fromMs, toMs] = [Date.parse(outcome.pass.aosUtc), Date.parse(outcome.pass.losUtc)];
  return Math.max(0, Math.min(toMs, losMs) - Math.max(fromMs, aosMs));
}
