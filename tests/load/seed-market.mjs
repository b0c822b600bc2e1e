/** A large invented market, written straight into the database: antennas all over the world, spacecraft, and contacts sold. */
import { randomUUID } from 'node:crypto';
import {
  antennaBands,
  antennaMasks,
  antennas,
  availabilityRules,
  bookings,
  elementSets,
  organisations,
  people,
  priceCards,
  radios,
  spacecraft,
  stations,
} from '@skyberth/drizzle';

const HOUR_MS = 3_600_000;
/** One antenna in four has so many contacts sold to others, one every eight hours, where nothing else is asked for. */
const SOLD = { oneAntennaIn: 4, each: 20, everyMs: 8 * HOUR_MS };

/** Fractions 0 to 1 that are the same in every run (linear congruence of Numerical Recipes). */
function fractions(seed) {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 2 ** 32;
  };
}

/** @returns {{ stationIds: string[], spacecraftIds: string[] }} */
export function seedMarket(
  db,
  { organisationId, antennas: antennaCount, spacecraft: craftCount, startMs, sold = SOLD },
) {
  const next = fractions(20_261_201);
  return db.transaction((tx) => {
    const owner = addOrganisation(tx, 'owner', 'Measured Owner', startMs);
    const other = addOrganisation(tx, 'operator', 'Other Operator', startMs);
    const personId = tx.select({ id: people.id }).from(people).get().id;
    const spacecraftIds = Array.from({ length: craftCount }, (_, index) =>
      addCraft(tx, organisationId, index, startMs, next),
    );
    const placed = Array.from({ length: antennaCount }, (_, index) => addAntenna(tx, owner, index, startMs, next));
    placed
      .filter((_, index) => index % sold.oneAntennaIn === 0)
      .forEach((place) => {
        const contact = { place, owner, other, personId, startMs, sold };
        addContacts(tx, contact, addCraft(tx, other, randomUUID(), startMs, next));
      });
    return { stationIds: placed.map((each) => each.stationId), spacecraftIds };
  });
}

function addOrganisation(tx, kind, name, createdMs) {
  const id = randomUUID();
  const address = { line1: 'Quay 1', line2: '', postalCode: '1', city: 'Tidewater', country: 'NO' };
  tx.insert(organisations).values({ id, kind, name, address, billingEmail: 'bills@meter.example', createdMs }).run();
  return id;
}

function addCraft(tx, organisationId, index, startMs, next) {
  const id = randomUUID();
  const name = `Meter ${index}`;
  tx.insert(spacecraft).values({ id, organisationId, name, shortName: 'M', state: 'active', createdMs: startMs }).run();
  tx.insert(radios)
    .values({
      id: randomUUID(),
      spacecraftId: id,
      name: 'X payload',
      direction: 'downlink',
      band: 'X',
      centreFrequencyMhz: 8_200,
      bandwidthKhz: 50_000,
      polarisation: 'right',
      modulation: 'OQPSK',
      coding: 'none',
      dataRateBps: 50_000_000,
      eirpDbw: 12,
      requiredEbN0Db: 9.6,
      pointingLossDb: 0,
    })
    .run();
  const epochMs = startMs - 6 * HOUR_MS;
  const elements = {
    format: 'omm-json',
    objectName: name,
    objectId: '2026-001A',
    catalogNumber: 70_000,
    epochUtc: new Date(epochMs).toISOString(),
    epochMs,
    meanMotionRevPerDay: 14.2 + next() * 1.2,
    eccentricity: 0.0005 + next() * 0.002,
    inclinationDeg: 96 + next() * 3,
    raanDeg: next() * 360,
    argPerigeeDeg: next() * 360,
    meanAnomalyDeg: next() * 360,
    bstarPerEarthRadius: 0.00003,
    meanMotionDot: 0,
    meanMotionDdot: 0,
    elementSetNumber: 1,
    revolutionAtEpoch: 1,
    classification: 'U',
    sourceLine: 1,
  };
  tx.insert(elementSets)
    .values({
      id: randomUUID(),
      spacecraftId: id,
      epochUtc: elements.epochUtc,
      epochMs,
      format: 'omm-json',
      elements: JSON.stringify(elements),
      digest: id,
      source: 'measured',
      addedMs: startMs,
    })
    .run();
  return id;
}

function addAntenna(tx, owner, index, startMs, next) {
  const [stationId, antennaId] = [randomUUID(), randomUUID()];
  tx.insert(stations)
    .values({
      id: stationId,
      organisationId: owner,
      name: `Station ${index}`,
      latitudeDeg: (Math.asin(2 * next() - 1) * 180) / Math.PI,
      longitudeDeg: next() * 360 - 180,
      altitudeM: next() * 500,
      country: 'NO',
      timeZone: ['Europe/Oslo', 'UTC', 'America/Santiago', 'Asia/Tokyo'][index % 4],
      currency: 'EUR',
      description: '',
      contactName: '',
      contactPhone: '',
      state: 'approved',
      stateNote: '',
      createdMs: startMs,
    })
    .run();
  tx.insert(antennas)
    .values({
      id: antennaId,
      stationId,
      name: `Dish ${index}`,
      diameterM: 5,
      mount: 'az-el',
      tiltDeg: 0,
      slewAzimuthDegPerS: 5,
      slewElevationDegPerS: 5,
      lowestReceiveDeg: 5,
      lowestTransmitDeg: 10,
      setupS: 120,
      teardownS: 60,
      beams: 1,
      minNoticeMin: 60,
      horizonDays: 30,
      minContactS: 120,
      maxContactS: 1_800,
      partsAllowed: true,
      acceptance: 'instant',
      answerWithinMin: 60,
      state: 'on sale',
      version: 1,
      createdMs: startMs,
    })
    .run();
  tx.insert(antennaBands)
    .values({
      id: randomUUID(),
      antennaId,
      direction: 'receive',
      band: 'X',
      fromMhz: 8_025,
      toMhz: 8_400,
      polarisations: ['right', 'left'],
      gOverTDbK: 28,
    })
    .run();
  // Half of the horizons are flat, half have a corner every ten degrees.
  const points = index % 2 === 0 ? [[0, 5]] : Array.from({ length: 36 }, (_, i) => [i * 10, 3 + next() * 12]);
  tx.insert(antennaMasks)
    .values({ id: randomUUID(), antennaId, version: 1, points, reason: '', publishedMs: startMs })
    .run();
  tx.insert(availabilityRules)
    .values({ id: randomUUID(), antennaId, days: [1, 2, 3, 4, 5, 6, 7], fromLocal: '00:00', toLocal: '24:00' })
    .run();
  const terms = { busyHours: [], shortNotice: null, volume: [], ladder: [{ hoursBeforeAos: 24, refundPercent: 100 }] };
  tx.insert(priceCards)
    .values({
      id: randomUUID(),
      antennaId,
      currency: 'EUR',
      perMinuteMinor: 560,
      setupMinor: 1_200,
      minimumMinor: 0,
      terms,
      validFromMs: 0,
      createdMs: 0,
    })
    .run();
  return { stationId, antennaId };
}

let number = 1_000;
function addContacts(tx, { place, owner, other, personId, startMs, sold }, spacecraftId) {
  const elementSetId = tx
    .select({ id: elementSets.id, of: elementSets.spacecraftId })
    .from(elementSets)
    .all()
    .find((row) => row.of === spacecraftId).id;
  for (let i = 0; i < sold.each; i += 1) {
    const aosMs = startMs + Math.round(i * sold.everyMs);
    const losMs = aosMs + 600_000;
    const [aosUtc, tcaUtc, losUtc] = [aosMs, aosMs + 300_000, losMs].map((timeMs) => new Date(timeMs).toISOString());
    const pass = {
      aosUtc,
      tcaUtc,
      losUtc,
      clippedStart: false,
      clippedEnd: false,
      azimuthDeg: [10, 90, 190],
      elevationDeg: [5, 60, 5],
      rangeKm: [2_000, 700, 2_000],
      rangeRateKmPerS: [-6, 0, 6],
      maxElevationDeg: 60,
    };
    number += 1;
    tx.insert(bookings)
      .values({
        id: randomUUID(),
        number,
        operatorId: other,
        ownerId: owner,
        spacecraftId,
        antennaId: place.antennaId,
        beam: 1,
        elementSetId,
        need: 'downlink',
        state: 'confirmed',
        aosMs,
        tcaMs: aosMs + 300_000,
        losMs,
        guardFromMs: aosMs - 120_000,
        guardToMs: losMs + 60_000,
        pass,
        quote: {
          currency: 'EUR',
          lines: [],
          totalMinor: 0,
          vat: { ratePercent: 0, amountMinor: 0, note: '' },
          toPayMinor: 0,
          ladder: [],
        },
        currency: 'EUR',
        netMinor: 0,
        vatMinor: 0,
        toPayMinor: 0,
        createdBy: personId,
        createdMs: startMs,
        changedMs: startMs,
      })
      .run();
  }
}
