/** Who trades in the simulated year: operators at home, elsewhere in the EU and outside it, and owners with antennas. */
import { antennas, elementSets, organisations, people, spacecraft, stations } from '@skyberth/drizzle';

/** Currencies with 2, 0 and 3 decimals, and the smallest and largest net price in minor units. */
export const CURRENCIES = [
  { currency: 'EUR', from: 3_000, to: 30_000 },
  { currency: 'NOK', from: 40_000, to: 300_000 },
  { currency: 'JPY', from: 5_000, to: 50_000 },
  { currency: 'KWD', from: 10_000, to: 90_000 },
];

const CUSTOMERS = [
  { country: 'FI', vatNumber: 'FI12345671', rateBasisPoints: 2_550 },
  { country: 'DE', vatNumber: 'DE136695976', rateBasisPoints: 0 },
  { country: 'NO', vatNumber: null, rateBasisPoints: 0 },
];

/** Names of the same things in every run, so that a seed gives the same year. */
let things = 0;
function nextId() {
  things += 1;
  return `00000000-0000-7000-8000-${things.toString(16).padStart(12, '0')}`;
}

export function makeWorld(db, startMs) {
  things = 0;
  const personId = nextId();
  db.insert(people)
    .values({
      id: personId,
      name: 'Year Keeper',
      email: 'year@meter.example',
      emailVerifiedMs: startMs,
      passwordHash: 'none',
      createdMs: startMs,
    })
    .run();
  const operators = Array.from({ length: 12 }, (_, index) => {
    const customer = CUSTOMERS[index % CUSTOMERS.length];
    const id = addOrganisation(db, { kind: 'operator', name: `Year Operator ${index}`, startMs, ...customer });
    return { id, ...customer, ...addCraft(db, id, index, startMs) };
  });
  const owners = Array.from({ length: 16 }, (_, index) => {
    const id = addOrganisation(db, {
      kind: 'owner',
      name: `Year Owner ${index}`,
      startMs,
      country: index % 2 ? 'NO' : 'FI',
    });
    const terms = CURRENCIES[index % CURRENCIES.length];
    return { id, ...terms, antennaId: addAntenna(db, id, { index, startMs, currency: terms.currency }) };
  });
  return { personId, operators, owners };
}

function addOrganisation(db, { kind, name, country, vatNumber = null, startMs }) {
  const id = nextId();
  const address = { line1: 'Quay 1', line2: '', postalCode: '1', city: 'Tidewater', country };
  const row = { id, kind, name, address, vatNumber, billingEmail: 'bills@meter.example', createdMs: startMs };
  db.insert(organisations).values(row).run();
  return id;
}

function addCraft(db, organisationId, index, startMs) {
  const spacecraftId = nextId();
  const craft = { id: spacecraftId, organisationId, name: `Year ${index}`, shortName: `Y${index}`, state: 'active' };
  db.insert(spacecraft)
    .values({ ...craft, createdMs: startMs })
    .run();
  const elementSetId = nextId();
  db.insert(elementSets)
    .values({
      id: elementSetId,
      spacecraftId,
      epochUtc: new Date(startMs).toISOString(),
      epochMs: startMs,
      format: 'omm-json',
      elements: '{}',
      digest: spacecraftId,
      source: 'simulated',
      addedMs: startMs,
    })
    .run();
  return { spacecraftId, elementSetId };
}

function addAntenna(db, organisationId, { index, startMs, currency }) {
  const [stationId, antennaId] = [nextId(), nextId()];
  db.insert(stations)
    .values({
      id: stationId,
      organisationId,
      name: `Year Station ${index}`,
      latitudeDeg: 60,
      longitudeDeg: 20,
      altitudeM: 10,
      country: 'FI',
      timeZone: 'UTC',
      currency,
      description: '',
      contactName: '',
      contactPhone: '',
      state: 'approved',
      stateNote: '',
      createdMs: startMs,
    })
    .run();
  db.insert(antennas)
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
      setupS: 0,
      teardownS: 0,
      beams: 1,
      minNoticeMin: 0,
      horizonDays: 30,
      minContactS: 60,
      maxContactS: 1_800,
      partsAllowed: true,
      acceptance: 'instant',
      answerWithinMin: 60,
      state: 'on sale',
      version: 1,
      createdMs: startMs,
    })
    .run();
  return antennaId;
}

const CONTACT_MS = 480_000;

/** The row of a contact that was flown and waits for its report. */
export function bookingRow({ operator, owner, quote, personId, id, number, aosMs, nowMs }) {
  const losMs = aosMs + CONTACT_MS;
  return {
    id,
    number,
    operatorId: operator.id,
    ownerId: owner.id,
    spacecraftId: operator.spacecraftId,
    antennaId: owner.antennaId,
    beam: 1,
    elementSetId: operator.elementSetId,
    need: 'downlink',
    state: 'reporting',
    aosMs,
    tcaMs: aosMs + CONTACT_MS / 2,
    losMs,
    guardFromMs: aosMs,
    guardToMs: losMs,
    pass: {},
    quote,
    currency: quote.currency,
    netMinor: quote.totalMinor,
    vatMinor: quote.vat.amountMinor,
    toPayMinor: quote.toPayMinor,
    createdBy: personId,
    createdMs: nowMs,
    changedMs: nowMs,
  };
}

/** The frozen price of such a contact. */
export const quoteOf = ({ currency, netMinor, vatMinor, rateBasisPoints }) => ({
  currency,
  lines: [{ label: '8 min 00 s', detail: '', amountMinor: netMinor }],
  totalMinor: netMinor,
  vat: {
    ratePercent: rateBasisPoints / 100,
    amountMinor: vatMinor,
    note: rateBasisPoints > 0 ? 'VAT' : 'Reverse charge',
  },
  toPayMinor: netMinor + vatMinor,
  ladder: [],
});
