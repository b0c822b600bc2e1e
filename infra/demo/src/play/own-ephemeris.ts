/** An operator gives its own ephemeris for the next contact of one spacecraft, so that a visitor sees passes of both kinds. */
import { routes } from '@skyberth/shared';
import { utc } from './days.js';
import type { Company } from './settle-in.js';
import type { Stage } from './stage.js';

const HOUR_MS = 3_600_000;
/** Late enough that a visitor of the same day still finds it in use or to come. */
const FROM_MS = 8 * HOUR_MS;
const TO_MS = 72 * HOUR_MS;

/** Takes the states that belong to a bought contact as what flight dynamics computed for it. */
export async function giveEphemeris(stage: Stage, company: Company): Promise<void> {
  const [operator] = company.operators;
  if (!operator) return;
  const nowMs = stage.nowMs();
  const query = { state: 'confirmed', fromUtc: utc(nowMs + FROM_MS), toUtc: utc(nowMs + TO_MS), sort: 'aos' } as const;
  const bookings = await stage.call(operator.manager, routes.listBookings, { query });
  const [next] = bookings.items;
  if (!next) return;
  const own = operator.spacecraft.find(({ cast }) => cast.name === next.spacecraftName);
  if (!own) return;
  const params = { id: next.id, file: 'ephemeris.oem' } as const;
  const text = String(await stage.call(operator.manager, routes.bookingFile, { params }));
  const body = { text, fileName: `${own.cast.shortName.toLowerCase()}-contact-${next.number}.oem` };
  await stage.call(operator.manager, routes.addEphemeris, { params: { id: own.id }, body });
}
