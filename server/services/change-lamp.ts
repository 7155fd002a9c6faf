import { v7 as uuid } from 'uuid';
import type { LampFields } from '#contracts/lamps.ts';
import { recordChange } from '../db/changes.ts';
import { lockCircuit } from '../db/circuits.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { insertLamp, loadLamps, lockLamp, updateLamp, type LampRow } from '../db/lamps.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import { tellClashes } from '../planning/posted-clashes.ts';
import type { Actor } from '../policies.ts';
import { beforeAndAfter, differing, isNameTaken, nameTaken, type Given } from './set-up-change.ts';

/** @throws {Refusal} bad-request where the name is used or the circuit is not of this shop */
export function createLamp(deps: Deps, actor: Actor, fields: LampFields) {
  const { shopId } = actor;
  return inShop(deps.db, actor, async (trx) => {
    if (isNameTaken(await loadLamps(trx, shopId), fields.name)) throw nameTaken();
    await mustBeCircuit(trx, shopId, fields.circuitId);
    const id = uuid();
    await insertLamp(trx, shopId, id, fields);
    await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: { lamp: fields.name, added: true } });
    return { lamp: await lockedLamp(trx, shopId, id), clashes: [] };
  });
}

/**
 * Changes the fields that are given. Posted work that the lamp's circuit no longer carries is told, not moved.
 * @throws {Refusal} not-found; stale with the lamp as it is now; bad-request for a name in use or a foreign circuit
 */
export function changeLamp(deps: Deps, actor: Actor, id: string, input: Given<LampFields> & { version: number }) {
  const { version, ...given } = input;
  const { shopId } = actor;
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      const before = await lockedLamp(trx, shopId, id);
      const fields = differing<LampFields>(before, given);
      if (Object.keys(fields).length === 0) return { lamp: before, clashes: [] };
      if (before.version !== version) throw new Refusal('stale', { current: before });
      if (fields.name !== undefined && isNameTaken(await loadLamps(trx, shopId), fields.name, id)) throw nameTaken();
      if (fields.circuitId !== undefined) await mustBeCircuit(trx, shopId, fields.circuitId);
      const { clashes } = await tellClashes(trx, shopId, deps.now(), () => updateLamp(trx, shopId, id, fields));
      await recordChange(trx, actor, { kind: 'shop-changed', ids: [id], detail: beforeAndAfter(before, fields) });
      return { lamp: await lockedLamp(trx, shopId, id), clashes };
    }),
  );
}

/** @throws {Refusal} not-found */
export async function lockedLamp(trx: Trx, shopId: string, id: string): Promise<LampRow> {
  const row = await lockLamp(trx, shopId, id);
  if (!row) throw notFound();
  return row;
}

async function mustBeCircuit(trx: Trx, shopId: string, circuitId: string): Promise<void> {
  if (await lockCircuit(trx, shopId, circuitId)) return;
  throw new Refusal('bad-request', { fields: [{ path: 'body.circuitId', message: 'is no circuit of this shop' }] });
}
