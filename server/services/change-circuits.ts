import { v7 as uuid } from 'uuid';
import type { Circuit, CircuitFields } from '#contracts/lamps.ts';
import { recordChange } from '../db/changes.ts';
import {
  deleteCircuit,
  insertCircuit,
  lampsOnCircuit,
  loadCircuits,
  lockCircuit,
  updateCircuit,
} from '../db/circuits.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import { tellClashes } from '../planning/posted-clashes.ts';
import type { Actor } from '../policies.ts';
import { beforeAndAfter, differing, isNameTaken, nameTaken, type Given } from './set-up-change.ts';
import { stillUsedBy } from './still-in-use.ts';

/** @throws {Refusal} bad-request where the name is used */
export function createCircuit(deps: Deps, actor: Actor, fields: CircuitFields) {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    if (isNameTaken(await loadCircuits(trx, shopId), fields.name)) throw nameTaken();
    const id = uuid();
    await insertCircuit(trx, shopId, id, fields);
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { circuit: fields.name, added: true } });
    return { circuit: await lockedCircuit(trx, shopId, id), clashes: [] };
  });
}

/** @throws {Refusal} not-found; stale with the circuit as it is now; bad-request where the name is used */
export function changeCircuit(deps: Deps, actor: Actor, id: string, input: Given<CircuitFields> & { version: number }) {
  const { version, ...given } = input;
  const { shopId } = actor;
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      const before = await lockedCircuit(trx, shopId, id);
      const fields = differing<CircuitFields>(before, given);
      if (Object.keys(fields).length === 0) return { circuit: before, clashes: [] };
      if (before.version !== version) throw new Refusal('stale', { current: before });
      if (fields.name !== undefined && isNameTaken(await loadCircuits(trx, shopId), fields.name, id)) throw nameTaken();
      const { clashes } = await tellClashes(trx, shopId, deps.now(), () => updateCircuit(trx, shopId, id, fields));
      await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: beforeAndAfter(before, fields) });
      return { circuit: await lockedCircuit(trx, shopId, id), clashes };
    }),
  );
}

/** @throws {Refusal} not-found; stale; refused (still-used-by) with the lamps on it, retired ones too */
export function removeCircuit(deps: Deps, actor: Actor, id: string, version: number): Promise<void> {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    const before = await lockedCircuit(trx, shopId, id);
    if (before.version !== version) throw new Refusal('stale', { current: before });
    const lamps = await lampsOnCircuit(trx, shopId, id);
    if (lamps.length > 0) throw stillUsedBy(before.name, lamps);
    await deleteCircuit(trx, shopId, id);
    await recordChange(trx, actor, {
      kind: 'shop-changed',
      ids: [id],
      detail: { circuit: before.name, removed: true },
    });
  });
}

async function lockedCircuit(trx: Trx, shopId: string, id: string): Promise<Circuit> {
  const circuit = await lockCircuit(trx, shopId, id);
  if (!circuit) throw notFound();
  return circuit;
}
