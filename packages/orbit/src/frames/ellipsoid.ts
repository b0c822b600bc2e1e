/** Places on the Earth's ellipsoid and in Earth axes. */
import { OrbitError } from '../orbit-error.js';
import type { GeodeticSite } from '../types.js';

/** Semi-major axis and flattening of WGS84 (as in ERFA `eform`, and NIMA TR8350.2). */
export const WGS84_RADIUS_KM = 6_378.137;
export const WGS84_FLATTENING = 1 / 298.257223563;
const E2 = WGS84_FLATTENING * (2 - WGS84_FLATTENING);

export const DEG = Math.PI / 180;

/** A point in Earth axes, km. */
export type EcefKm = readonly [xKm: number, yKm: number, zKm: number];

/** Earth axes of a place on WGS84. Source: the closed form in any handbook of geodesy; checked against ERFA `gd2gc`. */
export function geodeticToEcef(site: GeodeticSite): EcefKm {
  const latitude = site.latitudeDeg * DEG;
  const longitude = site.longitudeDeg * DEG;
  const altitudeKm = site.altitudeM / 1000;
  const sinLatitude = Math.sin(latitude);
  const normalKm = WGS84_RADIUS_KM / Math.sqrt(1 - E2 * sinLatitude * sinLatitude);
  const acrossKm = (normalKm + altitudeKm) * Math.cos(latitude);
  return [
    acrossKm * Math.cos(longitude),
    acrossKm * Math.sin(longitude),
    (normalKm * (1 - E2) + altitudeKm) * sinLatitude,
  ];
}

/**
 * The place on WGS84 under (or over) a point, longitude -180 to 180. Bowring's form of 1976, repeated until nothing moves;
 * three rounds reach 1e-14 rad anywhere outside the innermost 50 km.
 * @throws OrbitError `bad place` at the Earth's centre, where there is no direction.
 */
export function ecefToGeodetic([x, y, z]: EcefKm): GeodeticSite {
  const across = Math.hypot(x, y);
  if (!(Math.hypot(across, z) > 1)) {
    throw new OrbitError('bad place', `The point ${x}, ${y}, ${z} km is at the Earth's centre and has no latitude.`);
  }
  const polarKm = WGS84_RADIUS_KM * (1 - WGS84_FLATTENING);
  const secondE2 = E2 / (1 - E2);
  let reduced = Math.atan2(z * WGS84_RADIUS_KM, across * polarKm);
  let latitude = 0;
  for (let round = 0; round < 5; round += 1) {
    const sin = Math.sin(reduced);
    const cos = Math.cos(reduced);
    latitude = Math.atan2(z + secondE2 * polarKm * sin ** 3, across - E2 * WGS84_RADIUS_KM * cos ** 3);
    reduced = Math.atan2((1 - WGS84_FLATTENING) * Math.sin(latitude), Math.cos(latitude));
  }
  const sinLatitude = Math.sin(latitude);
  const normalKm = WGS84_RADIUS_KM / Math.sqrt(1 - E2 * sinLatitude * sinLatitude);
  // This form of the height keeps its digits at the equator and at the poles alike.
  const altitudeKm = across * Math.cos(latitude) + z * sinLatitude - WGS84_RADIUS_KM ** 2 / normalKm;
  return { latitudeDeg: latitude / DEG, longitudeDeg: Math.atan2(y, x) / DEG, altitudeM: altitudeKm * 1000 };
}

/**
 * A station with its own axes in Earth axes: east, north along the meridian, up along the ellipsoid's normal. At a pole the
 * meridian is that of the given longitude, so that azimuth still means something there.
 */
export interface SiteFrame {
  readonly site: GeodeticSite;
  readonly positionKm: EcefKm;
  readonly east: EcefKm;
  readonly north: EcefKm;
  readonly up: EcefKm;
}

/** @throws OrbitError `bad place` for a latitude outside -90..90, a longitude outside -360..360 or an odd altitude. */
export function siteFrame(site: GeodeticSite): SiteFrame {
  checkSite(site);
  const latitude = site.latitudeDeg * DEG;
  const longitude = site.longitudeDeg * DEG;
  const [sinLat, cosLat] = [Math.sin(latitude), Math.cos(latitude)];
  const [sinLon, cosLon] = [Math.sin(longitude), Math.cos(longitude)];
  return {
    site,
    positionKm: geodeticToEcef(site),
    east: [-sinLon, cosLon, 0],
    north: [-sinLat * cosLon, -sinLat * sinLon, cosLat],
    up: [cosLat * cosLon, cosLat * sinLon, sinLat],
  };
}

function checkSite({ latitudeDeg, longitudeDeg, altitudeM }: GeodeticSite): void {
  if (!(Math.abs(latitudeDeg) <= 90)) {
    throw new OrbitError('bad place', `The latitude is ${latitudeDeg} degrees; it must lie between -90 and 90.`);
  }
  if (!(Math.abs(longitudeDeg) <= 360)) {
    throw new OrbitError('bad place', `The longitude is ${longitudeDeg} degrees; it must lie between -180 and 180.`);
  }
  if (!(altitudeM >= -1_000 && altitudeM <= 100_000)) {
    throw new OrbitError('bad place', `The altitude is ${altitudeM} m; it must lie between -1000 and 100000.`);
  }
}
