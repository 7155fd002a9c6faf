import type { Readable } from 'node:stream';
import { findAttachment, type FoundAttachment } from '../db/attachments.ts';
import { inShop } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { keyOf } from '../storage/storage.ts';

/** @throws {Refusal} not-found, also where the store has lost the bytes: then it is logged */
export async function readAttachment(
  deps: Deps,
  actor: Actor,
  id: string,
): Promise<FoundAttachment & { body: Readable }> {
  const found = await inShop(deps.db, actor, (trx) => findAttachment(trx, actor.shopId, id));
  if (!found) throw notFound();
  const body = await deps.storage.get(keyOf(actor.shopId, id));
  if (body) return { ...found, body };
  deps.log.error({ attachmentId: id }, 'the store has no bytes for an attachment');
  throw notFound();
}
