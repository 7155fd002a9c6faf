import type { Request } from 'express';
import * as z from 'zod';
import { findMembership } from '../db/memberships.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';

const uuid = z.uuid();

/**
 * The actor of a request in `/api/shops/:shopId/...`, read anew each time, so that a changed role counts at once.
 * @throws {Refusal} not-signed-in, or not-found where the account is no member of that shop.
 */
export async function actorOf(deps: Deps, req: Request): Promise<Actor> {
  if (!req.isAuthenticated()) throw new Refusal('not-signed-in');
  const shopId = uuid.safeParse(req.params.shopId);
  if (!shopId.success) throw notFound();
  const membership = await findMembership(deps.db, { accountId: req.user.id, shopId: shopId.data });
  if (!membership) throw notFound();
  return { accountId: req.user.id, shopId: shopId.data, role: membership.role, personId: membership.personId };
}
