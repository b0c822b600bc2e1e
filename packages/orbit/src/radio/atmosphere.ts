/**
 * Gas absorption along a slanted ray: the mean annual global reference atmosphere of Recommendation ITU-R P.835
 * (the U.S. Standard Atmosphere 1976 below 86 km, vapour falling by e every 2 km), cut into shells, each absorbing as
 * Recommendation ITU-R P.676-12 says. The ray is straight: bending is left out, which matters below about 5 degrees.
 */
import { specificGasAttenuation } from './gas.js';

/** Mean radius used for the shells, km (Recommendation ITU-R P.676-12, Annex 1, section 2.2). */
const EARTH_RADIUS_KM = 6371;
const TOP_KM = 60;
const SEA_LEVEL_VAPOUR_G_PER_M3 = 7.5;
const VAPOUR_SCALE_KM = 2;

/** Base geopotential height km, temperature K, lapse K/km, pressure hPa (U.S. Standard Atmosphere 1976). */
const LEVELS: readonly (readonly [baseKm: number, baseK: number, lapseKPerKm: number, baseHpa: number])[] = [
  [0, 288.15, -6.5, 1013.25],
  [11, 216.65, 0, 226.3226],
  [20, 216.65, 1, 54.7498],
  [32, 228.65, 2.8, 8.680422],
  [47, 270.65, 0, 1.109106],
  [51, 270.65, -2.8, 0.6694167],
];

/** g0 M / R in K/km: the hydrostatic constant of the 1976 atmosphere. */
const HYDROSTATIC_K_PER_KM = 34.1632;

/** Temperature, total pressure and vapour at a height above sea level in km, 0 to 60. */
export function referenceAir(heightKm: number): { temperatureK: number; totalHpa: number; waterVapourGPerM3: number } {
  const geopotentialKm = (6356.766 * heightKm) / (6356.766 + heightKm);
  const level = LEVELS.findLast(([baseKm]) => geopotentialKm >= baseKm) ?? LEVELS[0]!;
  const [baseKm, baseK, lapse, baseHpa] = level;
  const temperatureK = baseK + lapse * (geopotentialKm - baseKm);
  const totalHpa =
    lapse === 0
      ? baseHpa * Math.exp((-HYDROSTATIC_K_PER_KM * (geopotentialKm - baseKm)) / baseK)
      : baseHpa * (baseK / temperatureK) ** (HYDROSTATIC_K_PER_KM / lapse);
  return {
    temperatureK,
    totalHpa,
    waterVapourGPerM3: SEA_LEVEL_VAPOUR_G_PER_M3 * Math.exp(-heightKm / VAPOUR_SCALE_KM),
  };
}

/** The absorption of each shell above one station at one frequency, ready to be summed along any elevation. */
export interface GasColumn {
  /** dB along the ray that leaves the station at this elevation, 0 to 90 degrees. */
  slantDb(elevationDeg: number): number;
}

/**
 * Prepares the shells above a station, thin near the ground and thicker above, because half the vapour is below 1.4 km.
 * One column serves a whole pass: the lines are summed once, not at each instant.
 */
export function gasColumn(place: { frequencyMhz: number; altitudeM: number }): GasColumn {
  const shells = shellHeightsKm(Math.max(0, place.altitudeM / 1000)).map(({ bottomKm, topKm }) => {
    const { temperatureK, totalHpa, waterVapourGPerM3 } = referenceAir((bottomKm + topKm) / 2);
    const vapourHpa = (waterVapourGPerM3 * temperatureK) / 216.7;
    const gammaDbPerKm = specificGasAttenuation(place.frequencyMhz / 1000, {
      pressureHpa: totalHpa - vapourHpa,
      temperatureK,
      waterVapourGPerM3,
    }).totalDbPerKm;
    return { bottomKm, topKm, gammaDbPerKm };
  });
  const groundKm = shells[0]!.bottomKm;
  return {
    slantDb(elevationDeg) {
      const elevationRad = (Math.max(0, Math.min(90, elevationDeg)) * Math.PI) / 180;
      const closestKm = (EARTH_RADIUS_KM + groundKm) * Math.cos(elevationRad);
      let sum = 0;
      let fromKm = alongRayKm(groundKm, closestKm);
      for (const { topKm, gammaDbPerKm } of shells) {
        const toKm = alongRayKm(topKm, closestKm);
        sum += gammaDbPerKm * (toKm - fromKm);
        fromKm = toKm;
      }
      return sum;
    },
  };
}

/** Distance along a straight ray from its point closest to the Earth's centre to a height. */
function alongRayKm(heightKm: number, closestKm: number): number {
  return Math.sqrt(Math.max(0, (EARTH_RADIUS_KM + heightKm) ** 2 - closestKm * closestKm));
}

function shellHeightsKm(groundKm: number): { bottomKm: number; topKm: number }[] {
  const shells: { bottomKm: number; topKm: number }[] = [];
  let bottomKm = groundKm;
  let thicknessKm = 0.1;
  while (bottomKm < TOP_KM) {
    const topKm = Math.min(TOP_KM, bottomKm + thicknessKm);
    shells.push({ bottomKm, topKm });
    bottomKm = topKm;
    thicknessKm *= 1.08;
  }
  return shells;
}
