/** An antenna's mount as the geometry package knows it. */
import { type Mount, slewTimeS } from '@skyberth/orbit';
import type { AntennaInput } from '../workers/job-types.js';

export function mountOf(antenna: AntennaInput): Mount {
  return {
    kind: antenna.mount,
    tiltDeg: antenna.tiltDeg,
    first: { rateDegPerS: antenna.slewAzimuthDegPerS },
    second: { rateDegPerS: antenna.slewElevationDegPerS },
  };
}

/**
 * How long the dish turns between two azimuths near the horizon, where passes begin and end. Undefined for mounts whose
 * first axis is the azimuth: there the rate alone says it.
 */
export function turnTimeOf(
  antenna: AntennaInput,
): ((fromAzimuthDeg: number, toAzimuthDeg: number) => number) | undefined {
  if (antenna.mount !== 'x-y') return undefined;
  const mount = mountOf(antenna);
  const elevationDeg = Math.max(0, antenna.lowestReceiveDeg);
  return (from, to) => slewTimeS(mount, { azimuthDeg: from, elevationDeg }, { azimuthDeg: to, elevationDeg });
}
