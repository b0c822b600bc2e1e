import { start } from './index.js';

const port = Number(process.env.ELEMENTS_PORT ?? 4250);
if (!Number.isInteger(port) || port < 0 || port > 65_535)
  throw new Error(`ELEMENTS_PORT must be a port number, not "${process.env.ELEMENTS_PORT}"`);

const file = process.env.ELEMENTS_FILE;
const service = await start({
  port,
  dataDir: process.env.ELEMENTS_DATA_DIR ?? 'var/elements',
  ...(file ? { file } : {}),
});
console.log(`Local element feed (invented spacecraft) at ${service.url}`);

let stopping = false;
for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.on(signal, () => {
    if (stopping) return;
    stopping = true;
    service.close().then(
      () => process.exit(0),
      (error: unknown) => {
        console.error(error);
        process.exit(1);
      },
    );
  });
}
