/** How much data a stretch of a pass brings down, from the curve that the market gives. */
import { type GasColumn, gasColumn, type LookAngles, linkAlongPass, type Polarisation } from '@skyberth/orbit';
import type { AntennaBand, FoundPass, Radio } from '@skyberth/shared';
import { radiosFor, serving } from '../../market/compute/objections.js';
import type { AntennaInput, CraftInput } from '../../market/workers/job-types.js';

/** Instants at which the link is looked at; volume moves by less than its own uncertainty beyond that. */
const SAMPLES = 12;
/** Mean radius of the Earth, IUGG; the range along one pass needs no better. */
const EARTH_RADIUS_KM = 6371.0088;

interface Downlink {
  readonly radio: Radio & { readonly eirpDbw: number; readonly requiredEbN0Db: number };
  readonly band: AntennaBand & { readonly gOverTDbK: number };
  readonly polarisationLossDb: number;
  readonly gas: GasColumn;
}

/** Volumes of the passes of one spacecraft over one antenna; `null` where figures of the link are missing. */
export function volumeMeter(
  craft: CraftInput,
  antenna: AntennaInput,
): ((pass: FoundPass, fromMs: number, toMs: number) => number) | null {
  const links = radiosFor(craft, 'downlink', []).flatMap((radio): Downlink[] => {
    const { verdict, band } = serving(radio, antenna);
    const { eirpDbw, requiredEbN0Db } = radio;
    if (band === null || eirpDbw === null || requiredEbN0Db === null || band.gOverTDbK === null) return [];
    return [
      {
        radio: { ...radio, eirpDbw, requiredEbN0Db },
        band: { ...band, gOverTDbK: band.gOverTDbK },
        polarisationLossDb: verdict.polarisationLossDb ?? 0,
        gas: gasColumn({ frequencyMhz: radio.centreFrequencyMhz, altitudeM: antenna.site.altitudeM }),
      },
    ];
  });
  if (links.length === 0) return null;
  return (pass, fromMs, toMs) => {
    const track = trackOf(pass, fromMs, toMs);
    // One radio at a time: the best of them.
    return Math.max(...links.map((link) => volumeOf(link, antenna, track)));
  };
}

function volumeOf(
  { radio, band, polarisationLossDb, gas }: Downlink,
  antenna: AntennaInput,
  track: LookAngles[],
): number {
  return linkAlongPass({
    track,
    radio: { ...radio, polarisation: radio.polarisation as Polarisation },
    antenna: { gOverTDbPerK: band.gOverTDbK, polarisationLossDb },
    site: antenna.site,
    gas,
  }).volumeBits;
}

/**
 * Elevation along the stretch from the pass's curve, range as of a circular orbit through its highest point. Azimuth and
 * range rate do not matter to the budget.
 */
function trackOf({ geometry, profile }: FoundPass, fromMs: number, toMs: number): LookAngles[] {
  const orbitKm = orbitRadiusKm(geometry.elevationDeg[1], geometry.rangeKm[1]);
  const [startMs, endMs] = [Date.parse(geometry.aosUtc), Date.parse(geometry.losUtc)];
  const stepMs = (endMs - startMs) / Math.max(1, profile.elevationDeg.length - 1);
  return Array.from({ length: SAMPLES + 1 }, (_, sample): LookAngles => {
    const timeMs = fromMs + (sample * (toMs - fromMs)) / SAMPLES;
    const elevationDeg = along(profile.elevationDeg, (timeMs - startMs) / stepMs);
    return { timeMs, azimuthDeg: 0, elevationDeg, rangeKm: rangeAtKm(orbitKm, elevationDeg), rangeRateKmPerS: 0 };
  });
}

/** A list of equal steps read between its entries. */
function along(values: readonly number[], place: number): number {
  const low = Math.min(Math.max(0, Math.floor(place)), values.length - 1);
  const high = Math.min(low + 1, values.length - 1);
  const share = Math.min(1, Math.max(0, place - low));
  return (values[low] ?? 0) * (1 - share) + (values[high] ?? 0) * share;
}

const radians = (deg: number): number => (deg * Math.PI) / 180;

/** Law of cosines in the triangle of the Earth's centre, station and spacecraft. */
function orbitRadiusKm(elevationDeg: number, rangeKm: number): number {
  const sine = Math.sin(radians(elevationDeg));
  return Math.sqrt(EARTH_RADIUS_KM ** 2 + rangeKm ** 2 + 2 * EARTH_RADIUS_KM * rangeKm * sine);
}

function rangeAtKm(orbitKm: number, elevationDeg: number): number {
  const across = EARTH_RADIUS_KM * Math.cos(radians(elevationDeg));
  return Math.sqrt(orbitKm ** 2 - across ** 2) - EARTH_RADIUS_KM * Math.sin(radians(elevationDeg));
}
