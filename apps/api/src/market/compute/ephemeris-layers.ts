/** Where a spacecraft is by its operator's ephemerides, and by the element set wherever none of them reaches. */
import {
  hybridSource,
  type Oem,
  type OemSegment,
  type OemSource,
  oemSource,
  sgp4Source,
  type TrajectorySource,
} from '@skyberth/orbit';
import type { PassSource } from '@skyberth/shared';
import { WeightedCache } from '../../platform/weighted-cache.js';
import type { ElementsSpan, EphemerisInput } from '../workers/job-types.js';

/** An instant and its six numbers. */
const NUMBERS_A_STATE = 7;
/** Bytes of turned states kept in one thread. */
const MAX_BYTES = 100_000_000;

/** What a stretch of a pass was computed from. */
export interface Origin {
  readonly source: PassSource;
  /** Of several the one at the highest point, else the first. */
  readonly ephemeris: EphemerisInput | null;
}

/** Names what a span computes its passes from: the same name always gives the same passes of one spacecraft. */
export const sourceName = ({ elementSetId, ephemerides }: ElementsSpan): string =>
  ephemerides.length === 0 ? elementSetId : `${elementSetId}+${ephemerides.map((each) => each.id).join('+')}`;

export class EphemerisLayers {
  private readonly sources = new WeightedCache<OemSource>(MAX_BYTES);

  /** At each instant the last ephemeris that reaches it answers, else the element set. */
  sourceOf(span: ElementsSpan): TrajectorySource {
    return span.ephemerides.reduce<TrajectorySource>(
      (below, ephemeris) => hybridSource(this.oem(ephemeris), below),
      sgp4Source(span.elementSet),
    );
  }

  /** @param instants begin, highest point and end of what is asked about */
  originOf(span: ElementsSpan, instants: readonly [beginMs: number, highestMs: number, endMs: number]): Origin {
    const [begin, highest, end] = instants.map((timeMs) => this.reaching(span, timeMs)) as [
      EphemerisInput | null,
      EphemerisInput | null,
      EphemerisInput | null,
    ];
    const ephemeris = highest ?? begin ?? end;
    if (ephemeris === null) return { source: 'element set', ephemeris };
    const isWhole = begin !== null && highest !== null && end !== null;
    return { source: isWhole ? 'ephemeris' : 'both', ephemeris };
  }

  private reaching(span: ElementsSpan, timeMs: number): EphemerisInput | null {
    const isIn = (ephemeris: EphemerisInput): boolean =>
      this.oem(ephemeris).spans.some(({ startMs, stopMs }) => timeMs >= startMs && timeMs <= stopMs);
    return span.ephemerides.findLast(isIn) ?? null;
  }

  private oem(ephemeris: EphemerisInput): OemSource {
    const known = this.sources.get(ephemeris.id);
    if (known !== undefined) return known;
    const source = oemSource(unpacked(ephemeris));
    this.sources.set(ephemeris.id, source, ephemeris.states.byteLength);
    return source;
  }
}

function unpacked({ id, segments, states }: EphemerisInput): Oem {
  let at = 0;
  const whole = segments.map((segment): OemSegment => {
    const { count, useableStartMs, useableStopMs, interpolation, interpolationDegree, ...rest } = segment;
    const timesMs = states.subarray(at, at + count);
    const own = states.subarray(at + count, at + NUMBERS_A_STATE * count);
    at += NUMBERS_A_STATE * count;
    return {
      ...rest,
      objectName: id,
      objectId: id,
      centerName: 'EARTH',
      useableStartMs: useableStartMs ?? undefined,
      useableStopMs: useableStopMs ?? undefined,
      interpolation: interpolation ?? undefined,
      interpolationDegree: interpolationDegree ?? undefined,
      comments: [],
      timesMs,
      states: own,
      accelerations: undefined,
      covariances: [],
    };
  });
  return {
    version: '2.0',
    creationDate: '',
    originator: '',
    messageId: undefined,
    classification: undefined,
    comments: [],
    segments: whole,
  };
}
