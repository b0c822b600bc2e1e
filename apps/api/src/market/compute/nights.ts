/**
 * Nights of many stations at once. The Sun's place is worked out once for all of them, so two hundred stations cost little
 * more than one.
 */
import type { Interval } from '@skyberth/market';
import { type GeodeticSite, gmstRad, type SunPath, sunPath } from '@skyberth/orbit';

const STEP_MS = 600_000;
const DEG = Math.PI / 180;
/** Elevation of the Sun's centre at sunrise and sunset: 34' refraction and 16' of disc, as the almanacs define them. */
const SIN_SUNSET = Math.sin(-0.833 * DEG);

/** For each site, the stretches of `[fromMs, toMs)` with the Sun below the horizon, to a few seconds. */
export function nightsOf(sites: readonly GeodeticSite[], fromMs: number, toMs: number): Interval[][] {
  const steps = Math.max(1, Math.ceil((toMs - fromMs) / STEP_MS));
  const times = Array.from({ length: steps + 1 }, (_, i) => Math.min(toMs, fromMs + i * STEP_MS));
  const path = sunPath();
  const suns = times.map((timeMs) => sunDirectionEcef(path, timeMs));
  return sites.map((site) => nightsAt(site, times, suns));
}

type Vector = readonly [number, number, number];

/** Unit vector to the Sun in axes that turn with the Earth. */
function sunDirectionEcef(path: SunPath, timeMs: number): Vector {
  const sun = new Float64Array(3);
  path.positionTemeKm(timeMs, sun);
  const [x, y, z] = [sun[0] ?? 0, sun[1] ?? 0, sun[2] ?? 0];
  const length = Math.hypot(x, y, z);
  const angle = gmstRad(timeMs);
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
  return [(cos * x + sin * y) / length, (cos * y - sin * x) / length, z / length];
}

function nightsAt(site: GeodeticSite, times: readonly number[], suns: readonly Vector[]): Interval[] {
  const up: Vector = [
    Math.cos(site.latitudeDeg * DEG) * Math.cos(site.longitudeDeg * DEG),
    Math.cos(site.latitudeDeg * DEG) * Math.sin(site.longitudeDeg * DEG),
    Math.sin(site.latitudeDeg * DEG),
  ];
  const sines = suns.map((sun) => dot(up, sun));
  const nights: Interval[] = [];
  let darkSinceMs: number | null = (sines[0] ?? 0) < SIN_SUNSET ? (times[0] ?? 0) : null;
  for (let i = 1; i < times.length; i += 1) {
    const [before, after] = [sines[i - 1] ?? 0, sines[i] ?? 0];
    if (before < SIN_SUNSET === after < SIN_SUNSET) continue;
    const [startMs, endMs] = [times[i - 1] ?? 0, times[i] ?? 0];
    // Over ten minutes so near the horizon the sine of the elevation is as good as straight.
    const crossingMs = Math.round(startMs + ((SIN_SUNSET - before) / (after - before)) * (endMs - startMs));
    if (darkSinceMs === null) darkSinceMs = crossingMs;
    else {
      nights.push({ fromMs: darkSinceMs, toMs: crossingMs });
      darkSinceMs = null;
    }
  }
  const lastMs = times.at(-1) ?? 0;
  if (darkSinceMs !== null && lastMs > darkSinceMs) nights.push({ fromMs: darkSinceMs, toMs: lastMs });
  return nights;
}

const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
