/** Invented antennas and spacecraft for the tests of this feature. */
import type { ElementSet } from '@skyberth/orbit';
import type { Radio } from '@skyberth/shared';
import type { AntennaInput, CraftInput, SearchJob } from '../workers/job-types.js';

export function sampleAntenna(changes: Partial<AntennaInput> = {}): AntennaInput {
  return {
    id: '01939f7e-0000-7000-8000-0000000000a1',
    stationId: '01939f7e-0000-7000-8000-0000000000e1',
    stationName: 'Hollenvik',
    version: 1,
    name: 'Hollenvik 1',
    site: { latitudeDeg: 69.3, longitudeDeg: 16.1, altitudeM: 40 },
    mask: [
      [0, 2],
      [180, 2],
    ],
    mount: 'az-el',
    tiltDeg: 0,
    slewAzimuthDegPerS: 5,
    slewElevationDegPerS: 5,
    lowestReceiveDeg: 5,
    lowestTransmitDeg: 10,
    bands: [
      {
        id: '01939f7e-0000-7000-8000-0000000000b1',
        direction: 'receive',
        band: 'S',
        fromMhz: 2200,
        toMhz: 2300,
        polarisations: ['right', 'left'],
        gOverTDbK: 15,
        eirpDbw: null,
        lowestElevationDeg: null,
      },
    ],
    setupS: 60,
    teardownS: 30,
    beams: 1,
    minNoticeMin: 30,
    horizonDays: 60,
    minContactS: 120,
    maxContactS: 1_200,
    partsAllowed: true,
    timeZone: 'Europe/Oslo',
    weekly: [{ days: [1, 2, 3, 4, 5, 6, 7], fromLocal: '00:00', toLocal: '24:00' }],
    openings: [],
    blackouts: [],
    price: {
      currency: 'EUR',
      perMinuteMinor: 640,
      setupMinor: 1_500,
      minimumMinor: 0,
      busyHours: [],
      shortNotice: null,
      volume: [],
      ladder: [{ hoursBeforeAos: 24, refundPercent: 100 }],
    },
    busy: [],
    bought: [],
    ...changes,
  };
}

export function sampleRadio(changes: Partial<Radio> = {}): Radio {
  return {
    id: '01939f7e-0000-7000-8000-0000000000c1',
    name: 'S telemetry',
    direction: 'downlink',
    band: 'S',
    centreFrequencyMhz: 2245,
    bandwidthKhz: 2_000,
    polarisation: 'right',
    modulation: 'BPSK',
    coding: 'CCSDS convolutional 1/2',
    dataRateBps: 1_000_000,
    eirpDbw: 0,
    requiredEbN0Db: 4.8,
    requiredEirpDbw: null,
    pointingLossDb: 0,
    ...changes,
  };
}

export function sampleCraft(changes: Partial<CraftInput> = {}): CraftInput {
  return {
    id: '01939f7e-0000-7000-8000-0000000000d1',
    name: 'Whimbrel 4',
    shortName: 'W4',
    spans: [],
    radios: [sampleRadio()],
    clearances: [],
    contacts: [],
    ...changes,
  };
}

/** Midday of an invented Tuesday, six hours after the epoch of the sample elements. */
export const SAMPLE_NOW_MS = Date.UTC(2026, 11, 1, 12);

/** A low near-polar orbit, unless told otherwise. */
export function sampleElements(changes: Partial<ElementSet> = {}): ElementSet {
  const epochMs = SAMPLE_NOW_MS - 6 * 3_600_000;
  return {
    format: 'omm-json',
    objectName: 'WHIMBREL 4',
    objectId: '2026-001D',
    catalogNumber: 71_004,
    epochUtc: new Date(epochMs).toISOString(),
    epochMs,
    meanMotionRevPerDay: 15.1,
    eccentricity: 0.001,
    inclinationDeg: 97.5,
    raanDeg: 40,
    argPerigeeDeg: 90,
    meanAnomalyDeg: 0,
    bstarPerEarthRadius: 0.00002,
    meanMotionDot: 0,
    meanMotionDdot: 0,
    elementSetNumber: 999,
    revolutionAtEpoch: 1,
    classification: 'U',
    sourceLine: 1,
    ...changes,
  };
}

/** A spacecraft with these elements for all time. */
export function sampleFlying(changes: Partial<ElementSet> = {}, craft: Partial<CraftInput> = {}): CraftInput {
  const elementSet = sampleElements(changes);
  const span = {
    fromMs: Number.NEGATIVE_INFINITY,
    toMs: Number.POSITIVE_INFINITY,
    elementSetId: '01939f7e-0000-7000-8000-0000000000e1',
    digest: JSON.stringify(elementSet),
    elementSet,
    ephemerides: [],
  };
  return sampleCraft({ spans: [span], ...craft });
}

export function sampleSearch(changes: Partial<SearchJob> = {}): SearchJob {
  return {
    kind: 'search',
    nowMs: SAMPLE_NOW_MS,
    fromMs: SAMPLE_NOW_MS,
    toMs: SAMPLE_NOW_MS + 3 * 86_400_000,
    wish: { need: 'downlink', bands: [], lowestElevationDeg: 0, shortestS: 0, highestPriceMinor: null },
    spacecraft: [sampleFlying()],
    antennas: [sampleAntenna()],
    maxPasses: 1_000,
    pulse: null,
    ...changes,
  };
}

/** What the pieces of a search's answer say, as a JSON list. */
export function jsonText(pieces: readonly Uint8Array[]): string {
  return `[${Buffer.concat(pieces).toString('utf8').slice(1)}]`;
}
