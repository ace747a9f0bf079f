import { z } from 'zod';
import { endpoint } from '../kernel/endpoint.ts';
import { idSchema } from '../kernel/ids.ts';
import { roles } from '../kernel/roles.ts';
import { matrixSchema } from '../risk/matrix.ts';

export const roleSchema = z.enum(roles);
export const emailSchema = z
  .email('Write an e-mail address like name@company.example.')
  .max(254)
  .transform((email) => email.toLowerCase());

/** NIST SP 800-63B: length decides, no composition rules. */
export const passwordSchema = z
  .string()
  .min(12, 'Use 12 characters or more.')
  .max(200, 'Use 200 characters at most.');

const empty = z.strictObject({});
export const done = z.object({ done: z.literal(true) });

/** Who is signed in, in which organisation, and the settings that every screen needs. */
export const sessionSchema = z.object({
  account: z.object({ id: idSchema, email: z.string(), name: z.string() }),
  role: roleSchema,
  personId: idSchema.nullable(),
  organisation: z.object({
    id: idSchema,
    name: z.string(),
    timeZone: z.string(),
    profile: z.string(),
    matrix: matrixSchema,
    /** True for the demo scenario: every name and number in it is invented. */
    invented: z.boolean(),
  }),
  memberships: z.array(z.object({ orgId: idSchema, organisation: z.string(), role: roleSchema })),
  /** The development outbox can be read in the browser. */
  outbox: z.boolean(),
});
export type Session = z.infer<typeof sessionSchema>;

export const getSession = endpoint({
  name: 'account.session',
  method: 'GET',
  path: '/api/session',
  access: 'account.own',
  summary: 'Who is signed in, and the organisation’s settings',
  reply: sessionSchema,
});

export const signInBody = z.strictObject({
  email: emailSchema,
  password: z.string().min(1, 'Write your password.').max(200),
  /** The organisation to open, for a member of several. */
  orgId: idSchema.optional(),
});

export const signIn = endpoint({
  name: 'account.signIn',
  method: 'POST',
  path: '/api/session',
  access: 'public',
  summary: 'Sign in with e-mail and password; the session id is renewed',
  body: signInBody,
  reply: sessionSchema,
});

export const signOut = endpoint({
  name: 'account.signOut',
  method: 'DELETE',
  path: '/api/session',
  access: 'public',
  summary: 'Sign out on this device',
  reply: done,
});

export const signOutEverywhere = endpoint({
  name: 'account.signOutEverywhere',
  method: 'POST',
  path: '/api/session/everywhere',
  access: 'account.own',
  summary: 'End every session of this account, this one too',
  body: empty,
  reply: done,
});

export const chooseOrganisation = endpoint({
  name: 'account.chooseOrganisation',
  method: 'PUT',
  path: '/api/session/organisation',
  access: 'account.own',
  summary: 'Open another organisation that this account belongs to',
  body: z.strictObject({ orgId: idSchema }),
  reply: sessionSchema,
});

export const askPasswordReset = endpoint({
  name: 'account.askPasswordReset',
  method: 'POST',
  path: '/api/password-resets',
  access: 'public',
  summary: 'Send a link for a new password; answers the same whether or not the address is known',
  body: z.strictObject({ email: emailSchema }),
  reply: done,
});

export const resetPasswordBody = z.strictObject({
  token: z.string().min(20).max(200),
  password: passwordSchema,
});

export const resetPassword = endpoint({
  name: 'account.resetPassword',
  method: 'POST',
  path: '/api/password-resets/use',
  access: 'public',
  summary: 'Set a new password with a link that was mailed; ends every session of the account',
  body: resetPasswordBody,
  reply: done,
});

export const changePasswordBody = z.strictObject({
  current: z.string().min(1).max(200),
  password: passwordSchema,
});

export const changePassword = endpoint({
  name: 'account.changePassword',
  method: 'POST',
  path: '/api/account/password',
  access: 'account.own',
  summary: 'Change the password; ends every other session of the account',
  body: changePasswordBody,
  reply: done,
});

export const memberSchema = z.object({
  accountId: idSchema,
  email: z.string(),
  name: z.string(),
  role: roleSchema,
  personId: idSchema.nullable(),
  /** Null until the invitation is taken up. */
  joinedAt: z.string().nullable(),
});
export type Member = z.infer<typeof memberSchema>;

export const listMembers = endpoint({
  name: 'account.members',
  method: 'GET',
  path: '/api/members',
  access: 'user.manage',
  summary: 'Everybody with a sign-in to the organisation',
  reply: z.object({ members: z.array(memberSchema) }),
});

export const inviteBody = z.strictObject({
  email: emailSchema,
  name: z.string().trim().min(1, 'Write the name.').max(120),
  role: roleSchema,
  /** The person on the crew list whom this sign-in belongs to. */
  personId: idSchema.nullable(),
});

export const inviteMember = endpoint({
  name: 'account.invite',
  method: 'PUT',
  path: '/api/members/:id',
  access: 'user.manage',
  summary: 'Give somebody a sign-in with a role; the link to set a password is mailed',
  params: z.object({ id: idSchema }),
  body: inviteBody,
  reply: memberSchema,
});

export const changeMemberRole = endpoint({
  name: 'account.changeRole',
  method: 'PATCH',
  path: '/api/members/:id',
  access: 'user.manage',
  summary: 'Change a member’s role; the last administrator stays one',
  params: z.object({ id: idSchema }),
  body: z.strictObject({ role: roleSchema }),
  reply: memberSchema,
});

export const removeMember = endpoint({
  name: 'account.removeMember',
  method: 'DELETE',
  path: '/api/members/:id',
  access: 'user.manage',
  summary: 'Take away a sign-in; what the person did stays on record',
  params: z.object({ id: idSchema }),
  reply: done,
});

export const outboxMailSchema = z.object({
  id: idSchema,
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  createdAt: z.string(),
  status: z.string(),
});

export const readOutbox = endpoint({
  name: 'account.outbox',
  method: 'GET',
  path: '/api/dev/outbox',
  access: 'public',
  summary: 'The development outbox: mail that a server without a mail host kept instead of sending',
  reply: z.object({ mails: z.array(outboxMailSchema) }),
});
