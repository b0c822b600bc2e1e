/** Invented antennas and spacecraft for the tests of this feature. */
import type { Radio } from '@skyberth/shared';
import type { AntennaInput, CraftInput } from '../workers/job-types.js';

export function sampleAntenna(changes: Partial<AntennaInput> = {}): AntennaInput {
  return {
    id: '01939f7e-0000-7000-8000-0000000000a1',
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
    contacts: [],
    ...changes,
  };
}
