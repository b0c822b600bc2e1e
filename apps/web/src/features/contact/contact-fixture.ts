/** An invented booking and its geometry for the specs of this folder. */
import type { Booking, PassDetail } from '@skyberth/shared';

const UTC = (minute: number, second = 0): string => new Date(Date.UTC(2026, 11, 1, 14, minute, second)).toISOString();

export function booking(over: Partial<Booking> = {}): Booking {
  return {
    id: 'b1',
    number: 4127,
    state: 'confirmed',
    spacecraftName: 'Whimbrel 5',
    spacecraftShortName: 'W5',
    antennaId: 'te',
    antennaName: 'Tarnwick East',
    stationId: 'tarnwick',
    stationName: 'Tarnwick',
    stationTimeZone: 'Europe/London',
    operatorName: 'Saltmarsh Observation',
    ownerName: 'Tarnwick Radio',
    need: 'downlink',
    aosUtc: UTC(2),
    tcaUtc: UTC(6),
    losUtc: UTC(10),
    maxElevationDeg: 65.8,
    currency: 'EUR',
    toPayMinor: 5353,
    holdEndsUtc: null,
    answerByUtc: null,
    quote: {
      currency: 'EUR',
      lines: [],
      totalMinor: 5353,
      vat: { ratePercent: 0, amountMinor: 0, note: '' },
      toPayMinor: 5353,
      ladder: [],
    },
    payment: {
      state: 'authorised',
      amountMinor: 5353,
      capturedMinor: 0,
      refundedMinor: 0,
      currency: 'EUR',
      card: null,
      failure: null,
    },
    invoiceId: null,
    invoiceNumber: null,
    soldOn: 'element set',
    report: null,
    setupStartsUtc: UTC(0),
    teardownEndsUtc: UTC(12),
    events: [{ id: 'e1', atUtc: '2026-12-01T10:00:00.000Z', kind: 'hold', sentence: 'Held.', by: 'Skyberth' }],
    actions: [],
    refundNowMinor: null,
    ...over,
  };
}

/** Three points only: AOS, highest, LOS. */
export function detail(marginDb: readonly number[] = [3, 16, 8]): PassDetail {
  const point = (minute: number, azimuthDeg: number, elevationDeg: number, rangeKm: number) => ({
    timeUtc: UTC(minute),
    azimuthDeg,
    elevationDeg,
    rangeKm,
    rangeRateKmPerS: 0,
    sunlit: 1,
  });
  return {
    spacecraft: { id: 'w5', name: 'Whimbrel 5', shortName: 'W5' },
    antenna: {
      id: 'te',
      name: 'Tarnwick East',
      stationName: 'Tarnwick',
      ownerName: 'Tarnwick Radio',
      mask: [
        [0, 6],
        [180, 10],
      ],
      timeZone: 'Europe/London',
    },
    geometry: {
      aosUtc: UTC(2),
      tcaUtc: UTC(6),
      losUtc: UTC(10),
      clippedStart: false,
      clippedEnd: false,
      azimuthDeg: [10, 90, 180],
      elevationDeg: [8, 65.8, 18],
      rangeKm: [2100, 640, 1500],
      rangeRateKmPerS: [-6, 0, 6],
      maxElevationDeg: 65.8,
    },
    aosUtc: UTC(2),
    losUtc: UTC(10),
    track: [point(2, 10, 8, 2100), point(6, 90, 65.8, 640), point(10, 180, 18, 1500)],
    sun: { azimuthDeg: 208, elevationDeg: 6, closestDeg: 40, keepOffDeg: 5 },
    illumination: 'sunlit',
    links: [
      {
        radioName: 'Data',
        direction: 'downlink',
        band: 'S',
        frequencyMhz: 2214,
        dopplerHz: [50_000, 0, -50_000],
        marginDb: [...marginDb],
        volumeBits: null,
        budgetAtHighest: [],
        note: '',
      },
    ],
    source: 'element set',
    ephemeris: null,
    mountGaps: [],
    elements: { id: 'e', epochUtc: UTC(0), ageH: 9, timingErrorS: 0.4, freshness: 'fresh' },
    cautions: [],
    reasons: [],
    quote: null,
    acceptance: 'instant',
  };
}

export const atMinute = (minute: number): number => Date.parse(UTC(minute));
