/**
 * Holds the import directions: web -> shared, orbit; api -> shared, drizzle, packages; orbit <- market <- planner;
 * money alone; packages without Node, Nest, Drizzle, clock or chance; in the web app -> features -> ui, drawing, theme.
 * Also that relative imports carry .js, and that no folder stands at the top beside the agreed ones.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { join, relative, resolve, sep } from 'node:path';
import { ROOT } from './toolbox.mjs';

const MAY_IMPORT = {
  shared: [],
  drizzle: ['shared'],
  'packages/orbit': [],
  'packages/market': ['orbit'],
  'packages/planner': ['orbit', 'market'],
  'packages/money': [],
  'apps/api': ['shared', 'drizzle', 'orbit', 'market', 'planner', 'money'],
  'apps/web': ['shared', 'orbit'],
  'infra/payments': [],
  'infra/mail': [],
  'infra/elements': [],
  'infra/demo': ['shared', 'drizzle', 'api', 'payments-standin', 'mail-standin'],
};
const TOP = new Set(['apps', 'packages', 'drizzle', 'shared', 'tests', 'infra', 'node_modules', 'var']);
const IMPURE = [/\bDate\.now\(/, /\bnew Date\(\)/, /\bMath\.random\(/, /\bprocess\./, /\bfetch\(/];
/** Inside the page: what a folder of src may import from its siblings. */
const WEB_LAYERS = {
  theme: ['theme', 'ui', 'lib'],
  lib: ['lib'],
  ui: ['ui', 'drawing', 'theme', 'lib'],
  drawing: ['drawing', 'ui', 'theme', 'lib'],
  features: ['features', 'drawing', 'ui', 'theme', 'lib'],
};

const faults = [];
const fault = (file, sentence) => faults.push(`${relative(ROOT, file)}: ${sentence}`);

function files(folder) {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    if (['node_modules', 'dist', 'dist-types', 'var'].includes(entry.name)) return [];
    const path = join(folder, entry.name);
    if (entry.isDirectory()) return files(path);
    return /\.(ts|tsx|mts)$/.test(entry.name) && !entry.name.endsWith('.d.ts') ? [path] : [];
  });
}

const importsOf = (text) => [...text.matchAll(/(?:from|import)\s*\(?\s*['"]([^'"]+)['"]/g)].map((match) => match[1]);

function checkRelative(room, file, target) {
  if (!/\.(js|json|css|svg|woff2?)(\?.*)?$/.test(target)) fault(file, `the relative import ${target} lacks its .js`);
  const aim = resolve(file, '..', target);
  if (!aim.startsWith(join(ROOT, room) + sep))
    fault(file, `${target} reaches out of ${room}; import the package by its name`);
  if (room !== 'apps/web') return;
  const src = join(ROOT, 'apps/web/src');
  const [from, feature] = relative(src, file).split(sep);
  const [to, otherFeature] = relative(src, aim).split(sep);
  const allowed = WEB_LAYERS[from];
  if (allowed && !allowed.includes(to)) fault(file, `${from} must not import ${to}`);
  if (from === 'features' && to === 'features' && feature !== otherFeature)
    fault(file, `the feature ${feature} must not import the feature ${otherFeature}`);
}

function checkFile(room, file) {
  const text = readFileSync(file, 'utf8');
  const isTest = /\.(spec|bench)\.tsx?$/.test(file);
  const pure = (room.startsWith('packages/') || room === 'shared') && !isTest;
  for (const target of importsOf(text)) {
    if (target.startsWith('.')) checkRelative(room, file, target);
    else if (target.startsWith('@skyberth/')) {
      const name = target.slice('@skyberth/'.length);
      const own = room.split('/').at(-1);
      if (name.includes('/')) fault(file, `${target} reaches inside a package`);
      if (!isTest && name !== own && !MAY_IMPORT[room].includes(name)) fault(file, `${room} must not import ${target}`);
    } else if (pure && (target.startsWith('node:') || /^(@nestjs|drizzle-orm|better-sqlite3)/.test(target))) {
      fault(file, `a pure package must not import ${target}`);
    }
  }
  if (pure)
    for (const pattern of IMPURE) if (pattern.test(text)) fault(file, `a pure package must not use ${pattern.source}`);
}

for (const room of Object.keys(MAY_IMPORT)) {
  let list = [];
  try {
    list = files(join(ROOT, room));
  } catch {
    continue;
  }
  for (const file of list) checkFile(room, file);
}
for (const entry of readdirSync(ROOT, { withFileTypes: true })) {
  if (entry.isDirectory() && !entry.name.startsWith('.') && !TOP.has(entry.name))
    fault(join(ROOT, entry.name), 'this folder is not one of the agreed ones');
}

if (faults.length > 0) {
  console.error(faults.join('\n'));
  console.error(`${faults.length} imports go the wrong way.`);
  process.exit(1);
}
