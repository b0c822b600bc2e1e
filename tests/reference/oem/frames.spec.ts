import { describe, expect, it } from 'vitest';
import {
  aboutZ,
  apparentSiderealRad,
  gcrfToTrueOfDate,
  multiply,
  nutationRad,
  rotateInPlace,
} from '../../../packages/orbit/src/ephemeris/earth-orientation.js';
import { fromUtcMs, taiMinusUtcS, toUtcMs, ttCenturies } from '../../../packages/orbit/src/ephemeris/leap-seconds.js';
import { gmstRad } from '../../../packages/orbit/src/frames/sidereal.js';

const centuriesOfMjd = (mjd: number) => (mjd - 51_544.5) / 36_525;
const msOfJd = (jd: number, fraction = 0) => (jd - 2_440_587.5 + fraction) * 86_400_000;

describe('the reduction', () => {
  it('has the nutation IAU 2000B', () => {
    // ERFA t_erfa_c, nut00b at MJD 53736.
    const { longitudeRad, obliquityRad } = nutationRad(centuriesOfMjd(53_736));
    expect(Math.abs(longitudeRad - -0.9632552291148363e-5)).toBeLessThan(1e-13);
    expect(Math.abs(obliquityRad - 0.4063197106621159e-4)).toBeLessThan(1e-13);
  });

  it('has bias, precession and nutation of IAU 2006 to a thousandth of an arc second', () => {
    // ERFA t_erfa_c, pnm06a at MJD 50123.9999, which uses the longer nutation IAU 2000A.
    const expected = [
      0.99999958327942, 0.8372382772630962e-3, 0.3639684771140623e-3, -0.8372533744743684e-3, 0.999999648649286,
      0.4132905944611019e-4, -0.3639337469629465e-3, -0.4163377605910664e-4, 0.999999932909426,
    ];
    const milliarcsecond = Math.PI / (180 * 3600 * 1000);
    gcrfToTrueOfDate(centuriesOfMjd(50_123.9999)).forEach((value, index) => {
      expect(Math.abs(value - expected[index]!)).toBeLessThan(milliarcsecond);
    });
  });

  it('brings GCRF to Earth axes', () => {
    // Vallado Example 3-15: GCRF to PEF at 2004-04-06T07:51:28.386009 with dUT1 -0.4399619 s; agreement 2 cm.
    const utcMs = Date.UTC(2004, 3, 6, 7, 51, 28) + 386.009;
    const t = ttCenturies(utcMs);
    const place = Float64Array.of(5102.5089579, 6123.0114038, 6378.1369252);
    rotateInPlace(multiply(aboutZ(apparentSiderealRad(utcMs - 439.9619, t)), gcrfToTrueOfDate(t)), place, 0);
    const pef = [-1033.4750313, 7901.3055856, 6380.3445327];
    expect(Math.hypot(place[0]! - pef[0]!, place[1]! - pef[1]!, place[2]! - pef[2]!)).toBeLessThan(2e-5);
  });

  it('has the sidereal time of 1982', () => {
    // ERFA gmst82 at JD(UT1) 2453736.5; Vallado Example 3-5 on 1992-08-20 12:14 UT1.
    expect(Math.abs(gmstRad(msOfJd(2_453_736.5)) - 1.754174981860675)).toBeLessThan(1e-12);
    const degrees = (gmstRad(Date.UTC(1992, 7, 20, 12, 14)) * 180) / Math.PI;
    expect(Math.abs(degrees - 152.578787852)).toBeLessThan(1e-7);
  });
});

describe('clocks', () => {
  it('have the leap seconds of the IERS list', () => {
    // ERFA dat: 32 on 2003-06-01, 33 on 2008-01-17, 37 on 2017-09-01.
    expect(taiMinusUtcS(Date.UTC(2003, 5, 1))).toBe(32);
    expect(taiMinusUtcS(Date.UTC(2008, 0, 17))).toBe(33);
    expect(taiMinusUtcS(Date.UTC(2017, 8, 1))).toBe(37);
    expect(taiMinusUtcS(Date.UTC(2016, 11, 31, 23, 59, 59))).toBe(36);
  });

  it('turn UTC into TAI as ERFA utctai does', () => {
    // UTC 2453750.5 + 0.892100694 -> TAI 2453750.5 + 0.8924826384444.
    const utcMs = msOfJd(2_453_750.5, 0.892100694);
    expect(Math.abs(fromUtcMs(utcMs, 'TAI') - msOfJd(2_453_750.5, 0.8924826384444))).toBeLessThan(0.001);
  });

  it('come back to the same UTC over every step', () => {
    for (const utcMs of [
      Date.UTC(2016, 11, 31, 23, 59, 59, 999),
      Date.UTC(2017, 0, 1),
      Date.UTC(1999, 0, 1, 0, 0, 0, 1),
    ]) {
      for (const system of ['UTC', 'TAI', 'TT', 'GPS'] as const) {
        expect(toUtcMs(fromUtcMs(utcMs, system), system)).toBeCloseTo(utcMs, 3);
      }
    }
  });
});
