import { OPERATORS } from '../cast/operators.js';
import { OWNERS } from '../cast/owners.js';
import { makeKeys } from './api-keys.js';
import { Chance } from './chance.js';
import { buyUplinks, clearFleet, leaveClearancesOpen, reportUplinks } from './clearances.js';
import { PASSWORD } from './client.js';
import { payOnPage, Season } from './days.js';
import { disputeAndDecide, leaveDisputesOpen } from './disputes.js';
import { moveSomePasses } from './drift.js';
import { buyForThisMinute, reportWhatRuns } from './live.js';
import { writeToEachOther } from './messages.js';
import { askForAccount, chargeBack, closeMonths, openMonthlyAccount, payBills } from './money.js';
import { giveEphemeris } from './own-ephemeris.js';
import { leaveRunOpen, openPayoutDesk, type PayoutDesk, payOwners } from './payouts.js';
import { makePlans } from './plans.js';
import { manTheStations } from './run-sheet.js';
import { settleIn } from './settle-in.js';
import { STAFF, Stage } from './stage.js';
import { buyForToday, leaveThingsOpen } from './today.js';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const DISPUTE_EVERY_DAYS = 11;
const CHARGEBACK_EVERY_DAYS = 21;
const PREDICTED_DAYS = 16;

export interface DemoSettings {
  readonly environment: Readonly<Record<string, string | undefined>>;
  /** How many days before the present it begins; three months for people, a few days for tests. */
  readonly days: number;
  readonly say: (text: string) => void;
}

export interface DemoSignIn {
  readonly what: string;
  readonly email: string;
  readonly password: string;
  /** Of those who have a second factor: what `npm run demo:code` makes the present code from. */
  readonly secondFactorSecret?: string;
}

/** Loads the scenario into an empty data folder; returns who can sign in. */
export async function loadDemo({ environment, days, say }: DemoSettings): Promise<DemoSignIn[]> {
  const firstDayMs = Math.floor(Date.now() / DAY_MS) * DAY_MS - days * DAY_MS;
  const stage = await Stage.open({ environment, startMs: firstDayMs });
  let desk: PayoutDesk;
  try {
    const company = await settleIn(stage, say);
    await clearFleet(stage, company);
    await openMonthlyAccount(stage, company);
    desk = await openPayoutDesk(stage, company);
    const season = new Season(stage, company, new Chance(335));
    season.predictFromMs = Date.now() - PREDICTED_DAYS * DAY_MS;
    for (let day = 0; day < days - 1; day += 1) {
      if (day % 10 === 0) say(`day ${day + 1} of ${days}`);
      await season.day(firstDayMs + day * DAY_MS, day);
      await payOwners(stage, desk, days - day);
      if (day % DISPUTE_EVERY_DAYS === DISPUTE_EVERY_DAYS - 1)
        await disputeAndDecide(stage, company, Math.floor(day / DISPUTE_EVERY_DAYS));
      if (day % CHARGEBACK_EVERY_DAYS === CHARGEBACK_EVERY_DAYS - 1) {
        await chargeBack(stage, company, day % 2 === 0 ? 'won' : 'lost');
        await payBills(stage, company, payOnPage);
      }
    }
    const nowMs = Date.now();
    await stage.moveTo(nowMs - 9 * HOUR_MS);
    await season.renewElements();
    season.liveFromMs = nowMs - DAY_MS;
    await buyForThisMinute(stage, company, season, nowMs);
    await buyForToday(stage, company, season, nowMs);
    const flown = { fromMs: nowMs - 8 * HOUR_MS, toMs: nowMs - HOUR_MS, count: 3 };
    const uplinks = await buyUplinks(stage, company, season, flown);
    await season.flyUntil(nowMs - 45 * 60_000);
    await stage.returnToPresent();
    await reportUplinks(stage, uplinks);
    await buyUplinks(stage, company, season, { fromMs: nowMs + 2 * HOUR_MS, toMs: nowMs + 44 * HOUR_MS, count: 2 });
    await leaveClearancesOpen(stage, company);
    await giveEphemeris(stage, company);
    await leaveThingsOpen(stage, company, season);
    await leaveDisputesOpen(stage, company);
    await writeToEachOther(stage, company);
    await makeKeys(stage, company);
    await chargeBack(stage, company, null);
    await leaveRunOpen(stage, desk);
    await askForAccount(stage, company);
    await closeMonths(stage, company);
    await moveSomePasses(stage, company);
    await makePlans(stage, company);
    await manTheStations(stage, company);
    await reportWhatRuns(stage, company);
  } finally {
    await stage.close();
  }
  return signIns(desk);
}

function signIns({ first, second }: PayoutDesk): DemoSignIn[] {
  const of = (what: string, email: string) => ({ what, email, password: PASSWORD });
  return [
    ...OPERATORS.map((one) => of(`operator, ${one.name}`, one.people[0]?.email ?? '')),
    ...OWNERS.map((one) => of(`station owner, ${one.name}`, one.people[0]?.email ?? '')),
    { ...of('finance', STAFF.finance), secondFactorSecret: first.secret },
    { ...of('finance, second person', STAFF.secondFinance), secondFactorSecret: second.secret },
    of('admin', STAFF.admin),
  ];
}
