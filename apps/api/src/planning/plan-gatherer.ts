/** Gathers all that a planning thread needs: what is on offer, what was bought before, and who is taxed where. */
import { Inject, Injectable } from '@nestjs/common';
import { type PlanProgress, SearchInput } from '@skyberth/shared';
import { MarketService } from '../market/market.service.js';
import { MarketInputs } from '../market/market-inputs.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { PlanningRepository, type PlanRow } from './planning.repository.js';
import type { FoundText, PlanJob } from './workers/plan-job.js';

const DAY_MS = 86_400_000;
/** Seconds that the search for the plan itself may take. */
const LIMIT_S = 20;

@Injectable()
export class PlanGatherer {
  constructor(
    private readonly market: MarketService,
    private readonly inputs: MarketInputs,
    private readonly repository: PlanningRepository,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  /** Searches the market spacecraft by spacecraft. Throws what a search throws; stops within a day's passes. */
  async gather(row: PlanRow, signal: AbortSignal, tell: (progress: PlanProgress) => void): Promise<PlanJob> {
    const { operatorId, need: input, pinnedKeys, struckKeys } = row;
    const fromMs = Date.parse(`${input.firstDay}T00:00:00Z`);
    const period = { fromMs, toMs: fromMs + input.days * DAY_MS };
    const found: FoundText[] = [];
    for (const [done, craft] of input.craft.entries()) {
      tell({ stage: 'searching', done, of: input.craft.length, gapPercent: null });
      const needs = craft.uplinkEveryH === null ? (['downlink'] as const) : (['downlink', 'both'] as const);
      for (const need of needs) {
        const wish = SearchInput.parse({
          spacecraftIds: [craft.spacecraftId],
          need,
          fromUtc: new Date(period.fromMs).toISOString(),
          toUtc: new Date(period.toMs).toISOString(),
          lowestElevationDeg: craft.lowestElevationDeg,
          shortestS: craft.shortestS,
        });
        found.push({
          spacecraftId: craft.spacecraftId,
          need,
          pieces: await this.market.search(operatorId, wish, signal),
        });
      }
    }
    const ids = input.craft.map((each) => each.spacecraftId);
    const { marketplace } = this.config;
    return {
      nowMs: this.clock.nowMs(),
      input,
      ...period,
      pinnedKeys,
      struckKeys,
      found,
      craft: this.inputs.craft(operatorId, ids, period),
      antennas: this.inputs.forEngine(operatorId, this.inputs.onSale(period, []), period),
      had: this.repository.had(ids, period.fromMs, period.toMs),
      seller: { country: marketplace.address.country, vatNumber: marketplace.vatNumber },
      buyer: this.repository.taxParty(operatorId),
      limitS: LIMIT_S,
    };
  }
}
