import { OPERATORS } from '../cast/operators.js';
import { OWNERS } from '../cast/owners.js';
import { Chance } from './chance.js';
import { PASSWORD } from './client.js';
import { Season } from './days.js';
import { giveEphemeris } from './own-ephemeris.js';
import { settleIn } from './settle-in.js';
import { STAFF, Stage } from './stage.js';
import { buyForToday, leaveThingsOpen } from './today.js';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

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
}

/** Loads the scenario into an empty data folder; returns who can sign in. */
export async function loadDemo({ environment, days, say }: DemoSettings): Promise<DemoSignIn[]> {
  const firstDayMs = Math.floor(Date.now() / DAY_MS) * DAY_MS - days * DAY_MS;
  const stage = await Stage.open({ environment, startMs: firstDayMs });
  try {
    const company = await settleIn(stage, say);
    const season = new Season(stage, company, new Chance(335));
    for (let day = 0; day < days - 1; day += 1) {
      if (day % 10 === 0) say(`day ${day + 1} of ${days}`);
      await season.day(firstDayMs + day * DAY_MS, day);
    }
    const nowMs = Date.now();
    await stage.moveTo(nowMs - 9 * HOUR_MS);
    await season.renewElements();
    await buyForToday(stage, company, season, nowMs);
    await season.flyUntil(nowMs - 45 * 60_000);
    await stage.returnToPresent();
    await giveEphemeris(stage, company);
    await leaveThingsOpen(stage, company, season);
  } finally {
    await stage.close();
  }
  return signIns();
}

function signIns(): DemoSignIn[] {
  const of = (what: string, email: string) => ({ what, email, password: PASSWORD });
  return [
    ...OPERATORS.map((one) => of(`operator, ${one.name}`, one.people[0]?.email ?? '')),
    ...OWNERS.map((one) => of(`station owner, ${one.name}`, one.people[0]?.email ?? '')),
    of('finance', STAFF.finance),
    of('admin', STAFF.admin),
  ];
}
