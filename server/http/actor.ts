import type { Request } from 'express';
import * as z from 'zod';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { findActor } from '../services/find-signed-in.ts';
import { mustBeSignedIn } from './signed-in.ts';

const uuid = z.uuid();

/**
 * The actor of a request in `/api/shops/:shopId/...`, read anew each time, so that a changed role counts at once.
 * @throws {Refusal} not-signed-in, or not-found where the account is no member of that shop.
 */
export async function actorOf(deps: Deps, req: Request): Promise<Actor> {
  const account = mustBeSignedIn(req);
  const shopId = uuid.safeParse(req.params['shopId']);
  if (!shopId.success) throw notFound();
  const actor = await findActor(deps, account.id, shopId.data);
  if (!actor) throw notFound();
  return actor;
}
