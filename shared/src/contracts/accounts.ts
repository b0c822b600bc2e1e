/** Sign-up, sign-in, sessions, the organisation and its members. */
import { z } from 'zod';
import { OrganisationKind, Role } from '../permissions.js';
import { Country, Done, Email, Id, Name, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

export const Password = z
  .string()
  .min(12, 'Use at least 12 characters; a sentence works well.')
  .max(200, 'Use at most 200 characters.');

export const PostalAddress = z.object({
  line1: z.string().trim().min(1, 'Give street and number.').max(120),
  line2: z.string().trim().max(120).default(''),
  postalCode: z.string().trim().max(20),
  city: z.string().trim().min(1, 'Give the town.').max(80),
  country: Country,
});
export type PostalAddress = z.infer<typeof PostalAddress>;

export const Organisation = z.object({
  id: Id,
  kind: OrganisationKind,
  name: Name,
  address: PostalAddress,
  vatNumber: z.string().nullable(),
  billingEmail: Email,
  createdUtc: UtcTime,
});
export type Organisation = z.infer<typeof Organisation>;

export const Membership = z.object({
  organisationId: Id,
  organisationName: z.string(),
  organisationKind: OrganisationKind,
  role: Role,
});
export type Membership = z.infer<typeof Membership>;

/** The signed-in person, the organisation they act for, and the others they could switch to. */
export const Session = z.object({
  person: z.object({ id: Id, name: z.string(), email: z.string(), emailVerified: z.boolean() }),
  active: Membership,
  memberships: z.array(Membership),
  serverTimeUtc: UtcTime,
});
export type Session = z.infer<typeof Session>;

export const Member = z.object({
  personId: Id,
  name: z.string(),
  email: z.string(),
  role: Role,
  state: z.enum(['invited', 'active']),
  lastSeenUtc: UtcTime.nullable(),
});
export type Member = z.infer<typeof Member>;

export const SignUp = z.object({
  name: Name,
  email: Email,
  password: Password,
  organisation: z.object({
    name: Name,
    kind: z.enum(['operator', 'owner']),
    address: PostalAddress,
    vatNumber: z.string().trim().max(20).nullable().default(null),
  }),
});

const tag = 'accounts';
export const accountRoutes = {
  signUp: defineRoute({
    name: 'signUp',
    method: 'POST',
    path: '/api/auth/sign-up',
    summary: 'Create a person and their organisation, and sign in',
    tag,
    access: 'public',
    data: 'self',
    body: SignUp,
    response: Session,
    status: 201,
    errors: ['already-exists', 'too-many'],
  }),
  signIn: defineRoute({
    name: 'signIn',
    method: 'POST',
    path: '/api/auth/sign-in',
    summary: 'Sign in with e-mail and password',
    tag,
    access: 'public',
    data: 'self',
    body: z.object({ email: Email, password: z.string().min(1, 'Give the password.').max(200) }),
    response: Session,
    idempotencyKey: 'none',
    errors: ['wrong-credentials', 'not-allowed', 'too-many'],
  }),
  refresh: defineRoute({
    name: 'refresh',
    method: 'POST',
    path: '/api/auth/refresh',
    summary: 'Trade the refresh token for a new pair; a token used twice ends the whole family',
    tag,
    access: 'public',
    data: 'self',
    response: Session,
    idempotencyKey: 'none',
    errors: ['session-ended', 'in-progress'],
  }),
  signOut: defineRoute({
    name: 'signOut',
    method: 'POST',
    path: '/api/auth/sign-out',
    summary: 'End this session',
    tag,
    access: 'public',
    data: 'self',
    response: Done,
    idempotencyKey: 'none',
  }),
  session: defineRoute({
    name: 'session',
    method: 'GET',
    path: '/api/auth/session',
    summary: 'Who is signed in',
    tag,
    access: 'signed-in',
    data: 'self',
    response: Session,
  }),
  switchOrganisation: defineRoute({
    name: 'switchOrganisation',
    method: 'POST',
    path: '/api/auth/switch',
    summary: 'Act for another organisation of which the person is a member',
    tag,
    access: 'signed-in',
    data: 'self',
    body: z.object({ organisationId: Id }),
    response: Session,
    idempotencyKey: 'none',
    errors: ['not-found'],
  }),
  verifyEmail: defineRoute({
    name: 'verifyEmail',
    method: 'POST',
    path: '/api/auth/verify-email',
    summary: 'Confirm an e-mail address with the mailed token',
    tag,
    access: 'public',
    data: 'self',
    body: z.object({ token: z.string().max(200) }),
    response: Done,
    idempotencyKey: 'none',
    errors: ['not-found'],
  }),
  requestPasswordReset: defineRoute({
    name: 'requestPasswordReset',
    method: 'POST',
    path: '/api/auth/request-password-reset',
    summary: 'Mail a reset link, if the address is known',
    tag,
    access: 'public',
    data: 'self',
    body: z.object({ email: Email }),
    response: Done,
    idempotencyKey: 'none',
    errors: ['too-many'],
  }),
  setPassword: defineRoute({
    name: 'setPassword',
    method: 'POST',
    path: '/api/auth/set-password',
    summary: 'Set a password with a reset or invitation token; ends every session of the person',
    tag,
    access: 'public',
    data: 'self',
    body: z.object({ token: z.string().max(200), password: Password }),
    response: Done,
    idempotencyKey: 'none',
    errors: ['not-found'],
  }),
  organisation: defineRoute({
    name: 'organisation',
    method: 'GET',
    path: '/api/organisation',
    summary: "The caller's organisation",
    tag,
    access: 'organisation.read',
    data: 'own',
    response: Organisation,
  }),
  updateOrganisation: defineRoute({
    name: 'updateOrganisation',
    method: 'PATCH',
    path: '/api/organisation',
    summary: 'Change name, address, VAT number or billing e-mail',
    tag,
    access: 'organisation.manage',
    data: 'own',
    body: z
      .object({
        name: Name,
        address: PostalAddress,
        vatNumber: z.string().trim().max(20).nullable(),
        billingEmail: Email,
      })
      .partial(),
    response: Organisation,
    errors: ['already-exists'],
  }),
  members: defineRoute({
    name: 'members',
    method: 'GET',
    path: '/api/organisation/members',
    summary: 'Members of the organisation',
    tag,
    access: 'organisation.read',
    data: 'own',
    response: z.object({ items: z.array(Member) }),
  }),
  inviteMember: defineRoute({
    name: 'inviteMember',
    method: 'POST',
    path: '/api/organisation/members',
    summary: 'Invite a person by e-mail',
    tag,
    access: 'members.manage',
    data: 'own',
    body: z.object({ name: Name, email: Email, role: Role }),
    response: Member,
    status: 201,
    errors: ['already-exists', 'bad-input'],
  }),
  changeMember: defineRoute({
    name: 'changeMember',
    method: 'PATCH',
    path: '/api/organisation/members/:personId',
    summary: "Change a member's role; the last manager, or admin, stays",
    tag,
    access: 'members.manage',
    data: 'own',
    params: z.object({ personId: Id }),
    body: z.object({ role: Role }),
    response: Member,
    errors: ['not-found', 'wrong-state', 'bad-input'],
  }),
  removeMember: defineRoute({
    name: 'removeMember',
    method: 'DELETE',
    path: '/api/organisation/members/:personId',
    summary: 'Remove a member; the last manager, or admin, stays',
    tag,
    access: 'members.manage',
    data: 'own',
    params: z.object({ personId: Id }),
    response: Done,
    errors: ['not-found', 'wrong-state'],
  }),
} as const;
