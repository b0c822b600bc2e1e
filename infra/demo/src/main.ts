/** Loads the demo scenario into the data folder named by the environment, from nothing. */
import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { feedElements, loadDemo } from './index.js';

const dataDir = process.env['SKYBERTH_DATA_DIR'];
if (!dataDir) throw new Error('SKYBERTH_DATA_DIR is not set; the demo is loaded by npm start.');
// An earlier attempt that was interrupted leaves half a scenario; it begins again from nothing.
for (const name of ['skyberth.sqlite', 'skyberth.sqlite-wal', 'skyberth.sqlite-shm', 'payments', 'mail']) {
  rmSync(join(dataDir, name), { recursive: true, force: true });
}
const startedMs = Date.now();
const signIns = await loadDemo({
  environment: process.env,
  days: Number(process.env['SKYBERTH_DEMO_DAYS'] ?? 92),
  say: (text) => console.log(text),
});
mkdirSync(join(dataDir, 'elements'), { recursive: true });
writeFileSync(join(dataDir, 'elements', 'elements.json'), JSON.stringify(feedElements(Date.now()), null, 2));
writeFileSync(
  join(dataDir, 'demo-loaded.json'),
  JSON.stringify({ loadedUtc: new Date().toISOString(), signIns }, null, 2),
);
console.log(`loaded in ${Math.round((Date.now() - startedMs) / 1000)} s`);
