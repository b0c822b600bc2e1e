/** The browser's side of the measurement, in a thread of its own so that it does not disturb the server's event loop. */
import { randomUUID } from 'node:crypto';
import { parentPort, workerData } from 'node:worker_threads';

const { url } = workerData;
let cookie = '';

async function post(path, body) {
  const response = await fetch(`${url}${path}`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json', 'Idempotency-Key': randomUUID(), Cookie: cookie },
    body: JSON.stringify(body),
  });
  const bytes = Buffer.from(await response.arrayBuffer());
  if (!response.ok) throw new Error(`${path}: ${response.status} ${bytes.toString()}`);
  return { response, bytes };
}

async function signUp() {
  const address = { line1: 'Lock Street 1', line2: '', postalCode: '10115', city: 'Tidewater', country: 'DE' };
  const organisation = { name: 'Measured Operator', kind: 'operator', address, vatNumber: null };
  const password = 'a long sentence that only this measurement knows';
  const { response, bytes } = await post('/api/auth/sign-up', {
    name: 'Robin Meter',
    email: 'robin@meter.example',
    password,
    organisation,
  });
  cookie = response.headers
    .getSetCookie()
    .map((line) => line.split(';')[0])
    .join('; ');
  return { organisationId: JSON.parse(bytes.toString()).active.organisationId };
}

/** Timed from the request to the last byte; reading the JSON is the page's own time. */
async function search(body) {
  const begun = performance.now();
  const { bytes } = await post('/api/passes/search', body);
  const tookMs = performance.now() - begun;
  const { counts } = JSON.parse(bytes.toString());
  return { tookMs, bytes: bytes.byteLength, passes: counts.passes };
}

parentPort.on('message', async ({ id, kind, body }) => {
  try {
    parentPort.postMessage({ id, ...(kind === 'sign up' ? await signUp() : await search(body)) });
  } catch (error) {
    parentPort.postMessage({ id, error: error instanceof Error ? error.message : String(error) });
  }
});
