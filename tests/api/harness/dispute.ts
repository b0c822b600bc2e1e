/** A dispute written straight into the database, for tests about who may see it and not about how it comes about. */
import { randomUUID } from 'node:crypto';
import { disputeEvidence, disputes, openDatabase } from '@skyberth/drizzle';
import type { DisputeEvidence } from '@skyberth/shared';
import type { Skyberth } from '../harness.js';
import { addSoldContact, type SoldContactOptions } from './sold-contact.js';

const DAY_MS = 86_400_000;

/** Adds an open dispute over a contact of two days ago; needs elements of the spacecraft. Returns its id. */
export function addDispute(skyberth: Skyberth, options: Omit<SoldContactOptions, 'aosMs' | 'state'>): string {
  const nowMs = skyberth.clock.nowMs();
  const aosMs = nowMs - 2 * DAY_MS;
  const { booking } = addSoldContact(skyberth, { ...options, aosMs, state: 'in dispute' });
  const id = randomUUID();
  const db = openDatabase(skyberth.databaseFile);
  try {
    db.insert(disputes)
      .values({
        id,
        number: 9_001,
        bookingId: booking,
        operatorId: options.operator.organisationId,
        ownerId: options.owner.organisationId,
        reason: 'other',
        state: 'open',
        openedMs: nowMs,
        statementDueMs: nowMs + 3 * DAY_MS,
        decideByMs: nowMs + 7 * DAY_MS,
      })
      .run();
    db.insert(disputeEvidence)
      .values({ disputeId: id, version: 1, assembledMs: nowMs, evidence: evidenceOf(aosMs, nowMs) })
      .run();
    return id;
  } finally {
    db.$client.close();
  }
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

const evidenceOf = (aosMs: number, nowMs: number): DisputeEvidence => ({
  assembledUtc: utc(nowMs),
  aosUtc: utc(aosMs),
  losUtc: utc(aosMs + 480_000),
  elements: { epochUtc: utc(aosMs - DAY_MS), ageH: 24 },
  later: null,
  track: [],
  sunClosestDeg: null,
  gap: null,
  station: [],
  predictedBytes: null,
  reportedBytes: null,
  mails: [],
  findings: [],
});
