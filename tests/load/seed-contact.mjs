/** A contact that is under way, its station's worker, and people of the operator who may listen to it. */
import { createHmac, randomUUID } from 'node:crypto';
import { bookings, memberships, people, sessionFamilies } from '@skyberth/drizzle';
import { eq } from 'drizzle-orm';
import { seedMarket } from './seed-market.mjs';

/** One person may open so many streams. */
const STREAMS_OF_ONE = 8;
const SINCE_AOS_MS = 60_000;

/** @returns {{ bookingId: string, ownerCookie: string, listenerCookies: string[] }} */
export function seedContact(db, { listeners, tokenSecret }) {
  const nowMs = Date.now();
  const first = addPerson(db, nowMs, 0);
  const sold = { oneAntennaIn: 1, each: 1, everyMs: 1 };
  seedMarket(db, { organisationId: '', antennas: 1, spacecraft: 0, startMs: nowMs - SINCE_AOS_MS, sold });
  const booking = db.select().from(bookings).get();
  db.update(bookings).set({ state: 'under way' }).where(eq(bookings.id, booking.id)).run();
  const sessionOf = (personId, organisationId) => addSession(db, { personId, organisationId, nowMs, tokenSecret });
  const listenerCookies = [];
  for (let i = 1; listenerCookies.length < listeners; i += 1) {
    const cookie = sessionOf(addPerson(db, nowMs, i), booking.operatorId);
    for (let n = 0; n < STREAMS_OF_ONE && listenerCookies.length < listeners; n += 1) listenerCookies.push(cookie);
  }
  return { bookingId: booking.id, ownerCookie: sessionOf(first, booking.ownerId), listenerCookies };
}

function addPerson(db, createdMs, number) {
  const id = randomUUID();
  const email = `robin-${number}@meter.example`;
  db.insert(people)
    .values({ id, name: `Robin Meter ${number}`, email, emailVerifiedMs: createdMs, createdMs })
    .run();
  return id;
}

/** A session as signing in makes it, without the cost of checking hundreds of passwords. */
function addSession(db, { personId, organisationId, nowMs, tokenSecret }) {
  const id = randomUUID();
  db.insert(memberships).values({ personId, organisationId, role: 'member', createdMs: nowMs }).run();
  const times = { createdMs: nowMs, lastUsedMs: nowMs };
  db.insert(sessionFamilies)
    .values({ id, personId, organisationId, userAgent: 'measurement', ...times })
    .run();
  const issuedS = Math.floor(nowMs / 1000);
  const part = (value) => Buffer.from(JSON.stringify(value)).toString('base64url');
  const claims = {
    sub: personId,
    sid: id,
    iat: issuedS,
    exp: issuedS + 900,
    iss: 'https://skyberth.example/auth',
    aud: 'https://skyberth.example/api',
  };
  const signed = `${part({ alg: 'HS256', typ: 'at+jwt' })}.${part(claims)}`;
  return `skyberth_access=${signed}.${createHmac('sha256', tokenSecret).update(signed).digest('base64url')}`;
}
