/** SGP4 and SDP4 behind the package's own border: named units in, typed errors out, never a null or a NaN. */
import { json2satrec, type SatRec, type SatRecError, sgp4, twoline2satrec } from 'satellite.js';
import { OrbitError, type OrbitErrorCode } from '../orbit-error.js';
import type { TrajectorySource } from '../types.js';
import type { ElementSet } from './element-set.js';

const MINUTE_MS = 60_000;

/** What SGP4's own codes mean (AIAA 2006-6753, table of error returns). */
const SGP4_FAULTS: Readonly<Record<number, { code: OrbitErrorCode; sentence: string }>> = {
  1: { code: 'elements past use', sentence: 'the mean eccentricity left 0 to 1' },
  2: { code: 'elements past use', sentence: 'the mean motion fell below zero' },
  3: { code: 'elements past use', sentence: 'the perturbed eccentricity left 0 to 1' },
  4: { code: 'elements past use', sentence: 'the semi-latus rectum fell below zero' },
  6: { code: 'decayed', sentence: 'the spacecraft has decayed: the computed place lies under ground' },
};

/** A source made of mean elements, with the epoch it counts from. */
export interface Sgp4Source extends TrajectorySource {
  readonly epochMs: number;
}

/**
 * A trajectory from one element set: constants of WGS72, improved mode, the choice of AIAA 2006-6753. Time runs from the
 * exact epoch; what SGP4 itself takes from the epoch (Sun, Moon, sidereal time) needs no better than a millisecond.
 * @throws OrbitError `bad elements` where the elements make no orbit at all. `stateTeme` throws `decayed` or
 * `elements past use` with `data.sgp4Code` at an instant that SGP4 has no answer for.
 */
export function sgp4Source(set: ElementSet): Sgp4Source {
  const record = recordOf(set);
  const label = `${set.objectName || 'Object'} (${set.catalogNumber})`;
  if (!(record.a > 0) || !Number.isFinite(set.epochMs)) {
    throw new OrbitError('bad elements', `${label}: these elements make no orbit.`, {
      catalogNumber: set.catalogNumber,
    });
  }
  return new MeanElements(record, set.epochMs, label);
}

class MeanElements implements Sgp4Source {
  readonly startMs = Number.NEGATIVE_INFINITY;
  readonly stopMs = Number.POSITIVE_INFINITY;

  constructor(
    private readonly record: SatRec,
    readonly epochMs: number,
    private readonly label: string,
  ) {}

  stateTeme(timeMs: number, out: Float64Array): void {
    const { record } = this;
    const result = sgp4(record, (timeMs - this.epochMs) / MINUTE_MS);
    if (result === null) throw sgp4Fault(this.label, record.error, timeMs);
    const { position, velocity } = result;
    out[0] = position.x;
    out[1] = position.y;
    out[2] = position.z;
    out[3] = velocity.x;
    out[4] = velocity.y;
    out[5] = velocity.z;
    // Long after a decay the theory's drag polynomial turns over and gives places again; they mean nothing.
    if (record.tempa <= 0) throw sgp4Fault(this.label, 6, timeMs);
    if (!Number.isFinite(position.x + position.y + position.z + velocity.x + velocity.y + velocity.z)) {
      throw new OrbitError('bad elements', `${this.label}: SGP4 gives no number at ${isoOf(timeMs)}.`, { timeMs });
    }
  }
}

function recordOf(set: ElementSet): SatRec {
  if (set.tle) return twoline2satrec(set.tle[0], set.tle[1]);
  return json2satrec({
    OBJECT_NAME: set.objectName,
    OBJECT_ID: set.objectId,
    // The library reads no more than milliseconds of it, which is why time is counted from our own epoch.
    EPOCH: new Date(set.epochMs).toISOString(),
    MEAN_MOTION: set.meanMotionRevPerDay,
    ECCENTRICITY: set.eccentricity,
    INCLINATION: set.inclinationDeg,
    RA_OF_ASC_NODE: set.raanDeg,
    ARG_OF_PERICENTER: set.argPerigeeDeg,
    MEAN_ANOMALY: set.meanAnomalyDeg,
    NORAD_CAT_ID: set.catalogNumber,
    ELEMENT_SET_NO: set.elementSetNumber,
    REV_AT_EPOCH: set.revolutionAtEpoch,
    EPHEMERIS_TYPE: 0,
    CLASSIFICATION_TYPE: 'U',
    BSTAR: set.bstarPerEarthRadius,
    MEAN_MOTION_DOT: set.meanMotionDot,
    MEAN_MOTION_DDOT: set.meanMotionDdot,
  });
}

function sgp4Fault(label: string, sgp4Code: SatRecError, timeMs: number): OrbitError {
  const { code, sentence } = SGP4_FAULTS[sgp4Code] ?? {
    code: 'elements past use' as const,
    sentence: `SGP4 answers with its code ${sgp4Code}`,
  };
  return new OrbitError(code, `${label}: at ${isoOf(timeMs)} ${sentence}.`, { sgp4Code, timeMs });
}

function isoOf(timeMs: number): string {
  return Math.abs(timeMs) < 8.64e15 ? new Date(timeMs).toISOString() : `${timeMs} ms`;
}
