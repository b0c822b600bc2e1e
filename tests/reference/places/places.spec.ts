import {
  ecefToGeodetic,
  geodeticToEcef,
  gmstRad,
  lookAt,
  type SiteFrame,
  siteFrame,
  temeToEcef,
} from '@skyberth/orbit';
import { describe, expect, it } from 'vitest';

const DEG = Math.PI / 180;
/** UT1 of a Julian date, as the package counts time (UT1 is taken as UTC). */
const msOfJulian = (day: number, fraction = 0) => (day - 2_440_587.5) * 86_400_000 + fraction * 86_400_000;

describe('places', () => {
  it('become Earth axes as in ERFA t_erfa_c, gd2gc', () => {
    const [x, y, z] = geodeticToEcef({ longitudeDeg: 3.1 / DEG, latitudeDeg: -0.5 / DEG, altitudeM: 2500 });
    expect(Math.abs(x * 1000 + 5_599_000.557704994)).toBeLessThan(1e-7);
    expect(Math.abs(y * 1000 - 233_011.67223479203)).toBeLessThan(1e-7);
    expect(Math.abs(z * 1000 + 3_040_909.470698336)).toBeLessThan(1e-7);
  });

  it('come back from Earth axes as in ERFA gc2gd', () => {
    const { longitudeDeg, latitudeDeg, altitudeM } = ecefToGeodetic([2000, 3000, 5244]);
    expect(Math.abs(longitudeDeg * DEG - 0.982793723247329)).toBeLessThan(1e-14);
    expect(Math.abs(latitudeDeg * DEG - 0.9716018481907546)).toBeLessThan(1e-14);
    expect(Math.abs(altitudeM - 331.4172461426)).toBeLessThan(1e-8);
  });

  it('agree with Vallado 3-3, 3-1 and 7-1 (inputs from the book, answers by ERFA)', () => {
    const place = ecefToGeodetic([6524.834, 6862.875, 6448.296]);
    expect(Math.abs(place.latitudeDeg - 34.352495)).toBeLessThan(1e-5);
    expect(Math.abs(place.longitudeDeg - 46.446417)).toBeLessThan(1e-5);
    expect(Math.abs(place.altitudeM / 1000 - 5085.2187)).toBeLessThan(1e-4);
    const [x, y, z] = geodeticToEcef({ latitudeDeg: 39.007, longitudeDeg: -104.883, altitudeM: 2187 });
    expect(Math.abs(x + 1275.12191)).toBeLessThan(1e-4);
    expect(Math.abs(y + 4797.98903)).toBeLessThan(1e-4);
    expect(Math.abs(z - 3994.29745)).toBeLessThan(1e-4);
  });

  it("give azimuth, elevation and range rate as in Vallado's companion test TestAzEl", () => {
    // The book's ellipsoid is a little smaller than WGS84: 6378.1363 km, e 0.081819221456.
    const latitude = 39.007 * DEG;
    const longitude = -104.883 * DEG;
    const e2 = 0.081819221456 ** 2;
    const normalKm = 6378.1363 / Math.sqrt(1 - e2 * Math.sin(latitude) ** 2);
    const acrossKm = (normalKm + 2.102) * Math.cos(latitude);
    const frame: SiteFrame = {
      ...siteFrame({ latitudeDeg: 39.007, longitudeDeg: -104.883, altitudeM: 2102 }),
      positionKm: [
        acrossKm * Math.cos(longitude),
        acrossKm * Math.sin(longitude),
        (normalKm * (1 - e2) + 2.102) * Math.sin(latitude),
      ],
    };
    const state = Float64Array.of(
      -5225.545532658,
      -3070.986596961,
      3501.815987085,
      -5.373672578,
      -3.302103863,
      4.020523711,
    );
    const look = lookAt(frame, 0, state);
    // A millimetre is left, which the digits printed for the ellipsoid account for.
    expect(Math.abs(look.rangeKm - 4339.444884045)).toBeLessThan(2e-6);
    expect(Math.abs(look.azimuthDeg * DEG - (2 * Math.PI - 1.5639427896))).toBeLessThan(1e-6);
    expect(Math.abs(look.elevationDeg * DEG + 0.1897354023)).toBeLessThan(1e-6);
    expect(Math.abs(look.rangeRateKmPerS - 3.121604251)).toBeLessThan(1e-6);
  });
});

describe('sidereal time', () => {
  it('is that of ERFA gmst82', () => {
    expect(Math.abs(gmstRad(msOfJulian(2_453_736.5)) - 1.754174981860675)).toBeLessThan(1e-12);
  });

  it('is that of Vallado Example 3-5', () => {
    expect(Math.abs(gmstRad(Date.UTC(1992, 7, 20, 12, 14)) / DEG - 152.578787852)).toBeLessThan(1e-7);
  });

  it('is that of Orekit GMSTScaleTest, to 0.4 ms', () => {
    const seconds = (gmstRad(Date.UTC(2001, 9, 3, 6, 30)) / (2 * Math.PI)) * 86_400;
    expect(Math.abs(seconds - (7 * 3600 + 18 * 60 + 8.329))).toBeLessThan(4e-4);
  });

  it('turns TEME into pseudo Earth-fixed as AIAA 2006-6753 appendix C and Vallado Example 3-15 have it', () => {
    // UT1 of that instant: dUT1 is -0.4399619 s.
    const timeMs = Date.UTC(2004, 3, 6, 7, 51, 28) + 386.009 - 439.9619;
    const state = Float64Array.of(5094.180162, 6127.644659, 6380.344533, -4.746131, 0.785818, 5.531931);
    temeToEcef(timeMs, state);
    // 1e-6 km of PEF, 1e-6 km of the printed TEME digits and 0.0003 km for a microsecond of Earth turn.
    [-1033.4750313, 7901.3055856, 6380.3445327].forEach((value, axis) => {
      expect(Math.abs(state[axis]! - value)).toBeLessThan(1e-5);
    });
  });
});
