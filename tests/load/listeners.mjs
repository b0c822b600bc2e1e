/** The browsers' side of the live measurement, in a thread of its own so that it does not disturb the server's event loop. */
import { get } from 'node:http';
import { parentPort, workerData } from 'node:worker_threads';

const { url, cookies } = workerData;
/** Number of the event and when it came, for every listener. */
const times = [];

const listen = (cookie) =>
  new Promise((resolve, reject) => {
    const request = get(url, { agent: false, headers: { Accept: 'text/event-stream', Cookie: cookie } }, (response) => {
      if (response.statusCode !== 200) return reject(new Error(`The stream answered ${response.statusCode}.`));
      response.setEncoding('utf8');
      let text = '';
      response.on('data', (part) => {
        const atMs = performance.timeOrigin + performance.now();
        text += part;
        const blocks = text.split('\n\n');
        text = blocks.pop() ?? '';
        for (const block of blocks) {
          const id = /^id: (\d+)$/m.exec(block)?.[1];
          if (id !== undefined) times.push([Number(id), atMs]);
        }
      });
      resolve();
    });
    request.on('error', reject);
  });

parentPort.on('message', async (message) => {
  if (message === 'tell') {
    parentPort.postMessage({ kind: 'heard', times });
    return;
  }
  for (const cookie of cookies) await listen(cookie);
  parentPort.postMessage({ kind: 'open' });
});
