/** What an antenna sees of the sky, prepared once for each version of it. */
import { type CompiledMask, compileMask, geodeticToEcef, maskElevationDeg } from '@skyberth/orbit';
import type { AntennaInput } from '../workers/job-types.js';
import { WeightedCache } from './weighted-cache.js';

/** Place of a station and its east, north and up, in axes that turn with the Earth. Kilometres. */
export interface SiteAxes {
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly eastX: number;
  readonly eastY: number;
  readonly northX: number;
  readonly northY: number;
  readonly northZ: number;
  readonly upX: number;
  readonly upY: number;
  readonly upZ: number;
}

export interface Horizon {
  readonly frame: SiteAxes;
  readonly mask: CompiledMask;
  readonly maskDeg: (azimuthDeg: number) => number;
}

/** Antennas whose horizon is kept. */
const MAX_KEPT = 5_000;
const RAD = Math.PI / 180;

export class Horizons {
  private readonly kept = new WeightedCache<Horizon>(MAX_KEPT);

  of(antenna: AntennaInput): Horizon {
    const key = antennaKey(antenna);
    const known = this.kept.get(key);
    if (known !== undefined) return known;
    const mask = compileMask(antenna.mask);
    const horizon: Horizon = {
      frame: axesOf(antenna),
      mask,
      maskDeg: (azimuthDeg) => maskElevationDeg(mask, azimuthDeg),
    };
    this.kept.set(key, horizon, 1);
    return horizon;
  }
}

/** Names everything about an antenna that can move a pass. */
export const antennaKey = (antenna: Pick<AntennaInput, 'id' | 'version'>): string => `${antenna.id}:${antenna.version}`;

function axesOf({ site }: AntennaInput): SiteAxes {
  const [x = 0, y = 0, z = 0] = geodeticToEcef(site);
  const [sinLat, cosLat] = [Math.sin(site.latitudeDeg * RAD), Math.cos(site.latitudeDeg * RAD)];
  const [sinLon, cosLon] = [Math.sin(site.longitudeDeg * RAD), Math.cos(site.longitudeDeg * RAD)];
  return {
    x,
    y,
    z,
    eastX: -sinLon,
    eastY: cosLon,
    northX: -sinLat * cosLon,
    northY: -sinLat * sinLon,
    northZ: cosLat,
    upX: cosLat * cosLon,
    upY: cosLat * sinLon,
    upZ: sinLat,
  };
}
