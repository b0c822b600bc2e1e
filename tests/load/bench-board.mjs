/**
 * Measures how smoothly the tide board pans and zooms with two hundred rows and twenty thousand passes: a production build of
 * the drawing alone, in Chromium without a GPU, with a trace. Prints the frames that the page could draw and the longest task
 * of its thread. Run it with `npm run bench:board`. Nothing here is part of the tests: figures depend on the machine.
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromium } from 'playwright-core';
import { build, preview } from 'vite';

const WEB = fileURLToPath(new URL('../../apps/web/', import.meta.url));
const STEPS = 180;
const FRAME_MS = 1000 / 60;
const BROWSERS = ['/usr/bin/chromium', '/usr/bin/chromium-browser'];

const outDir = mkdtempSync(join(tmpdir(), 'skyberth-board-'));
await build({
  root: WEB,
  logLevel: 'error',
  build: { outDir, emptyOutDir: true, rolldownOptions: { input: join(WEB, 'gallery.html') } },
});
const server = await preview({
  root: WEB,
  logLevel: 'error',
  build: { outDir },
  preview: { port: 0, host: '127.0.0.1' },
});
const [url] = server.resolvedUrls.local;
const browser = await chromium.launch({
  executablePath: process.env.CHROMIUM ?? BROWSERS[0],
  args: ['--headless', '--no-sandbox', '--disable-gpu'],
});
const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });

console.log(`${cpus().length} x ${cpus()[0]?.model ?? 'unknown'}, ${browser.version()}`);
for (const hours of [6, 48]) {
  await page.goto(`${url}gallery.html?plate=crowd&hours=${hours}`);
  const board = page.locator('canvas').first();
  await board.waitFor();
  await page.waitForTimeout(1_500);
  const box = await board.boundingBox();
  const middle = { x: box.x + box.width / 2, y: Math.min(box.y + box.height / 2, 500) };
  await measured(`${hours} h in view, panning`, () => pan(middle));
  await measured(`${hours} h in view, zooming`, () => zoom(middle));
}
await browser.close();
await server.close();
rmSync(outDir, { recursive: true, force: true });

/** A hand that drags to and fro, a step a frame. */
async function pan({ x, y }) {
  await page.mouse.move(x, y);
  await page.mouse.down();
  for (let step = 1; step <= STEPS; step += 1) {
    await page.mouse.move(x + 360 * Math.sin((step / STEPS) * 2 * Math.PI), y);
    await page.waitForTimeout(FRAME_MS);
  }
  await page.mouse.up();
}

async function zoom({ x, y }) {
  await page.mouse.move(x, y);
  for (let step = 1; step <= STEPS / 3; step += 1) {
    await page.mouse.wheel(0, step <= STEPS / 6 ? -40 : 40);
    await page.waitForTimeout(2 * FRAME_MS);
  }
}

/** Runs the act under a trace and prints its frames and tasks. */
async function measured(what, act) {
  const session = await page.context().newCDPSession(page);
  const events = [];
  session.on('Tracing.dataCollected', ({ value }) => events.push(...value));
  await session.send('Tracing.start', {
    transferMode: 'ReportEvents',
    traceConfig: { includedCategories: ['toplevel', 'devtools.timeline', 'disabled-by-default-devtools.timeline'] },
  });
  await page.evaluate(() => {
    globalThis.frameTimes = [];
    const note = (now) => {
      globalThis.frameTimes.push(now);
      globalThis.frameNote = requestAnimationFrame(note);
    };
    globalThis.frameNote = requestAnimationFrame(note);
  });
  await act();
  const times = await page.evaluate(() => {
    cancelAnimationFrame(globalThis.frameNote);
    return globalThis.frameTimes;
  });
  const done = new Promise((resolve) => session.once('Tracing.tracingComplete', resolve));
  await session.send('Tracing.end');
  await done;
  await session.detach();
  const frames = times.slice(1).map((at, index) => at - times[index]);
  console.log(
    `${what}: ${frames.length} frames, median ${at(frames, 0.5)} ms, p99 ${at(frames, 0.99)} ms, ` +
      `worst ${at(frames, 1)} ms, over 32 ms: ${frames.filter((each) => each > 32).length}; ` +
      `longest task of the page ${longestTask(events).toFixed(1)} ms`,
  );
}

function at(values, share) {
  const sorted = values.toSorted((a, b) => a - b);
  return (sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? 0).toFixed(1);
}

/** The longest task on the page's own main thread, in milliseconds. */
function longestTask(events) {
  const mains = new Set(
    events
      .filter(({ name, args }) => name === 'thread_name' && args?.name === 'CrRendererMain')
      .map(({ pid, tid }) => `${pid} ${tid}`),
  );
  return events
    .filter(
      ({ ph, dur, name, pid, tid }) => ph === 'X' && dur && name.endsWith('RunTask') && mains.has(`${pid} ${tid}`),
    )
    .reduce((most, { dur }) => Math.max(most, dur / 1000), 0);
}
