/** `npm start`: from a checkout to the running product, on one address; Ctrl-C stops all of it. */
import { demoSignIns, startStack } from './stack.mjs';
import { build, install, requireNode } from './toolbox.mjs';

requireNode();
const log = (text) => console.log(text);
if (!install(log) || !build(log)) process.exit(1);

const port = Number(process.env.PORT ?? 3000);
if (!Number.isInteger(port) || port < 1 || port > 65_535) {
  console.error(`PORT must be a port number, not "${process.env.PORT}".`);
  process.exit(1);
}
const dataDir = process.env.SKYBERTH_DATA_DIR ?? 'var';

let stack;
let stopping = false;
async function stop(code) {
  if (stopping) return;
  stopping = true;
  await stack?.stop();
  process.exit(code);
}
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => void stop(0));

try {
  stack = await startStack({ port, dataDir, demo: process.env.SKYBERTH_DEMO !== 'off', log });
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
}
for (const child of stack.children) {
  child.once('exit', () => {
    if (stopping) return;
    console.error('A part of Skyberth ended by itself; stopping the rest.');
    void stop(1);
  });
}

console.log(`\nSkyberth is ready at ${stack.urls.app}`);
console.log(`Mail that it sent:     ${stack.urls.mail}`);
console.log(`Local payment service: ${stack.urls.payments}`);
const signIns = demoSignIns(dataDir);
if (signIns.length > 0) {
  console.log('\nDemo sign-ins (invented people):');
  for (const one of signIns) console.log(`  ${one.what.padEnd(34)} ${one.email.padEnd(38)} ${one.password}`);
  console.log('Finance is asked for a code when payouts are let go; npm run demo:code shows the present ones.');
}
console.log('\nCtrl-C stops everything.');
