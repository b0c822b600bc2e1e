/** What buyers and an owner do at random. Each act sends one command; refusals are part of the game. */
import { randomUUID } from 'node:crypto';

const PAGE = 100;
const LONGEST_GROUP = 3;
/** One hold in so many is sent twice at once under one key, as an impatient browser would. */
const TWIN_ONE_IN = 10;

/** Chances of each act out of the sum of all. */
const BUYER_ACTS = [
  [30, hold],
  [10, holdGroup],
  [28, pay],
  [10, letGo],
  [10, cancel],
  [8, joinLine],
  [4, leaveLine],
];

/** One command of a buyer, who also keeps `wishes`, `groupOf`, `receipts` and `card`. Answers what it was. */
export const actOfBuyer = (buyer) => chosen(BUYER_ACTS, buyer.pick)(buyer);

/** The owner decides about one of the requests. */
export async function actOfOwner(owner) {
  const request = await oneOf(owner, 'awaiting owner');
  if (!request) return null;
  if (owner.pick(4) > 0) return done('accept', await owner.post(`/api/bookings/${request.id}/accept`));
  return done('decline', await owner.post(`/api/bookings/${request.id}/decline`, { reason: 'at random' }));
}

function chosen(acts, pick) {
  let left = pick(acts.reduce((sum, [weight]) => sum + weight, 0));
  for (const [weight, act] of acts) {
    left -= weight;
    if (left < 0) return act;
  }
  throw new Error('No act was chosen.');
}

const done = (kind, { status, cut }) => ({ kind, status, cut });

async function hold(buyer) {
  const wish = await wishOf(buyer);
  if (!wish) return null;
  const answer = buyer.pick(TWIN_ONE_IN) === 0 ? await holdTwice(buyer, wish) : await buyer.post('/api/bookings', wish);
  note(buyer, answer, answer.status === 201 ? [answer.body.id] : [], 1);
  return done('hold', answer);
}

/** Both answers must speak of one booking. */
async function holdTwice(buyer, wish) {
  const key = randomUUID();
  const twins = await Promise.all([0, 1].map((only) => buyer.post('/api/bookings', wish, { key, only })));
  const made = twins.filter(({ status }) => status === 201);
  if (new Set(made.map(({ body }) => body.id)).size > 1) buyer.failures.push(`one key, two bookings: ${key}`);
  return made[0] ?? { ...twins[0], cut: twins.some(({ cut }) => cut) };
}

async function holdGroup(buyer) {
  const wishes = [];
  for (let count = 2 + buyer.pick(LONGEST_GROUP - 1); count > 0; count -= 1) {
    const wish = await wishOf(buyer);
    if (wish) wishes.push(wish);
  }
  if (wishes.length < 2) return null;
  const answer = await buyer.post('/api/booking-groups', { items: wishes });
  const ids = answer.status === 201 ? answer.body.bookings.map(({ id }) => id) : [];
  for (const id of ids) buyer.groupOf.set(id, answer.body.groupId);
  note(buyer, answer, ids, wishes.length);
  return done('hold group', answer);
}

function note(buyer, { status, cut }, bookingIds, asked) {
  const mayHaveMade = cut && status !== 201 ? asked : 0;
  buyer.receipts.push({ operatorId: buyer.organisationId, bookingIds, mayHaveMade });
}

/** A pass of the buyer's own, with the price that the page would show. */
async function wishOf(buyer) {
  const wish = buyer.wishes[buyer.pick(buyer.wishes.length)];
  if (wish.expectedToPayMinor !== undefined) return wish;
  const { antennaId, spacecraftId, need, aosUtc, losUtc } = wish;
  const { body } = await buyer.post('/api/passes/detail', { antennaId, spacecraftId, need, aosUtc, losUtc });
  if (!body?.quote) return null;
  wish.expectedToPayMinor = body.quote.toPayMinor;
  return wish;
}

async function oneOf(person, state) {
  const { body } = await person.get(`/api/bookings?pageSize=${PAGE}&state=${encodeURIComponent(state)}`);
  const items = body?.items ?? [];
  return items.length === 0 ? null : items[person.pick(items.length)];
}

/** With the saved card where there is one; the first time on the provider's page, which keeps it. */
async function pay(buyer) {
  const held = await oneOf(buyer, 'held');
  if (!held) return null;
  if (buyer.card === null) buyer.card = (await buyer.get('/api/payments/cards')).body?.items?.[0]?.id ?? null;
  const group = buyer.groupOf.get(held.id);
  const body = { savedCardId: buyer.card, ...(group || buyer.card ? {} : { saveCard: true }) };
  const path = group ? `/api/booking-groups/${group}/checkout` : `/api/bookings/${held.id}/checkout`;
  const answer = await buyer.post(path, body);
  if (answer.body?.kind === 'redirect') {
    const token = new URLSearchParams({ token: 'pm_card_visa' });
    await fetch(answer.body.url, { method: 'POST', body: token, redirect: 'manual' });
  }
  return done(group ? 'pay group' : 'pay', answer);
}

async function letGo(buyer) {
  const held = await oneOf(buyer, 'held');
  if (!held) return null;
  const group = buyer.groupOf.get(held.id);
  const path = group ? `/api/booking-groups/${group}/let-go` : `/api/bookings/${held.id}/let-go`;
  return done('let go', await buyer.post(path));
}

async function cancel(buyer) {
  const sold = await oneOf(buyer, 'confirmed,awaiting owner');
  if (!sold) return null;
  const { body } = await buyer.get(`/api/bookings/${sold.id}`);
  const wish = { reason: 'at random', expectedRefundMinor: body?.refundNowMinor ?? 0 };
  return done('cancel', await buyer.post(`/api/bookings/${sold.id}/cancel`, wish));
}

async function joinLine(buyer) {
  const wish = await wishOf(buyer);
  if (!wish) return null;
  const { antennaId, spacecraftId, need, aosUtc, losUtc } = wish;
  return done('join line', await buyer.post('/api/standby', { antennaId, spacecraftId, need, aosUtc, losUtc }));
}

async function leaveLine(buyer) {
  const { body } = await buyer.get('/api/standby');
  const open = (body?.items ?? []).filter(({ state }) => state === 'waiting' || state === 'offered');
  if (open.length === 0) return null;
  return done('leave line', await buyer.post(`/api/standby/${open[buyer.pick(open.length)].id}/leave`));
}
