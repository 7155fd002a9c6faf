import type { Request, RequestHandler, Response } from 'express';
import { Passport } from 'passport';
import { Strategy } from 'passport-local';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { findSignedIn, type SignedInAccount } from '../services/find-signed-in.ts';
import { signIn } from '../services/sign-in.ts';

export type OwnPassport = InstanceType<typeof Passport>;

/** Of each program its own, never the package's global one: two programs in one process do not share sessions. */
export function makePassport(deps: Deps): OwnPassport {
  const passport = new Passport();
  passport.use(
    new Strategy({ usernameField: 'email', session: false }, (email, password, done) => {
      signIn(deps, { email, password }).then((account) => done(null, account ?? false), done);
    }),
  );
  passport.serializeUser((user, done) => done(null, (user as SignedInAccount).id));
  passport.deserializeUser((id: string, done) => {
    findSignedIn(deps, id).then((account) => done(null, account ?? false), done);
  });
  return passport;
}

/** Puts the session's account on the request. */
export const readAccount = (passport: OwnPassport): RequestHandler => passport.session() as RequestHandler;

/** @throws {Refusal} wrong-credentials, the same for an unknown address and for a wrong password */
export function checkCredentials(passport: OwnPassport, req: Request, res: Response): Promise<SignedInAccount> {
  return new Promise((resolve, reject) => {
    const judge = (error: unknown, account: SignedInAccount | false | null | undefined) => {
      if (error) reject(toError(error));
      else if (account) resolve(account);
      else reject(new Refusal('wrong-credentials'));
    };
    const check = passport.authenticate('local', judge) as RequestHandler;
    void check(req, res, reject);
  });
}

/** Starts a session with a new id; whatever id the browser came with is worth nothing afterwards. */
export async function startSession(deps: Deps, req: Request, account: SignedInAccount): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    req.logIn(account, (error?: unknown) => (error ? reject(toError(error)) : resolve()));
  });
  req.session.signedInAt = deps.now().getTime();
  req.session.seenAt = req.session.signedInAt;
}

const toError = (thrown: unknown): Error => (thrown instanceof Error ? thrown : new Error(String(thrown)));
