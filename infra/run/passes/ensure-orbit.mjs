/** Builds the pass engine if its compiled form is missing or older than its sources. Says nothing on stdout. */
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { bin, install, ROOT, requireNode, run } from '../toolbox.mjs';

const SOURCES = join(ROOT, 'packages/orbit/src');
const BUILT = join(ROOT, 'packages/orbit/dist/index.js');
const STAMP = join(ROOT, 'packages/orbit/dist/.tsbuildinfo');

function newestSourceMs() {
  const files = readdirSync(SOURCES, { recursive: true }).filter(
    (name) => name.endsWith('.ts') && !name.endsWith('.spec.ts'),
  );
  return Math.max(...files.map((name) => statSync(join(SOURCES, name)).mtimeMs));
}

export function ensureOrbit() {
  requireNode();
  const packages = ['node_modules/satellite.js', 'node_modules/typescript'].every((path) =>
    existsSync(join(ROOT, path)),
  );
  if (!packages && !install((line) => console.error(line))) process.exit(1);
  if (existsSync(BUILT) && existsSync(STAMP) && statSync(STAMP).mtimeMs >= newestSourceMs()) return;
  console.error('Building the pass engine ...');
  if (run(bin('tsc'), ['-b', 'packages/orbit']) !== 0) process.exit(1);
}
