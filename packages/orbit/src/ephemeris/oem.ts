/** A CCSDS Orbit Ephemeris Message (502.0-B) as the rest of the package sees it, whichever form it was written in. */

/** Frames that can be turned into ours. Any ITRF realisation counts as ITRF: they differ by centimetres. */
export type OemFrame = 'EME2000' | 'ICRF' | 'GCRF' | 'ITRF' | 'TEME';

export type OemInterpolation = 'LINEAR' | 'LAGRANGE' | 'HERMITE';

/** 21 numbers of the lower triangle, row by row, km and km/s, at one instant. Carried along, not used. */
export interface OemCovariance {
  readonly epochMs: number;
  readonly frame: string | undefined;
  readonly lowerTriangle: readonly number[];
}

/** One unbroken run of states. Interpolation never reaches from one segment into another. */
export interface OemSegment {
  readonly objectName: string;
  readonly objectId: string;
  readonly centerName: string;
  readonly frame: OemFrame;
  /** The frame as written, such as ITRF2014. */
  readonly frameName: string;
  readonly startMs: number;
  readonly stopMs: number;
  readonly useableStartMs: number | undefined;
  readonly useableStopMs: number | undefined;
  readonly interpolation: OemInterpolation | undefined;
  readonly interpolationDegree: number | undefined;
  readonly comments: readonly string[];
  /** UTC milliseconds, rising. */
  readonly timesMs: Float64Array;
  /** x y z km, vx vy vz km/s for each instant, in `frame`. */
  readonly states: Float64Array;
  /** km/s2, three for each instant, where the message gave them. */
  readonly accelerations: Float64Array | undefined;
  readonly covariances: readonly OemCovariance[];
}

export interface Oem {
  readonly version: string;
  readonly creationDate: string;
  readonly originator: string;
  readonly messageId: string | undefined;
  readonly classification: string | undefined;
  readonly comments: readonly string[];
  readonly segments: readonly OemSegment[];
}

/** What is wrong with a message, where, and what would have been right. */
export interface OemFault {
  readonly line: number;
  readonly field: string;
  readonly found: string;
  readonly expected: string;
  readonly message: string;
}

/** More than this is more than anybody reads; the list ends with a line that says so. */
export const MOST_FAULTS = 200;

/** A line of a binary file can be megabytes long; a fault quotes its beginning. */
export const LONGEST_QUOTE = 60;

/** Collects faults, each with a sentence made of its own parts. */
export class FaultList {
  readonly faults: OemFault[] = [];

  add(fault: Omit<OemFault, 'message'> & { message?: string }): void {
    if (this.faults.length > MOST_FAULTS) return;
    if (this.faults.length === MOST_FAULTS) {
      const message = `More than ${MOST_FAULTS} faults; the rest is not listed.`;
      this.faults.push({ line: fault.line, field: '', found: '', expected: '', message });
      return;
    }
    const short = fault.found.slice(0, LONGEST_QUOTE);
    const found = short === '' ? 'found nothing' : `found ${JSON.stringify(short)}`;
    const message = fault.message ?? `Line ${fault.line}, ${fault.field}: ${found}, expected ${fault.expected}.`;
    this.faults.push({ ...fault, found: short, message });
  }

  get any(): boolean {
    return this.faults.length > 0;
  }
}
