import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, name } from './common.ts';
import { email, me, newPassword } from './session.ts';
import { timeZone } from './shops.ts';

const token = z.string().min(20).max(200);

/** Whether strangers may open a shop here: SIGN_UP of the environment. */
export const readSignUp = endpoint({
  name: 'read-sign-up',
  method: 'GET',
  path: '/api/sign-up',
  reply: z.strictObject({ open: z.boolean() }),
});
/** Always 204 and in the same time, whether the address has an account or not. 404 where sign-up is closed. */
export const askToSignUp = endpoint({
  name: 'ask-to-sign-up',
  method: 'POST',
  path: '/api/sign-up',
  body: z.strictObject({ email }),
});
/** A POST, so that the token stays out of addresses and logs. */
export const readSignUpLink = endpoint({
  name: 'read-sign-up-link',
  method: 'POST',
  path: '/api/sign-up/read',
  body: z.strictObject({ token }),
  reply: z.strictObject({ email: z.string() }),
});
/** Makes the account and its shop, and signs in. */
export const signUp = endpoint({
  name: 'sign-up',
  method: 'POST',
  path: '/api/sign-up/use',
  body: z.strictObject({ token, name, password: newPassword, shop: z.strictObject({ id, name, timeZone }) }),
  reply: me,
});
