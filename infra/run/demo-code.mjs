/** `npm run demo:code`: the six digits that the authenticators of the demo's finance people show now. */
import { demoSignIns } from './stack.mjs';

const people = demoSignIns(process.env.SKYBERTH_DATA_DIR ?? 'var').filter((one) => one.secondFactorSecret);
if (people.length === 0) {
  console.error('There is no demo here yet; npm start loads it.');
  process.exit(1);
}
// Built by npm start, which has loaded the demo.
const { codeAt } = await import('../demo/dist/codes.js');
const nowMs = Date.now();
for (const one of people) console.log(`${one.email.padEnd(38)} ${codeAt(one.secondFactorSecret, nowMs)}`);
console.log(`They change in ${30 - (Math.floor(nowMs / 1000) % 30)} s; each is taken once.`);
