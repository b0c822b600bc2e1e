/** Helpers of the run scripts. Plain Node, nothing installed is needed to load this file. */
import { spawn, spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';

export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
const STAMPS = join(ROOT, 'node_modules', '.skyberth');
const LEAST_NODE = [20, 19];

/** Stops with a sentence where Node is too old to run any of it. */
export function requireNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major > LEAST_NODE[0] || (major === LEAST_NODE[0] && minor >= LEAST_NODE[1])) return;
  console.error(`Skyberth needs Node ${LEAST_NODE.join('.')} or newer; this is ${process.versions.node}.`);
  process.exit(1);
}

/** Runs a command to its end with its output shown on stderr; returns its exit code. */
export function run(command, args, options = {}) {
  const result = spawnSync(command, args, {
    cwd: ROOT,
    stdio: ['ignore', options.stdout ?? 2, 2],
    env: { ...process.env, ...options.env },
  });
  if (result.error) console.error(`${command} could not be started: ${result.error.message}`);
  return result.status ?? 1;
}

export const bin = (name) => join(ROOT, 'node_modules', '.bin', name);

function hashOf(paths) {
  const hash = createHash('sha256');
  for (const path of paths) {
    const facts = statSync(path);
    hash.update(`${relative(ROOT, path)} ${facts.size} ${facts.mtimeMs}\n`);
  }
  return hash.digest('hex');
}

const stampOf = (name) => (existsSync(join(STAMPS, name)) ? readFileSync(join(STAMPS, name), 'utf8') : '');
function stamp(name, value) {
  mkdirSync(STAMPS, { recursive: true });
  writeFileSync(join(STAMPS, name), value);
}

/** Installs what the lock file says, unless that is what is installed. Returns whether it worked. */
export function install(log) {
  const lock = createHash('sha256')
    .update(readFileSync(join(ROOT, 'package-lock.json')))
    .update(process.versions.modules)
    .digest('hex');
  if (stampOf('installed') === lock) return true;
  log('Installing packages (the first time only) ...');
  if (run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']) !== 0) return false;
  stamp('installed', lock);
  return true;
}

const SKIPPED = new Set(['node_modules', 'dist', 'dist-types', 'var', 'tests', '.git']);

function sourceFiles(folder, found = []) {
  for (const entry of readdirSync(folder, { withFileTypes: true })) {
    if (SKIPPED.has(entry.name)) continue;
    const path = join(folder, entry.name);
    if (entry.isDirectory()) sourceFiles(path, found);
    else if (!/\.(md|spec\.tsx?|png)$/.test(entry.name)) found.push(path);
  }
  return found.sort();
}

/** Compiles packages, server and page, unless nothing changed since the last time. Returns whether it worked. */
export function build(log) {
  const folders = ['apps', 'packages', 'shared', 'drizzle', 'infra'].map((name) => join(ROOT, name));
  const fingerprint = hashOf(folders.flatMap((folder) => sourceFiles(folder)));
  const complete = ['apps/api/dist/main.js', 'apps/web/dist/index.html'].every((path) => existsSync(join(ROOT, path)));
  if (complete && stampOf('built') === fingerprint) return true;
  log('Building ...');
  if (run(bin('tsc'), ['-b']) !== 0) return false;
  if (run('npm', ['run', '--silent', 'build', '-w', '@skyberth/web']) !== 0) return false;
  stamp('built', fingerprint);
  return true;
}

/** A port of this machine that nobody uses just now. */
export function freePort() {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });
}

/** Starts a Node child whose lines are prefixed with its name. */
export function startNode(name, script, env, { quiet = false } = {}) {
  const child = spawn(process.execPath, ['--enable-source-maps', script], {
    cwd: ROOT,
    env: { ...process.env, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
    detached: true,
  });
  const show = (stream, out) => {
    let rest = '';
    stream.setEncoding('utf8');
    stream.on('data', (chunk) => {
      const lines = (rest + chunk).split('\n');
      rest = lines.pop() ?? '';
      for (const line of lines) if (line.trim()) out.write(`${name.padEnd(8)} | ${line}\n`);
    });
  };
  if (!quiet) show(child.stdout, process.stdout);
  else child.stdout.resume();
  show(child.stderr, process.stderr);
  return child;
}

/** Waits until `url` answers 200, the child ends, or time runs out. */
export async function waitFor(url, child, timeoutMs) {
  const until = Date.now() + timeoutMs;
  for (;;) {
    if (child.exitCode !== null || child.signalCode !== null) throw new Error(`The process behind ${url} ended early.`);
    try {
      const answer = await fetch(url, { signal: AbortSignal.timeout(2_000) });
      if (answer.ok) return;
    } catch {
      // Not listening yet.
    }
    if (Date.now() > until) throw new Error(`${url} did not answer in ${timeoutMs / 1000} s.`);
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

/** Asks every child to stop, and ends what still runs after `graceMs`. */
export async function stopAll(children, graceMs = 4_000) {
  const running = children.filter((child) => child.exitCode === null && child.signalCode === null);
  const ended = running.map((child) => new Promise((resolve) => child.once('exit', resolve)));
  for (const child of running) child.kill('SIGTERM');
  const timer = setTimeout(() => {
    for (const child of running) if (child.exitCode === null) child.kill('SIGKILL');
  }, graceMs);
  await Promise.all(ended);
  clearTimeout(timer);
}
