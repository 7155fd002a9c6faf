import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant, name, role } from './common.ts';

export const email = z.email().max(254);
/** Length is what counts (NIST SP 800-63B-4): no rules of composition, long ones welcome. */
export const newPassword = z.string().min(10).max(200);

export const me = z.strictObject({
  account: z.strictObject({
    id,
    email: z.string(),
    name: z.string(),
    temperatureUnit: z.enum(['C', 'F']),
    clock: z.enum(['24', '12']),
  }),
  shops: z.array(z.strictObject({ id, name: z.string(), timeZone: z.string(), role, personId: id.nullable() })),
  serverTime: instant,
  /** True where letters are kept in the local mailbox and can be read at /mailbox. */
  localMailbox: z.boolean(),
});
export type Me = z.output<typeof me>;

export const signIn = endpoint({
  name: 'sign-in',
  method: 'POST',
  path: '/api/session',
  body: z.strictObject({ email, password: z.string().min(1).max(200) }),
  reply: me,
});
export const readSession = endpoint({ name: 'read-session', method: 'GET', path: '/api/session', reply: me });
export const signOut = endpoint({ name: 'sign-out', method: 'DELETE', path: '/api/session' });

export const changeAccount = endpoint({
  name: 'change-account',
  method: 'PATCH',
  path: '/api/account',
  body: z.strictObject({
    name: name.optional(),
    temperatureUnit: z.enum(['C', 'F']).optional(),
    clock: z.enum(['24', '12']).optional(),
  }),
  reply: me,
});
export const changePassword = endpoint({
  name: 'change-password',
  method: 'POST',
  path: '/api/account/password',
  body: z.strictObject({ currentPassword: z.string().min(1).max(200), newPassword }),
});

const token = z.string().min(20).max(200);
/** Always 204 and in the same time, whether the account exists or not. */
export const askForReset = endpoint({
  name: 'ask-for-reset',
  method: 'POST',
  path: '/api/password-reset',
  body: z.strictObject({ email }),
});
export const resetPassword = endpoint({
  name: 'reset-password',
  method: 'POST',
  path: '/api/password-reset/use',
  body: z.strictObject({ token, password: newPassword }),
});
/** A POST, so that the token stays out of addresses and logs. */
export const readInvitation = endpoint({
  name: 'read-invitation',
  method: 'POST',
  path: '/api/invitation/read',
  body: z.strictObject({ token }),
  reply: z.strictObject({ shopName: z.string(), email: z.string(), role, hasAccount: z.boolean() }),
});
/** Someone who has an account already gives its password; a new account gets the one given here. */
export const acceptInvitation = endpoint({
  name: 'accept-invitation',
  method: 'POST',
  path: '/api/invitation/accept',
  body: z.strictObject({ token, name, password: newPassword }),
  reply: me,
});

export const member = z.strictObject({
  id,
  accountId: id,
  name: z.string(),
  email: z.string(),
  role,
  personId: id.nullable(),
  disabled: z.boolean(),
});
export type Member = z.output<typeof member>;
export const listMembers = endpoint({
  name: 'list-members',
  method: 'GET',
  path: '/api/shops/:shopId/members',
  params: inShop,
  reply: z.strictObject({
    members: z.array(member),
    invitations: z.array(z.strictObject({ id, email: z.string(), role, expiresAt: instant })),
  }),
});
export const invite = endpoint({
  name: 'invite',
  method: 'POST',
  path: '/api/shops/:shopId/invitations',
  params: inShop,
  body: z.strictObject({ email, role, personId: id.nullable() }),
  reply: z.strictObject({ id }),
});
export const changeMember = endpoint({
  name: 'change-member',
  method: 'PATCH',
  path: '/api/shops/:shopId/members/:memberId',
  params: inShop.extend({ memberId: id }),
  body: z.strictObject({ role: role.optional(), disabled: z.boolean().optional() }),
  reply: member,
});
