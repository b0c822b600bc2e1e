/** `npm run dev`: the stand-ins, the server restarting on each change, the page with hot reload, the compiler watching. */
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { startStack } from './stack.mjs';
import { bin, build, freePort, install, ROOT, requireNode, stopAll } from './toolbox.mjs';

requireNode();
const log = (text) => console.log(text);
if (!install(log) || !build(log)) process.exit(1);

const pagePort = Number(process.env.PORT ?? 3000);
const apiPort = await freePort();
const stack = await startStack({ port: apiPort, dataDir: process.env.SKYBERTH_DATA_DIR ?? 'var', api: false, log });
const environment = { ...process.env, ...stack.environment, SKYBERTH_PUBLIC_URL: `http://127.0.0.1:${pagePort}` };
const watch = (command, args, options = {}) => {
  const child = spawn(command, args, { cwd: ROOT, stdio: 'inherit', detached: true, env: environment, ...options });
  stack.children.push(child);
};
watch(bin('tsc'), ['-b', '--watch', '--preserveWatchOutput']);
watch(process.execPath, ['--watch', '--enable-source-maps', join(ROOT, 'apps/api/dist/main.js')]);
watch(bin('vite'), ['--port', String(pagePort), '--strictPort'], {
  cwd: join(ROOT, 'apps/web'),
  env: { ...environment, SKYBERTH_API_ORIGIN: `http://127.0.0.1:${apiPort}` },
});
console.log(
  `\nSkyberth (development) at http://127.0.0.1:${pagePort}; mail at ${stack.urls.mail}; payments at ${stack.urls.payments}`,
);

let stopping = false;
for (const signal of ['SIGINT', 'SIGTERM']) {
  process.on(signal, async () => {
    if (stopping) return;
    stopping = true;
    await stopAll(stack.children);
    process.exit(0);
  });
}
