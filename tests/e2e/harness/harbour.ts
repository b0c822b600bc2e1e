/** The built product with its stand-ins, on an empty data folder of its own, as a first start finds it. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { routes } from '@skyberth/shared';
import { startStack } from '../../../infra/run/stack.mjs';
import { freePort } from '../../../infra/run/toolbox.mjs';
import { Client, CookieJar, must } from '../../api/harness/client.js';
import { MailDesk } from './mail-desk.js';

export const PASSWORD = 'a long sentence that only tests know';
export const ADMIN_EMAIL = 'harbour.admin@skyberth.example';
export const FINANCE_EMAIL = 'harbour.finance@skyberth.example';

/** Somebody who is signed in over HTTP. */
export interface Signed {
  readonly jar: CookieJar;
  readonly email: string;
}

export interface Harbour {
  readonly url: string;
  readonly mail: MailDesk;
  readonly call: Client['call'];
  readonly people: {
    /** Staff who have come by their invitation. */
    staff(role: 'admin' | 'finance'): Promise<Signed>;
    /** The manager of a new organisation, named after it. */
    manager(kind: 'operator' | 'owner', organisation: string): Promise<Signed>;
  };
  stop(): Promise<void>;
}

export async function startHarbour(): Promise<Harbour> {
  const dataDir = mkdtempSync(join(tmpdir(), 'skyberth-browser-'));
  // Read by the server when it starts for the first time; it then invites them.
  process.env['SKYBERTH_ADMIN_EMAIL'] = ADMIN_EMAIL;
  process.env['SKYBERTH_FINANCE_EMAIL'] = FINANCE_EMAIL;
  const stack = await startStack({ port: await freePort(), dataDir, demo: false });
  const client = new Client(stack.urls.app);
  const mail = new MailDesk(stack.urls.mail);
  const call = client.call.bind(client);
  return {
    url: stack.urls.app,
    mail,
    call,
    people: peopleOf(call, mail),
    stop: async () => {
      await stack.stop();
      rmSync(dataDir, { recursive: true, force: true });
    },
  };
}

function peopleOf(call: Client['call'], mail: MailDesk): Harbour['people'] {
  const staffMembers = new Map<string, Promise<Signed>>();
  const come = async (email: string): Promise<Signed> => {
    const token = new URL(await mail.linkFor(email)).searchParams.get('token') ?? '';
    await must(call(routes.setPassword, { body: { token, password: PASSWORD } }));
    const jar = new CookieJar();
    await must(call(routes.signIn, { body: { email, password: PASSWORD }, as: { jar } }));
    return { jar, email };
  };
  return {
    staff: (role) => {
      const known = staffMembers.get(role) ?? come(role === 'admin' ? ADMIN_EMAIL : FINANCE_EMAIL);
      staffMembers.set(role, known);
      return known;
    },
    manager: async (kind, organisation) => {
      const jar = new CookieJar();
      const email = `${organisation.toLowerCase().replaceAll(/[^a-z0-9]+/g, '.')}@people.example`;
      const body = {
        name: `Robin of ${organisation}`,
        email,
        password: PASSWORD,
        organisation: {
          name: organisation,
          kind,
          address: { line1: 'Lock Street 1', line2: '', postalCode: '10115', city: 'Tidewater', country: 'DE' },
          vatNumber: null,
        },
      };
      await must(call(routes.signUp, { body, as: { jar } }));
      return { jar, email };
    },
  };
}
