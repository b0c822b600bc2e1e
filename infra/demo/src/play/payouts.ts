/** Owners are paid: two people of finance with second factors, a run that pays, one that fails in part and comes back, one open. */
import { type PayoutRun, routes } from '@skyberth/shared';
import { codeAt } from '../codes.js';
import { type Actor, PASSWORD, Refused } from './client.js';
import { type Company, comeByInvitation } from './settle-in.js';
import { STAFF, type Stage } from './stage.js';

/** Longer than a step of the codes, since each counts once. */
const NEXT_CODE_MS = 31_000;
const MINIMUM_MINOR = 5_000;
/** An owner that has not said yet where the money goes, so that its line waits. */
const WITHOUT_ACCOUNT = 'Kestle Bay Antennas';

interface Seat {
  readonly person: Actor;
  readonly secret: string;
}
export interface PayoutDesk {
  readonly first: Seat;
  readonly second: Seat;
}

/** Who prepares, who approves, and where owners want their money. */
export async function openPayoutDesk(stage: Stage, company: Company): Promise<PayoutDesk> {
  const name = 'Noor Haddad';
  await stage.call(company.admin, routes.inviteMember, { body: { name, email: STAFF.secondFinance, role: 'finance' } });
  const colleague = await comeByInvitation(stage, name, STAFF.secondFinance);
  for (const { cast, manager } of company.owners) {
    if (cast.name === WITHOUT_ACCOUNT) continue;
    const { url } = await stage.call(manager, routes.givePayoutAccount, {});
    await fetch(url, { method: 'POST', redirect: 'manual' });
  }
  await stage.settle();
  return { first: await enrol(stage, company.finance), second: await enrol(stage, colleague) };
}

/** Days counted back from the present at which something is done with runs; the provider takes a week to settle cards. */
const PREPARE_DAYS_LEFT = [62, 32, 22];
const APPROVE_DAYS_LEFT = [53, 31, 21];

/** What finance does about payouts on a day of the season. The second run is approved before its money has settled. */
export async function payOwners(stage: Stage, desk: PayoutDesk, daysLeft: number): Promise<void> {
  if (PREPARE_DAYS_LEFT.includes(daysLeft)) for (const currency of ['EUR', 'NZD']) await prepare(stage, desk, currency);
  if (!APPROVE_DAYS_LEFT.includes(daysLeft)) return;
  const { items } = await stage.call(desk.first.person, routes.listPayoutRuns, { query: {} });
  for (const { id, state } of items) if (state === 'draft') await letGo(stage, desk, id);
}

/** At the present a run waits to be looked at, with one adjustment in it. */
export async function leaveRunOpen(stage: Stage, desk: PayoutDesk): Promise<void> {
  const run = await prepare(stage, desk, 'EUR');
  const line = run?.lines.find((each) => each.state === 'ready');
  if (!run || !line) return;
  const reason = 'A set-up fee was taken twice for one contact; given back.';
  await stage.call(desk.first.person, routes.adjustPayoutLine, {
    params: { id: run.id, lineId: line.id },
    body: { amountMinor: 1_250, reason },
  });
}

async function enrol(stage: Stage, person: Actor): Promise<Seat> {
  const { secret } = await stage.call(person, routes.beginSecondFactor, { body: { password: PASSWORD } });
  await stage.call(person, routes.confirmSecondFactor, { body: { code: codeAt(secret, stage.nowMs()) } });
  return { person, secret };
}

async function prepare(stage: Stage, { first }: PayoutDesk, currency: string): Promise<PayoutRun | null> {
  try {
    return await stage.call(first.person, routes.preparePayoutRun, { body: { currency, minimumMinor: MINIMUM_MINOR } });
  } catch (error) {
    if (error instanceof Refused && error.code === 'wrong-state') return null; // Nothing is owed.
    throw error;
  }
}

async function letGo(stage: Stage, { first, second }: PayoutDesk, id: string): Promise<void> {
  const params = { id };
  const code = async (seat: Seat): Promise<string> => {
    await stage.moveTo(stage.nowMs() + NEXT_CODE_MS);
    return codeAt(seat.secret, stage.nowMs());
  };
  const body = { code: await code(first) };
  const { sendsMinor } = await stage.call(first.person, routes.reviewPayoutRun, { params, body });
  await stage.call(second.person, routes.approvePayoutRun, {
    params,
    body: { code: await code(second), expectedMinor: sendsMinor },
  });
  await stage.settle();
}
