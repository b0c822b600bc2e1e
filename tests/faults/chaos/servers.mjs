/**
 * Several processes of the built server on one database file, any of which may be killed at any time, and the wire on which
 * the payment service's events reach one that lives.
 */
import { createServer } from 'node:http';
import { freePort, startNode, stopAll, waitFor } from '../../../infra/run/toolbox.mjs';

const EVENTS_PATH = '/api/payments/events';

export class Servers {
  places = [];
  kills = 0;
  starting = [];

  /** `failures` is told of a server that did not come back. */
  constructor({ script, environment, failures }) {
    Object.assign(this, { script, environment, failures });
  }

  async start(count) {
    // One after the other: the first brings the database up to date.
    for (let index = 0; index < count; index += 1) {
      const place = { url: '', child: null, lives: false };
      this.places.push(place);
      await this.run(place);
    }
  }

  async run(place) {
    const port = await freePort();
    place.url = `http://127.0.0.1:${port}`;
    place.child = startNode('server', this.script, { ...this.environment, PORT: String(port) }, { quiet: true });
    await waitFor(`${place.url}/api/health`, place.child, 60_000);
    place.lives = true;
  }

  get living() {
    return this.places.filter(({ lives }) => lives);
  }

  /** Kills one in the middle of whatever it does, unless it is the last; it comes back by itself. */
  kill(pick) {
    const living = this.living;
    if (living.length < 2) return false;
    const place = living[pick(living.length)];
    place.lives = false;
    place.child.kill('SIGKILL');
    this.kills += 1;
    this.starting.push(this.run(place).catch((error) => this.failures.push(error.message)));
    return true;
  }

  async stop() {
    await Promise.all(this.starting);
    for (const place of this.places) place.lives = false;
    await stopAll(this.places.flatMap(({ child }) => child ?? []));
  }
}

/** Passes the payment service's events on to wherever `target` points just now; where that fails, it sends them again. */
export async function startWire(port, target) {
  const wire = createServer(async (request, response) => {
    const chunks = [];
    for await (const chunk of request) chunks.push(chunk);
    const headers = { 'content-type': 'application/json', 'stripe-signature': request.headers['stripe-signature'] };
    try {
      const answer = await fetch(`${target()}${EVENTS_PATH}`, { method: 'POST', body: Buffer.concat(chunks), headers });
      response.writeHead(answer.status).end();
    } catch {
      response.writeHead(503).end();
    }
  });
  await new Promise((resolve) => wire.listen(port, '127.0.0.1', resolve));
  return () => {
    wire.closeAllConnections();
    return new Promise((resolve) => wire.close(resolve));
  };
}

/** The processes around a trial are on their own: where it is broken off, they must be ended with it. */
export function stopOnSignal(stop) {
  for (const signal of ['SIGINT', 'SIGTERM']) process.once(signal, () => stop().finally(() => process.exit(1)));
}
