/** Keys for the programs of a station and of an operator, and one that is needed no longer. */
import { routes } from '@skyberth/shared';
import type { Company } from './settle-in.js';
import type { Stage } from './stage.js';

const YEAR_MS = 365 * 86_400_000;

export async function makeKeys(stage: Stage, company: Company): Promise<void> {
  const [owner, operator] = [company.owners[0], company.operators[0]];
  if (!owner || !operator) return;
  const endsUtc = new Date(Date.now() + YEAR_MS).toISOString();
  await stage.call(owner.manager, routes.makeApiKey, {
    body: { name: 'Antenna controller', scopes: ['bookings.read', 'bookings.report', 'run-sheet.read'], endsUtc },
  });
  const trial = await stage.call(owner.manager, routes.makeApiKey, {
    body: { name: 'Trial of the new recorder', scopes: ['bookings.report'] },
  });
  await stage.call(owner.manager, routes.revokeApiKey, { params: { id: trial.apiKey.id } });
  await stage.call(operator.manager, routes.makeApiKey, {
    body: { name: 'Mission calendar', scopes: ['bookings.read', 'messages.read'] },
  });
}
