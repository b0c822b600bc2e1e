/** The three ways a dish is hung up, what its two axes read for a direction, and how long it turns from one to another. */

export type MountKind = 'az-el' | 'x-y' | 'tilted az-el';

export interface Axis {
  readonly rateDegPerS: number;
  /** Left out, the axis is taken to reach its rate at once. */
  readonly accelerationDegPerS2?: number;
  /** End stops. Left out on the first axis of an az-el mount, it turns without end. */
  readonly minDeg?: number;
  readonly maxDeg?: number;
}

/**
 * `first` is azimuth or X, `second` elevation or Y. X turns about a level axis that points to `xAxisAzimuthDeg` (0, north,
 * if left out), from the zenith towards the right of it; Y leans along it. A tilted mount's azimuth axis leans
 * `tiltDeg` from the zenith towards `tiltAzimuthDeg`.
 */
export interface Mount {
  readonly kind: MountKind;
  readonly tiltDeg?: number;
  readonly tiltAzimuthDeg?: number;
  readonly xAxisAzimuthDeg?: number;
  readonly first: Axis;
  readonly second: Axis;
}

export interface AzEl {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}

const RAD = Math.PI / 180;

/** Readings of the two axes in degrees: first 0..360 (X: -180..180), second -90..90. */
export function axisAngles(mount: Mount, direction: AzEl): readonly [firstDeg: number, secondDeg: number] {
  if (mount.kind === 'az-el') return [turned(direction.azimuthDeg), direction.elevationDeg];
  const alongAzimuthDeg = mount.kind === 'x-y' ? (mount.xAxisAzimuthDeg ?? 0) : (mount.tiltAzimuthDeg ?? 0);
  const { along, across, up } = levelParts(direction, alongAzimuthDeg);
  if (mount.kind === 'x-y') return [Math.atan2(across, up) / RAD, asinDeg(along)];
  const tilt = (mount.tiltDeg ?? 0) * RAD;
  const leaned = along * Math.cos(tilt) - up * Math.sin(tilt);
  const raised = along * Math.sin(tilt) + up * Math.cos(tilt);
  return [turned(alongAzimuthDeg + Math.atan2(across, leaned) / RAD), asinDeg(raised)];
}

/** A unit vector in parts along a level direction, to the right of it, and up. */
function levelParts(direction: AzEl, alongAzimuthDeg: number): { along: number; across: number; up: number } {
  const bearing = (direction.azimuthDeg - alongAzimuthDeg) * RAD;
  const level = Math.cos(direction.elevationDeg * RAD);
  return {
    along: level * Math.cos(bearing),
    across: level * Math.sin(bearing),
    up: Math.sin(direction.elevationDeg * RAD),
  };
}

function asinDeg(sine: number): number {
  return Math.asin(Math.max(-1, Math.min(1, sine))) / RAD;
}

function turned(degrees: number): number {
  return ((degrees % 360) + 360) % 360;
}

/** Whether the first axis goes round, so that a direction has several readings a turn apart. */
export function firstAxisTurns(mount: Mount): boolean {
  return mount.kind !== 'x-y';
}

/** Seconds from rest to rest over an angle: up to rate, along, and down again. Common mechanics. */
export function axisMoveS(axis: Axis, angleDeg: number): number {
  const distance = Math.abs(angleDeg);
  const { rateDegPerS: rate, accelerationDegPerS2: acceleration } = axis;
  if (acceleration === undefined) return distance / rate;
  if (distance <= (rate * rate) / acceleration) return 2 * Math.sqrt(distance / acceleration);
  return distance / rate + rate / acceleration;
}

/** Readings of the first axis that mean one direction, inside the end stops; without stops only the one given. */
export function readingsInTravel(mount: Mount, firstDeg: number): number[] {
  const { minDeg, maxDeg } = mount.first;
  if (!firstAxisTurns(mount) || minDeg === undefined || maxDeg === undefined) return [firstDeg];
  const readings: number[] = [];
  for (let turn = Math.ceil((minDeg - firstDeg) / 360); firstDeg + 360 * turn <= maxDeg; turn += 1) {
    readings.push(firstDeg + 360 * turn);
  }
  return readings;
}

/**
 * Seconds that the dish needs from one direction to another, both axes at once, from rest to rest. With end stops the
 * shortest way between any two readings that mean the two directions; infinite where one is out of travel.
 */
export function slewTimeS(mount: Mount, from: AzEl, to: AzEl): number {
  const [fromFirst, fromSecond] = axisAngles(mount, from);
  const [toFirst, toSecond] = axisAngles(mount, to);
  if (!inTravel(mount.second, fromSecond) || !inTravel(mount.second, toSecond)) return Number.POSITIVE_INFINITY;
  const secondS = axisMoveS(mount.second, toSecond - fromSecond);
  return Math.max(secondS, axisMoveS(mount.first, firstAxisWayDeg(mount, fromFirst, toFirst)));
}

function firstAxisWayDeg(mount: Mount, fromDeg: number, toDeg: number): number {
  const hasStops = mount.first.minDeg !== undefined && mount.first.maxDeg !== undefined;
  if (!firstAxisTurns(mount)) {
    return inTravel(mount.first, fromDeg) && inTravel(mount.first, toDeg) ? toDeg - fromDeg : Number.POSITIVE_INFINITY;
  }
  if (!hasStops) {
    const way = turned(toDeg - fromDeg);
    return Math.min(way, 360 - way);
  }
  let shortest = Number.POSITIVE_INFINITY;
  for (const start of readingsInTravel(mount, fromDeg)) {
    for (const end of readingsInTravel(mount, toDeg)) shortest = Math.min(shortest, Math.abs(end - start));
  }
  return shortest;
}

export function inTravel(axis: Axis, angleDeg: number): boolean {
  return angleDeg >= (axis.minDeg ?? Number.NEGATIVE_INFINITY) && angleDeg <= (axis.maxDeg ?? Number.POSITIVE_INFINITY);
}
