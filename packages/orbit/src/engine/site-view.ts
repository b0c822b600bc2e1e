/** A station as the search sees it: its axes, its horizon, and how high above its plane a path must rise to matter. */
import { DEG, type SiteFrame, siteFrame } from '../frames/ellipsoid.js';
import type { GeodeticSite, MaskPoint } from '../types.js';
import type { Ephemeris } from './ephemeris.js';
import { type CompiledMask, compileMask } from './mask.js';

/** A place to search from. Nothing below `minElevationDeg` counts, whatever the mask says. */
export interface SearchSite {
  readonly site: GeodeticSite;
  readonly mask: readonly MaskPoint[] | CompiledMask;
  readonly minElevationDeg?: number;
}

export interface SiteView {
  readonly frame: SiteFrame;
  readonly mask: CompiledMask;
  readonly sinLowest: number;
  readonly sinHighest: number;
  /** Up component of the station's own place. */
  readonly upOfSiteKm: number;
  readonly radiusKm: number;
}

/** @throws OrbitError `bad place` or `bad mask`. */
export function siteView({ site, mask, minElevationDeg }: SearchSite): SiteView {
  const frame = siteFrame(site);
  const { positionKm, up } = frame;
  const compiled = 'slope' in mask ? raised(mask, minElevationDeg) : compileMask(mask, minElevationDeg);
  return {
    frame,
    mask: compiled,
    sinLowest: Math.sin(compiled.lowestDeg * DEG),
    sinHighest: Math.sin(compiled.highestDeg * DEG),
    upOfSiteKm: up[0] * positionKm[0] + up[1] * positionKm[1] + up[2] * positionKm[2],
    radiusKm: Math.hypot(...positionKm),
  };
}

/** A compiled mask may be shared between searches with different floors. */
function raised(mask: CompiledMask, minElevationDeg = -90): CompiledMask {
  if (minElevationDeg <= mask.lowestDeg) return mask;
  const points = Array.from(mask.azimuthDeg, (azimuthDeg, index): MaskPoint => [azimuthDeg, mask.elevationDeg[index]!]);
  return compileMask(points, minElevationDeg);
}

/** The ellipsoid's normal leans from the direction to the Earth's centre by at most 0.1924 degrees. */
const SIN_MOST_LEAN = 0.003_36;
/** For what the two sines above leave out in second order (0.2 km at the horizon of a low orbit). */
const MARGIN_KM = 1;

/**
 * A height above the station's plane (km along its up axis) that a path must exceed to be above the lowest part of the mask.
 * On a sphere of the path's least or greatest radius the slant range at elevation m is
 * d = -R sin m + sqrt(R2 sin2 m + r2 - R2), its height d sin m, and rising elevation only raises the height; the lean of the
 * normal and the path's sag between samples are taken off.
 */
export function leastHeightKm(view: SiteView, ephemeris: Ephemeris): number {
  const { radiusKm, sinLowest } = view;
  const heightAt = (pathRadiusKm: number): number => {
    const inside = (radiusKm * sinLowest) ** 2 + pathRadiusKm ** 2 - radiusKm ** 2;
    if (inside <= 0) return Number.NEGATIVE_INFINITY;
    const slantKm = -radiusKm * sinLowest + Math.sqrt(inside);
    return slantKm * sinLowest - SIN_MOST_LEAN * 2 * slantKm;
  };
  const height = Math.min(heightAt(ephemeris.leastRadiusKm), heightAt(ephemeris.greatestRadiusKm));
  return height - ephemeris.sagKm - MARGIN_KM;
}
