/** What owners have in their calendars beyond weekly hours: repeated blackouts, an opening, and a price to come. */
import { routes } from '@skyberth/shared';
import { utc } from './days.js';
import type { Company, PlayOwner } from './settle-in.js';
import type { Stage } from './stage.js';

const DAY_MS = 86_400_000;

export async function fillCalendars(stage: Stage, company: Company): Promise<void> {
  for (const owner of company.owners.slice(0, 3)) await fillCalendar(stage, owner);
}

async function fillCalendar(stage: Stage, { manager }: PlayOwner): Promise<void> {
  const { items } = await stage.call(manager, routes.listStations, { query: {} });
  const station = items.find((each) => each.state === 'approved' && each.antennas.length > 0);
  if (!station) return;
  const { timeZone } = station;
  const today = utc(stage.nowMs()).slice(0, 10);
  const once = { durationMin: 180, endLocal: null, timeZone, rrule: null };
  await stage.call(manager, routes.addBlackouts, {
    body: {
      antennaIds: station.antennas.map((antenna) => antenna.id),
      entries: [
        {
          ...once,
          startLocal: `${today}T03:00`,
          durationMin: 45,
          rrule: 'FREQ=MONTHLY;BYDAY=1TU',
          reason: 'maintenance',
          note: 'Bearings greased',
        },
      ],
    },
  });
  const [first] = station.antennas;
  if (!first) return;
  const params = { id: first.id };
  const startLocal = `${utc(stage.nowMs() + 5 * DAY_MS).slice(0, 10)}T01:00`;
  await stage.call(manager, routes.addOpening, { params, body: { ...once, startLocal, note: 'Night crew on site' } });
  const { price } = await stage.call(manager, routes.getAntenna, { params });
  if (!price) return;
  const { id: _id, currency: _currency, validFromUtc: _from, ...card } = price;
  const validFromUtc = utc(stage.nowMs() + 30 * DAY_MS);
  const perMinuteMinor = Math.round(card.perMinuteMinor * 1.05);
  await stage.call(manager, routes.setPrice, { params, body: { ...card, perMinuteMinor, validFromUtc } });
}
