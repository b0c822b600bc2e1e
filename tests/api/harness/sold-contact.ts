/** Sold contacts written straight into the database, for tests about who may see them and not about how they come about. */
import { randomUUID } from 'node:crypto';
import { bookings, elementSets, invoices, openDatabase } from '@skyberth/drizzle';
import type { BookingState, Invoice, PassGeometry, Quote } from '@skyberth/shared';
import { count, eq, max } from 'drizzle-orm';
import type { Skyberth } from '../harness.js';
import type { Person } from './people.js';

export interface SoldContactOptions {
  readonly operator: Person;
  readonly owner: Person;
  readonly antennaId: string;
  readonly spacecraftId: string;
  readonly aosMs: number;
  readonly id?: string;
  readonly state?: BookingState;
  /** A minute before AOS and after LOS where not given. */
  readonly guardFromMs?: number;
  readonly losMs?: number;
  readonly guardToMs?: number;
}

const LENGTH_MS = 480_000;
const GUARD_MS = 60_000;
const NET_MINOR = 5_680;

/** Adds a contact of eight minutes, with an invoice; needs elements of the spacecraft. Returns both ids. */
export function addSoldContact(skyberth: Skyberth, options: SoldContactOptions): { booking: string; invoice: string } {
  const { operator, owner, aosMs } = options;
  const losMs = options.losMs ?? aosMs + LENGTH_MS;
  const id = options.id ?? randomUUID();
  const nowMs = skyberth.clock.nowMs();
  const db = openDatabase(skyberth.databaseFile);
  try {
    const set = db.select().from(elementSets).where(eq(elementSets.spacecraftId, options.spacecraftId)).get();
    if (!set) throw new Error('The spacecraft has no elements.');
    const number =
      (db
        .select({ last: max(bookings.number) })
        .from(bookings)
        .get()?.last ?? 5_000) + 1;
    const sums = { currency: 'EUR', netMinor: NET_MINOR, vatMinor: 0 };
    db.insert(bookings)
      .values({
        id,
        number,
        operatorId: operator.organisationId,
        ownerId: owner.organisationId,
        spacecraftId: options.spacecraftId,
        antennaId: options.antennaId,
        beam: 1,
        elementSetId: set.id,
        need: 'downlink',
        state: options.state ?? 'confirmed',
        aosMs,
        tcaMs: (aosMs + losMs) / 2,
        losMs,
        guardFromMs: options.guardFromMs ?? aosMs - GUARD_MS,
        guardToMs: options.guardToMs ?? losMs + GUARD_MS,
        pass: passOf(aosMs, losMs),
        quote: QUOTE,
        ...sums,
        toPayMinor: NET_MINOR,
        createdBy: operator.personId,
        createdMs: nowMs,
        changedMs: nowMs,
      })
      .run();
    const series = 'TEST';
    const seq = (db.select({ rows: count() }).from(invoices).where(eq(invoices.series, series)).get()?.rows ?? 0) + 1;
    const invoice = randomUUID();
    const parties = { operatorId: operator.organisationId, ownerId: owner.organisationId };
    const document = documentOf({ id: invoice, number, bookingId: id, issuedMs: nowMs, aosMs, seq });
    db.insert(invoices)
      .values({
        id: invoice,
        series,
        seq,
        number: document.number,
        kind: 'invoice',
        bookingId: id,
        ...parties,
        issuedMs: nowMs,
        ...sums,
        grossMinor: NET_MINOR,
        document,
      })
      .run();
    return { booking: id, invoice };
  } finally {
    db.$client.close();
  }
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

const passOf = (aosMs: number, losMs: number): PassGeometry => ({
  aosUtc: utc(aosMs),
  tcaUtc: utc((aosMs + losMs) / 2),
  losUtc: utc(losMs),
  clippedStart: false,
  clippedEnd: false,
  azimuthDeg: [10, 90, 170],
  elevationDeg: [5, 40, 5],
  rangeKm: [2_100, 800, 2_100],
  rangeRateKmPerS: [-6, 0, 6],
  maxElevationDeg: 40,
});

const QUOTE: Quote = {
  currency: 'EUR',
  lines: [
    { label: '8 min 00 s', detail: 'at €5.60 a minute', amountMinor: 4_480 },
    { label: 'Set-up', detail: '', amountMinor: 1_200 },
  ],
  totalMinor: NET_MINOR,
  vat: { ratePercent: 0, amountMinor: 0, note: 'Reverse charge' },
  toPayMinor: NET_MINOR,
  ladder: [{ refundPercent: 0, hoursBeforeAos: 0, untilUtc: null, now: true }],
};

interface DocumentOptions {
  readonly id: string;
  readonly number: number;
  readonly bookingId: string;
  readonly issuedMs: number;
  readonly aosMs: number;
  readonly seq: number;
}

function documentOf({ id, number, bookingId, issuedMs, aosMs, seq }: DocumentOptions): Invoice {
  const address = { line1: 'Lock Street 1', line2: '', postalCode: '10115', city: 'Tidewater', country: 'DE' };
  return {
    id,
    number: `TEST-${String(seq).padStart(6, '0')}`,
    kind: 'invoice',
    issuedUtc: utc(issuedMs),
    customerName: 'Test operator',
    bookingNumber: number,
    bookingId,
    currency: 'EUR',
    netMinor: NET_MINOR,
    vatMinor: 0,
    grossMinor: NET_MINOR,
    supplier: { name: 'Test seller', address, vatNumber: null },
    customer: { name: 'Test operator', address, vatNumber: null },
    suppliedOnUtc: utc(aosMs),
    lines: [{ description: 'Contact', quantity: '1', unitMinor: NET_MINOR, discountMinor: 0, amountMinor: NET_MINOR }],
    vatRatePercent: 0,
    vatNote: 'Reverse charge',
    subject: 'Contact for a test',
    creditsNumber: null,
  };
}
