import type { Role } from '#contracts/common.ts';

/** Who asks, in which shop: made from the session and the membership at each request, never from the request's body. */
export type Actor = {
  accountId: string;
  shopId: string;
  role: Role;
  /** The person of the shop's roster this account works as, if any. */
  personId: string | null;
};

type Policy = (actor: Actor) => boolean;

const oneOf =
  (...roles: Role[]): Policy =>
  (actor) =>
    roles.includes(actor.role);

/** Rights by deed. Pure, asked once at the door of each route. */
export const may = {
  seeShop: oneOf('owner', 'lead', 'painter', 'office'),
  plan: oneOf('owner', 'lead'),
  keepJobs: oneOf('owner', 'lead', 'office'),
  workStages: oneOf('owner', 'lead', 'painter'),
  seeUse: oneOf('owner', 'lead'),
  keepSheets: oneOf('owner', 'lead'),
  setUp: oneOf('owner'),
} satisfies Record<string, Policy>;

/** A painter works the own bench; leads and owners may look at everybody's. */
export const maySeeBenchOf = (actor: Actor, personId: string): boolean =>
  actor.personId === personId || may.plan(actor);
