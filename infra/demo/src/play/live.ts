/** Contacts as stations report them: those of the last day, and the ones that run while the visitor comes. */
import { type FoundPass, routes } from '@skyberth/shared';
import type { Chance } from './chance.js';
import type { Actor } from './client.js';
import { type Season, utc } from './days.js';
import type { Company, PlayOperator } from './settle-in.js';
import type { Stage } from './stage.js';

const MINUTE_MS = 60_000;
const BYTES_PER_S = 110_000;
/** For how long one is to run on after the present was read: the rest of the play takes some of it. */
const RUNS_ON_MS = 5 * MINUTE_MS;
const RUNNING_WANTED = 4;

/** Reports a sold contact while it runs: acquired, bytes and Eb/N0 on the way, lost at the end. */
export async function flyLive(
  stage: Stage,
  chance: Chance,
  { bookingId, owner }: { readonly bookingId: string; readonly owner: Actor },
): Promise<void> {
  const params = { id: bookingId };
  const booking = await stage.call(owner, routes.getBooking, { params });
  if (booking.state !== 'confirmed' && booking.state !== 'under way') return;
  const [aosMs, losMs] = [Date.parse(booking.aosUtc), Date.parse(booking.losUtc)];
  const acquiredMs = aosMs + 2_000 + Math.round(chance.next() * 4_000);
  await stage.moveTo(acquiredMs + 500);
  await stage.call(owner, routes.reportLive, { params, body: { kind: 'acquired', happenedUtc: utc(acquiredMs) } });
  await stage.moveTo((aosMs + losMs) / 2);
  await reportProgress(stage, owner, bookingId, chance.next());
  await stage.moveTo(losMs - 3_000);
  await reportProgress(stage, owner, bookingId, chance.next());
  await stage.call(owner, routes.reportLive, { params, body: { kind: 'lost', isFinal: true } });
}

async function reportProgress(stage: Stage, owner: Actor, bookingId: string, luck: number): Promise<void> {
  const params = { id: bookingId };
  const booking = await stage.call(owner, routes.getBooking, { params });
  const seconds = Math.max(0, (stage.nowMs() - Date.parse(booking.aosUtc)) / 1000);
  const bytes = Math.round(seconds * BYTES_PER_S * (0.9 + luck / 10));
  await stage.call(owner, routes.reportLive, { params, body: { kind: 'bytes', bytes } });
  const ebN0Db = Math.round((8 + luck * 5) * 10) / 10;
  await stage.call(owner, routes.reportLive, { params, body: { kind: 'eb/n0', ebN0Db } });
}

/** Buys passes that are above some antenna at this very minute, whatever it is; those that run on for longest. */
export async function buyForThisMinute(stage: Stage, company: Company, season: Season, nowMs: number): Promise<void> {
  const found: { readonly operator: PlayOperator; readonly pass: FoundPass; readonly losMs: number }[] = [];
  for (const operator of company.operators) {
    const { passes } = await stage.call(operator.manager, routes.searchPasses, {
      body: {
        spacecraftIds: operator.spacecraft.map(({ id }) => id),
        need: 'downlink',
        bands: ['S'],
        fromUtc: utc(nowMs - 20 * MINUTE_MS),
        toUtc: utc(nowMs + 30 * MINUTE_MS),
        lowestElevationDeg: 5,
        shortestS: 240,
      },
    });
    for (const pass of passes) {
      const [part] = pass.parts;
      if (pass.state !== 'for sale' || !part) continue;
      const [aosMs, losMs] = [Date.parse(part.aosUtc), Date.parse(part.losUtc)];
      if (aosMs < nowMs + MINUTE_MS && losMs > nowMs + RUNS_ON_MS) found.push({ operator, pass, losMs });
    }
  }
  found.sort((a, b) => b.losMs - a.losMs);
  const [antennas, craft] = [new Set<string>(), new Set<string>()];
  for (const { operator, pass } of found) {
    if (antennas.size >= RUNNING_WANTED) return;
    if (antennas.has(pass.antennaId) || craft.has(pass.spacecraftId)) continue;
    const bookingId = await season.hold(operator, pass);
    if (!bookingId) continue;
    await season.pay(operator, bookingId);
    await stage.settle();
    await acceptIfAsked(stage, company.ownerOf.get(pass.antennaId), bookingId);
    antennas.add(pass.antennaId);
    craft.add(pass.spacecraftId);
  }
}

async function acceptIfAsked(stage: Stage, owner: Actor | undefined, bookingId: string): Promise<void> {
  if (!owner) throw new Error('An antenna without an owner was sold.');
  const params = { id: bookingId };
  const { state } = await stage.call(owner, routes.getBooking, { params });
  if (state === 'awaiting owner') await stage.call(owner, routes.acceptBooking, { params });
  await stage.settle();
}

/** What stations have said so far of the contacts that run at the present. */
export async function reportWhatRuns(stage: Stage, company: Company): Promise<void> {
  await stage.settle();
  for (const { manager } of company.owners) {
    const running = await stage.call(manager, routes.listBookings, { query: { state: 'under way', pageSize: 20 } });
    for (const { id, aosUtc } of running.items) {
      const happenedUtc = utc(Math.min(stage.nowMs(), Date.parse(aosUtc) + 3_000));
      await stage.call(manager, routes.reportLive, { params: { id }, body: { kind: 'acquired', happenedUtc } });
      await reportProgress(stage, manager, id, 0.5);
    }
  }
}
