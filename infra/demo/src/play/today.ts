/** The last hours before the present: one booking in each state that a visitor should meet. */
import { routes } from '@skyberth/shared';
import { fillCalendars } from './calendar.js';
import type { Season } from './days.js';
import { utc } from './days.js';
import type { Company } from './settle-in.js';
import type { Stage } from './stage.js';

const HOUR_MS = 3_600_000;

/** `nowMs` is the real present, where the play ends. Called while the stage stands some hours before it. */
export async function buyForToday(stage: Stage, company: Company, season: Season, nowMs: number): Promise<void> {
  for (const operator of company.operators) {
    // Flown by the time the visitor comes, one perhaps under way, and more in the days to come.
    await season.buy(operator, 2, stage.nowMs() + HOUR_MS, nowMs);
    await season.buy(operator, 1, nowMs - 600_000, nowMs + HOUR_MS);
    await season.buy(operator, 5, nowMs + HOUR_MS, nowMs + 72 * HOUR_MS);
  }
}

/** Blackouts to come, and what stands open at the moment the play ends: a request, and a hold with its ten minutes. */
export async function leaveThingsOpen(stage: Stage, company: Company, season: Season): Promise<void> {
  const nowMs = stage.nowMs();
  for (const { manager } of company.owners.slice(0, 3)) {
    const stations = await stage.call(manager, routes.listStations, { query: {} });
    const antenna = stations.items[0]?.antennas.at(-1);
    if (!antenna) continue;
    const fromMs = nowMs + 4 * HOUR_MS;
    const body = {
      fromUtc: utc(fromMs),
      toUtc: utc(fromMs + 3 * HOUR_MS),
      reason: 'maintenance' as const,
      note: 'Feed change',
    };
    await stage.call(manager, routes.addBlackout, { params: { id: antenna.id }, body });
  }
  await fillCalendars(stage, company);
  const [first] = company.operators;
  if (!first) return;
  const passes = await season.forSale(first, nowMs + 3 * HOUR_MS, nowMs + 48 * HOUR_MS);
  const asked = (await ownerAccepted(stage, company)).flatMap(
    (antennaId) => passes.find((pass) => pass.antennaId === antennaId) ?? [],
  );
  for (const pass of asked.slice(0, 2)) {
    const bookingId = await season.hold(first, pass);
    if (bookingId) await season.pay(first, bookingId);
  }
  const instant = passes.find((pass) => !asked.includes(pass));
  if (instant) await season.hold(first, instant);
  await stage.settle();
}

/** Antennas whose owner answers each request. */
async function ownerAccepted(stage: Stage, company: Company): Promise<string[]> {
  const ids: string[] = [];
  for (const [antennaId, manager] of company.ownerOf) {
    const antenna = await stage.call(manager, routes.getAntenna, { params: { id: antennaId } });
    if (antenna.acceptance === 'owner') ids.push(antennaId);
  }
  return ids;
}
