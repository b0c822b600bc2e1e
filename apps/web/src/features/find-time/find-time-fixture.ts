/** An invented search result for the specs of this folder. */
import type { BookingSummary, FoundPass, SearchResult } from '@skyberth/shared';

export const AOS_UTC = '2026-12-01T15:00:05.000Z';
export const LOS_UTC = '2026-12-01T15:09:35.000Z';

export function foundPass(over: Partial<FoundPass> = {}): FoundPass {
  return {
    key: 'w4-h1-15',
    antennaId: 'h1',
    spacecraftId: 'w4',
    geometry: {
      aosUtc: AOS_UTC,
      tcaUtc: '2026-12-01T15:04:40.000Z',
      losUtc: LOS_UTC,
      clippedStart: false,
      clippedEnd: false,
      azimuthDeg: [22.3, 110, 206.9],
      elevationDeg: [8, 84.9, 9],
      rangeKm: [2214, 569, 2190],
      rangeRateKmPerS: [-6.9, 0, 6.9],
      maxElevationDeg: 84.9,
    },
    source: 'element set',
    profile: { elevationDeg: [7, 84, 8], maskDeg: [8, 5, 9] },
    state: 'for sale',
    bookingId: null,
    currency: 'EUR',
    parts: [{ aosUtc: AOS_UTC, losUtc: LOS_UTC, totalMinor: 8188 }],
    reasons: [],
    ...over,
  };
}

export function searchResult(passes: FoundPass[] = [foundPass()]): SearchResult {
  return {
    computedUtc: '2026-12-01T14:05:09.000Z',
    stations: [
      {
        id: 'hollenvik',
        name: 'Hollenvik',
        ownerName: 'Hollenvik Radio',
        country: 'NO',
        timeZone: 'Europe/Oslo',
        latitudeDeg: 69.3,
        longitudeDeg: 16.1,
        nights: [{ fromUtc: '2026-12-01T12:00:00Z', toUtc: '2026-12-02T09:00:00Z' }],
        antennas: [
          {
            id: 'h1',
            name: 'Hollenvik 1',
            diameterM: 7.3,
            bands: ['S', 'X'],
            currency: 'EUR',
            perMinuteMinor: 640,
            acceptance: 'instant',
            blackouts: [{ fromUtc: '2026-12-01T16:00:00Z', toUtc: '2026-12-01T17:00:00Z', reason: 'Feed change' }],
            taken: [{ fromUtc: '2026-12-01T14:10:00Z', toUtc: '2026-12-01T14:20:00Z' }],
          },
        ],
      },
    ],
    spacecraft: [
      {
        id: 'w4',
        name: 'Whimbrel 4',
        shortName: 'W4',
        elementsId: null,
        elementsEpochUtc: null,
        ageH: 9,
        timingErrorS: 0.4,
        freshness: 'fresh',
        fault: null,
      },
    ],
    passes,
    counts: { forSale: passes.filter((one) => one.state === 'for sale').length, passes: passes.length },
  };
}

export function heldBooking(over: Partial<BookingSummary> = {}): BookingSummary {
  return {
    id: 'b1',
    number: 4127,
    state: 'held',
    spacecraftName: 'Whimbrel 4',
    spacecraftShortName: 'W4',
    antennaId: 'h1',
    antennaName: 'Hollenvik 1',
    stationId: 'hollenvik',
    stationName: 'Hollenvik',
    stationTimeZone: 'Europe/Oslo',
    operatorName: 'Saltmarsh Observation',
    ownerName: 'Hollenvik Radio',
    need: 'downlink',
    aosUtc: AOS_UTC,
    tcaUtc: '2026-12-01T15:04:40.000Z',
    losUtc: LOS_UTC,
    maxElevationDeg: 84.9,
    currency: 'EUR',
    toPayMinor: 8188,
    holdEndsUtc: '2026-12-01T14:15:00.000Z',
    answerByUtc: null,
    ...over,
  };
}
