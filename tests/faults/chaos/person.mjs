/** Somebody with a browser: keeps cookies, sends each command under one key until a server answers, and stays signed in. */
import { randomUUID } from 'node:crypto';
import { setTimeout as sleep } from 'node:timers/promises';

const PASSWORD = 'a long sentence that only this trial knows';
const FRESH_MS = 600_000;
const TRIES = 6;
const PAUSE_MS = 250;

export class Person {
  cookies = new Map();
  signedInMs = Date.now();
  organisationId = '';

  /** `servers` as in servers.mjs; `failures` takes every answer that no server should give. */
  constructor({ name, address, pick, servers, failures }) {
    Object.assign(this, { name, address, pick, servers, failures });
  }

  async signUp(kind) {
    const address = { line1: 'Lock Street 1', line2: '', postalCode: '10115', city: 'Tidewater', country: 'DE' };
    const organisation = { name: `Trial ${this.name}`, kind, address, vatNumber: null };
    const email = `${this.name}@trial.example`;
    const body = { name: `Robin ${this.name}`, email, password: PASSWORD, organisation };
    const answer = await this.post('/api/auth/sign-up', body);
    if (answer.status >= 300) throw new Error(`Sign-up answered ${answer.status}: ${JSON.stringify(answer.body)}`);
    this.organisationId = answer.body.active.organisationId;
  }

  get(path) {
    return this.persist('GET', path);
  }

  post(path, body, { key = randomUUID(), only } = {}) {
    return this.persist('POST', path, { body, key, only });
  }

  /**
   * Asks until somebody answers. Where a server died under it, the same command goes to another under the same key; `cut`
   * then says that it may have been carried out without a word, and status 0 that nobody said anything in the end.
   */
  async persist(method, path, { body, key, only } = {}) {
    if (Date.now() - this.signedInMs > FRESH_MS) await this.refresh();
    let cut = false;
    for (let attempt = 0; attempt < TRIES; attempt += 1) {
      const living = this.servers.living;
      const server = living[(only ?? this.pick(living.length)) % living.length];
      try {
        const answer = await this.send(server.url, method, path, { body, key });
        if (answer.status >= 500 || answer.status === 401)
          this.failures.push(`${answer.status} ${path} ${JSON.stringify(answer.body)}`);
        if (answer.body?.code !== 'in-progress') return { ...answer, cut };
      } catch {
        cut = true;
      }
      await sleep(PAUSE_MS);
    }
    return { status: 0, body: null, cut: true };
  }

  async send(url, method, path, { body, key }) {
    const response = await fetch(`${url}${path}`, {
      method,
      headers: {
        'X-Forwarded-For': this.address,
        Cookie: this.cookieHeader(path),
        ...(body === undefined ? {} : { 'Content-Type': 'application/json' }),
        ...(key === undefined ? {} : { 'Idempotency-Key': key }),
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      signal: AbortSignal.timeout(60_000),
    });
    const text = await response.text();
    this.takeCookies(response);
    return { status: response.status, body: text === '' ? null : JSON.parse(text) };
  }

  async refresh() {
    this.signedInMs = Date.now();
    const { status, body } = await this.post('/api/auth/refresh', undefined);
    if (status >= 300) this.failures.push(`${status} refresh ${JSON.stringify(body)}`);
  }

  cookieHeader(path) {
    return [...this.cookies]
      .filter(([, cookie]) => path.startsWith(cookie.path))
      .map(([name, { value }]) => `${name}=${value}`)
      .join('; ');
  }

  takeCookies(response) {
    for (const line of response.headers.getSetCookie()) {
      const [pair, ...attributes] = line.split('; ');
      const at = pair.indexOf('=');
      const path = attributes.find((each) => each.startsWith('Path='))?.slice(5) ?? '/';
      this.cookies.set(pair.slice(0, at), { value: pair.slice(at + 1), path });
    }
  }
}
