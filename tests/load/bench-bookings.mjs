/**
 * Measures commands of the kind hold or let go through the API of built server processes: so many buyers at once, each with a
 * spacecraft of its own, hold a pass and give it back; now and then one is in another's way, and the refusal counts as well.
 * One process, then two on the same database file. Loopback only, durable writes as in production. Run it with
 * `npm run bench:bookings [-- --seconds 10]`, after `npm run build`. Not part of the tests: figures depend on the machine.
 */
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { startStack } from '../../infra/run/stack.mjs';
import { freePort, ROOT } from '../../infra/run/toolbox.mjs';
import { openMarket } from '../faults/chaos/market.mjs';
import { Servers, stopOnSignal } from '../faults/chaos/servers.mjs';

const BUYERS = 16;
const WISHES = 8;
const WARM_UP_S = 2;
/** Of Linux' /proc, see proc(5): a hundred ticks a second. */
const MS_PER_TICK = 10;

const { values } = parseArgs({ options: { seconds: { type: 'string' } } });
const seconds = Number(values.seconds ?? 10);
if (!(seconds > 0 && seconds <= 600)) throw new Error('--seconds must be between 0 and 600.');

console.log(`${cpus().length} x ${cpus()[0]?.model ?? 'unknown'}, Node ${process.versions.node}, ${BUYERS} buyers`);
for (const count of [1, 2]) await measure(count);

async function measure(serverCount) {
  const dataDir = mkdtempSync(join(tmpdir(), 'skyberth-bench-'));
  const stack = await startStack({ port: await freePort(), dataDir, api: false, demo: false });
  const failures = [];
  const environment = { ...stack.environment, PASS_WORKERS: '0' };
  const servers = new Servers({ script: join(ROOT, 'apps/api/dist/main.js'), environment, failures });
  const stopAll = async () => {
    await servers.stop();
    await stack.stop();
    rmSync(dataDir, { recursive: true, force: true });
  };
  stopOnSignal(stopAll);
  try {
    await servers.start(serverCount);
    const databaseFile = join(dataDir, 'skyberth.sqlite');
    const { buyers } = await openMarket({ databaseFile, servers, buyerCount: BUYERS, seed: 1, failures });
    for (const buyer of buyers) buyer.wishes = buyer.wishes.slice(0, WISHES);
    for (const buyer of buyers) for (const wish of buyer.wishes) await price(buyer, wish);
    await turns(buyers, WARM_UP_S);
    const before = cpuMsOf(servers);
    const figures = await turns(buyers, seconds);
    print(serverCount, { ...figures, cpuMs: cpuMsOf(servers) - before }, failures);
  } finally {
    await stopAll();
  }
}

/** Every buyer holds and lets go until the time is over. */
async function turns(buyers, forS) {
  const [took, refused] = [[], []];
  const begunMs = performance.now();
  const untilMs = begunMs + forS * 1000;
  const timed = async (work) => {
    const from = performance.now();
    const answer = await work();
    took.push(performance.now() - from);
    if (answer.status >= 300) refused.push(answer.body?.code);
    return answer;
  };
  const acting = async (buyer) => {
    for (let turn = 0; performance.now() < untilMs; turn += 1) {
      const wish = buyer.wishes[turn % buyer.wishes.length];
      const { status, body } = await timed(() => buyer.post('/api/bookings', wish));
      if (status === 201) await timed(() => buyer.post(`/api/bookings/${body.id}/let-go`));
    }
  };
  await Promise.all(buyers.map(acting));
  return { took, refused, tookS: (performance.now() - begunMs) / 1000 };
}

/** The price that the page would show. */
async function price(buyer, wish) {
  const { antennaId, spacecraftId, need, aosUtc, losUtc } = wish;
  const { body } = await buyer.post('/api/passes/detail', { antennaId, spacecraftId, need, aosUtc, losUtc });
  wish.expectedToPayMinor = body.quote.toPayMinor;
}

/** What the servers have computed so far, all together; a figure that other work on the machine does not change much. */
function cpuMsOf(servers) {
  const ticks = servers.places.map(({ child }) => {
    const fields = readFileSync(`/proc/${child.pid}/stat`, 'utf8').split(') ')[1].split(' ');
    return Number(fields[11]) + Number(fields[12]);
  });
  return ticks.reduce((sum, each) => sum + each, 0) * MS_PER_TICK;
}

function print(serverCount, { took, refused, tookS, cpuMs }, failures) {
  const sorted = took.toSorted((a, b) => a - b);
  const at = (share) => (sorted[Math.floor((sorted.length - 1) * share)] ?? 0).toFixed(1);
  console.log(
    `${serverCount} server${serverCount > 1 ? 's' : ''}: ${took.length} commands in ${tookS.toFixed(1)} s, ` +
      `${(took.length / tookS).toFixed(0)} a second, p50 ${at(0.5)} ms, p99 ${at(0.99)} ms, worst ${at(1)} ms; ` +
      `${(cpuMs / took.length).toFixed(1)} ms of server CPU each; ` +
      `${refused.length} refused, ${failures.length} failures`,
  );
}
