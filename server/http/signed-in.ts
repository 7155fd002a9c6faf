import type { Request } from 'express';
import type {} from 'passport';
import { Refusal } from '../errors.ts';
import type { SignedInAccount } from '../services/find-signed-in.ts';

/** The account of the request's session, read anew at each request; undefined where nobody is signed in. */
export const signedInOf = (req: Request): SignedInAccount | undefined => req.user as SignedInAccount | undefined;

/** @throws {Refusal} not-signed-in */
export function mustBeSignedIn(req: Request): SignedInAccount {
  const account = signedInOf(req);
  if (!account) throw new Refusal('not-signed-in');
  return account;
}
