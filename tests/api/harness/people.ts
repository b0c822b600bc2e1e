/** The people of a test: signed up, invited, or staff, each with a browser of their own. */
import { type Role, routes, type Session } from '@skyberth/shared';
import { type Client, CookieJar, must } from './client.js';
import type { MailBox } from './mail-box.js';

/** Somebody who is signed in; hand it to `call` as `as`. */
export interface Person {
  readonly jar: CookieJar;
  readonly email: string;
  readonly personId: string;
  readonly organisationId: string;
}

export const PASSWORD = 'a long sentence that only tests know';

type Country = { readonly country?: string; readonly vatNumber?: string | null };

export class People {
  private count = 0;
  private readonly staffMembers = new Map<string, Promise<Person>>();

  constructor(
    private readonly client: Client,
    private readonly mail: MailBox,
    private readonly drain: () => Promise<void>,
    private readonly staffEmails: Readonly<Record<'admin' | 'finance', string>>,
  ) {}

  /** The manager of a new operator organisation. */
  operator(options: Country = {}): Promise<Person> {
    return this.signUp('operator', options);
  }

  /** The manager of a new organisation that owns stations. */
  owner(options: Country = {}): Promise<Person> {
    return this.signUp('owner', options);
  }

  /** Marketplace staff; the same person each time, signed in again where the session has ended meanwhile. */
  async staff(role: 'admin' | 'finance'): Promise<Person> {
    const known = this.staffMembers.get(role) ?? this.comeLate(this.staffEmails[role]);
    this.staffMembers.set(role, known);
    return this.awake(await known);
  }

  /** The person with a living session: after a test has moved the clock, what a browser would do by itself. */
  async awake(person: Person): Promise<Person> {
    const { ok } = await this.client.call(routes.session, { as: person });
    return ok ? person : this.signIn(person.email);
  }

  /** A test may have moved the clock past the invitation's end; who was invited can always ask for another link. */
  private async comeLate(email: string): Promise<Person> {
    await must(this.client.call(routes.requestPasswordReset, { body: { email } }));
    return this.comeByInvitation(email);
  }

  /** Another member of the manager's organisation. */
  async member(manager: Person, role: Role): Promise<Person> {
    this.count += 1;
    const email = `${role}-${this.count}@people.example`;
    const body = { name: `Jo ${role} ${this.count}`, email, role };
    await must(this.client.call(routes.inviteMember, { body, as: manager }));
    return this.comeByInvitation(email);
  }

  async signIn(email: string, password = PASSWORD): Promise<Person> {
    const jar = new CookieJar();
    const session = await must(this.client.call(routes.signIn, { body: { email, password }, as: { jar } }));
    return personOf(jar, session);
  }

  private async signUp(kind: 'operator' | 'owner', { country = 'DE', vatNumber = null }: Country): Promise<Person> {
    this.count += 1;
    const jar = new CookieJar();
    const body = {
      name: `Robin ${kind} ${this.count}`,
      email: `${kind}-${this.count}@people.example`,
      password: PASSWORD,
      organisation: {
        name: `Test ${kind} ${this.count}`,
        kind,
        address: { line1: 'Lock Street 1', line2: '', postalCode: '10115', city: 'Tidewater', country },
        vatNumber,
      },
    } as const;
    return personOf(jar, await must(this.client.call(routes.signUp, { body, as: { jar } })));
  }

  private async comeByInvitation(email: string): Promise<Person> {
    await this.drain();
    const body = { token: this.mail.tokenFor(email), password: PASSWORD };
    await must(this.client.call(routes.setPassword, { body }));
    return this.signIn(email);
  }
}

const personOf = (jar: CookieJar, session: Session): Person => ({
  jar,
  email: session.person.email,
  personId: session.person.id,
  organisationId: session.active.organisationId,
});
