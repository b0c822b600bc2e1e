/** Nights of the stations on the board, remembered: the same week is asked for again and again. */
import { Inject, Injectable } from '@nestjs/common';
import type { GeodeticSite } from '@skyberth/orbit';
import type { FoundStation } from '@skyberth/shared';
import { WeightedCache } from '../platform/weighted-cache.js';
import type { Period } from './market-inputs.js';
import { utcInterval } from './market-views.js';
import { PASS_ENGINE, type PassEngine } from './workers/pass-engine.js';

type Nights = FoundStation['nights'];

const DAY_MS = 86_400_000;
/** Stations and periods kept; a month of nights is 2 kB. */
const MAX_KEPT = 5_000;

@Injectable()
export class NightKeeper {
  private readonly kept = new WeightedCache<Nights>(MAX_KEPT);

  constructor(@Inject(PASS_ENGINE) private readonly engine: PassEngine) {}

  /** Nights that touch the period, in the order of the sites. */
  async of(sites: readonly GeodeticSite[], period: Period): Promise<Nights[]> {
    const keys = sites.map((site) => `${site.latitudeDeg} ${site.longitudeDeg} ${period.fromMs} ${period.toMs}`);
    const known = keys.map((key) => this.kept.get(key));
    const missing = sites.filter((_, index) => known[index] === undefined);
    const made = missing.length === 0 ? [] : await this.compute(missing, period);
    return known.map((nights, index) => {
      const own = nights ?? (made.shift() as Nights);
      if (nights === undefined) this.kept.set(keys[index] as string, own, 1);
      return own;
    });
  }

  private async compute(sites: readonly GeodeticSite[], { fromMs, toMs }: Period): Promise<Nights[]> {
    // A day more on either side, so that a night that runs into the period begins at its own sunset.
    const around = { fromMs: fromMs - DAY_MS, toMs: toMs + DAY_MS };
    const { nights } = await this.engine.run({ kind: 'nights', ...around, sites }, 'nights');
    return nights.map((each) => each.filter((night) => night.fromMs < toMs && night.toMs > fromMs).map(utcInterval));
  }
}
