/** The market of a trial: buyers who sign up like anyone, each with a spacecraft, and antennas that are far too few for them. */
import { antennas, openDatabase, spacecraft, stations } from '@skyberth/drizzle';
import { eq, inArray } from 'drizzle-orm';
import { seedMarket } from '../../load/seed-market.mjs';
import { chance } from '../../load/year/chance.mjs';
import { Person } from './person.mjs';

const HOUR_MS = 3_600_000;
/** From well after the latest moment to which the trial moves the clock. */
const WINDOW_HOURS = { from: 6, to: 60 };
const BUYERS_PER_ANTENNA = 6;
const FEWEST_ANTENNAS = 3;
/** So many sign up at once; a password costs the server something. */
const AT_ONCE = 8;
const NO_CONTACTS = { oneAntennaIn: 1, each: 0, everyMs: 0 };

/** @returns {Promise<{ buyers: Person[], owner: Person }>} */
export async function openMarket({ databaseFile, servers, buyerCount, seed, failures }) {
  const person = (name, index) => {
    const { whole } = chance(seed + index);
    const address = `10.0.${index >> 8}.${index & 255}`;
    return new Person({ name, address, pick: (below) => whole(0, below - 1), servers, failures });
  };
  const owner = person('owner', 0);
  await owner.signUp('owner');
  const buyers = Array.from({ length: buyerCount }, (_, index) => person(`buyer-${index + 1}`, index + 1));
  await inTurns(buyers, (buyer) => buyer.signUp('operator'));
  const { spacecraftIds } = seedFor(databaseFile, { owner, buyers });
  await inTurns(
    buyers.map((buyer, index) => ({ buyer, spacecraftId: spacecraftIds[index] })),
    prepare,
  );
  return { owner, buyers: buyers.filter(({ wishes }) => wishes.length > 0) };
}

/** Half of the antennas sell at once, the other half ask their owner. */
function seedFor(databaseFile, { owner, buyers }) {
  const db = openDatabase(databaseFile);
  try {
    const count = Math.max(FEWEST_ANTENNAS, Math.ceil(buyers.length / BUYERS_PER_ANTENNA));
    const organisationId = buyers[0].organisationId;
    const startMs = Date.now();
    const made = seedMarket(db, {
      organisationId,
      antennas: count,
      spacecraft: buyers.length,
      startMs,
      sold: NO_CONTACTS,
    });
    const asking = made.stationIds.filter((_, index) => index % 2 === 1);
    db.update(stations)
      .set({ organisationId: owner.organisationId })
      .where(inArray(stations.id, made.stationIds))
      .run();
    db.update(antennas).set({ acceptance: 'owner' }).where(inArray(antennas.stationId, asking)).run();
    buyers.forEach((buyer, index) => {
      const mine = eq(spacecraft.id, made.spacecraftIds[index]);
      db.update(spacecraft).set({ organisationId: buyer.organisationId }).where(mine).run();
    });
    return made;
  } finally {
    db.$client.close();
  }
}

/** Looks for passes as the page does. */
async function prepare({ buyer, spacecraftId }) {
  const nowMs = Date.now();
  const [fromUtc, toUtc] = [WINDOW_HOURS.from, WINDOW_HOURS.to].map((hours) =>
    new Date(nowMs + hours * HOUR_MS).toISOString(),
  );
  const { status, body } = await buyer.post('/api/passes/search', { spacecraftIds: [spacecraftId], fromUtc, toUtc });
  if (status !== 200) throw new Error(`The search answered ${status}: ${JSON.stringify(body)}`);
  const wishes = body.passes
    .filter(({ state, parts }) => state === 'for sale' && parts.length === 1)
    .map(({ antennaId, parts: [{ aosUtc, losUtc }] }) => ({
      antennaId,
      spacecraftId,
      need: 'downlink',
      aosUtc,
      losUtc,
    }));
  Object.assign(buyer, { wishes, groupOf: new Map(), receipts: [], card: null });
}

async function inTurns(list, work) {
  for (let at = 0; at < list.length; at += AT_ONCE) await Promise.all(list.slice(at, at + AT_ONCE).map(work));
}
