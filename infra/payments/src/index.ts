import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Desk } from './core/desk.js';
import { DEFAULT_SETTINGS, type Settings } from './core/settings.js';
import { runDueTimers } from './core/timers.js';
import { Api } from './http/api.js';
import { buildApp } from './http/app.js';
import { Faults } from './http/faults.js';
import { Router } from './http/router.js';
import { keepFixedEndpoint } from './objects/fixed-endpoint.js';
import { mountPages } from './pages/mount.js';
import { ROUTES } from './routes.js';
import { mountTestHooks } from './test-hooks/mount.js';
import { Courier } from './webhooks/courier.js';
import { MischiefMaker } from './webhooks/mischief.js';
import { Outbox } from './webhooks/outbox.js';

export { TEST_CARDS } from './cards/test-cards.js';
export type { Settings } from './core/settings.js';

export interface RunningPayments {
  /** Where the API, the pages and the test hooks are: http://127.0.0.1:<port>. */
  url: string;
  /** Stops deliveries and requests and closes the database. */
  close(): Promise<void>;
  /** Waits until no webhook delivery is due; for tests in the same process. */
  deliveriesSettled(): Promise<void>;
}

const TICK_MS = 1000;
const ANSWERS_KEPT_MS = 24 * 3600 * 1000;

/**
 * Starts the local payment service on 127.0.0.1.
 * @throws when the port is taken or the data folder cannot be written.
 */
export async function start(given: Partial<Settings> = {}): Promise<RunningPayments> {
  const desk = new Desk({ ...DEFAULT_SETTINGS, ...given });
  const mischief = new MischiefMaker();
  const outbox = new Outbox(desk, mischief);
  const courier = new Courier(desk, outbox);
  const faults = new Faults();
  desk.onEvent = (event, account) => outbox.enqueue(event, account);
  keepFixedEndpoint(desk);
  const tick = (): void => {
    runDueTimers(desk);
    courier.wake();
  };
  const api = new Api(desk, new Router(ROUTES), faults, () => courier.wake());
  const app = buildApp(api, (target) => {
    mountTestHooks(target, { desk, mischief, outbox, courier, faults, tick });
    mountPages(target, { desk, api, outbox, courier });
  });
  const server = createServer(app);
  server.listen(desk.settings.port, '127.0.0.1');
  await once(server, 'listening');
  const ticker = setInterval(() => {
    tick();
    desk.store.sql('DELETE FROM answers WHERE created_ms < ?').run(desk.clock.nowMs() - ANSWERS_KEPT_MS);
  }, TICK_MS);
  ticker.unref();
  tick();
  const { port } = server.address() as AddressInfo;
  return {
    url: `http://127.0.0.1:${port}`,
    deliveriesSettled: () => courier.settled(),
    close: async () => {
      clearInterval(ticker);
      const closed = once(server, 'close');
      server.close();
      server.closeAllConnections();
      await Promise.all([closed, courier.close()]);
      desk.store.close();
    },
  };
}
