/** What an antenna sees of the sky, prepared once for each version of it. */
import { type CompiledMask, compileMask, maskElevationDeg, type SiteFrame, siteFrame } from '@skyberth/orbit';
import { WeightedCache } from '../../platform/weighted-cache.js';
import type { AntennaInput } from '../workers/job-types.js';

export interface Horizon {
  readonly frame: SiteFrame;
  /** With the floor in it. */
  readonly mask: CompiledMask;
  readonly maskDeg: (azimuthDeg: number) => number;
}

/** Antennas whose horizon is kept. */
const MAX_KEPT = 5_000;

export class Horizons {
  private readonly kept = new WeightedCache<Horizon>(MAX_KEPT);

  /** The mask of an antenna, with nothing open below `floorDeg`. */
  of(antenna: AntennaInput, floorDeg: number): Horizon {
    const key = `${antennaKey(antenna)}|${floorDeg}`;
    const known = this.kept.get(key);
    if (known !== undefined) return known;
    const mask = compileMask(antenna.mask, floorDeg);
    const horizon: Horizon = {
      frame: siteFrame(antenna.site),
      mask,
      maskDeg: mask.flat ? () => mask.lowestDeg : (azimuthDeg) => maskElevationDeg(mask, azimuthDeg),
    };
    this.kept.set(key, horizon, 1);
    return horizon;
  }
}

/** Names everything about an antenna that can move a pass. */
export const antennaKey = (antenna: Pick<AntennaInput, 'id' | 'version'>): string => `${antenna.id}:${antenna.version}`;
