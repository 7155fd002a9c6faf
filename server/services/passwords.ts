import { hash, parseOptions, verify } from '@node-rs/argon2';
import type { Deps } from '../deps.ts';

/** OWASP password storage cheat sheet: argon2id (the library's default) with 19 MiB, 2 passes, 1 lane, or dearer. */
const productCost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };
const costOf = (deps: Deps) => deps.passwordCost ?? productCost;

export const hashPassword = (deps: Deps, password: string): Promise<string> => hash(password, costOf(deps));

const dummies = new WeakMap<Deps, Promise<string>>();

/** A hash of no password, so that an account that does not exist takes as long as a wrong password. */
function dummyHash(deps: Deps): Promise<string> {
  const known = dummies.get(deps) ?? hashPassword(deps, crypto.randomUUID());
  dummies.set(deps, known);
  return known;
}

/** Makes that hash beforehand, so that not even the first try of an unknown account takes longer. */
export const prepareDummyHash = async (deps: Deps): Promise<void> => void (await dummyHash(deps));

export async function isPassword(deps: Deps, passwordHash: string | null, password: string): Promise<boolean> {
  const matches = await verify(passwordHash ?? (await dummyHash(deps)), password);
  return passwordHash !== null && matches;
}

/** True for a hash made when hashing was cheaper than it is now. */
export function isWeak(deps: Deps, passwordHash: string): boolean {
  const made = parseOptions(passwordHash);
  const wanted = costOf(deps);
  return made.memoryCost < wanted.memoryCost || made.timeCost < wanted.timeCost;
}
