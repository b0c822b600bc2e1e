/** The built page before a server whose clock the test moves, with a payment service that keeps the same time. */
import { join } from 'node:path';
import { freePort, ROOT } from '../../../infra/run/toolbox.mjs';
import { openShop, type Shop } from '../../api/harness/shop.js';

/** A shop whose server also hands out the page. The port is fixed first: the payment page sends people back to it. */
export async function startRehearsal(): Promise<Shop> {
  const environment = { PORT: String(await freePort()), SKYBERTH_WEB_DIR: join(ROOT, 'apps/web/dist') };
  // Short and grazing passes are left out: those begin and end where the horizon says, more than where the orbit says.
  return openShop({ antenna: { minNoticeMin: 60, minContactS: 300 }, server: { environment } });
}
