import type { Readable } from 'node:stream';
import {
  attachmentRoom,
  findAttachment,
  insertAttachment,
  removeAttachments,
  type AttachmentKind,
} from '../db/attachments.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { keyOf } from '../storage/storage.ts';

/** A file as it came in, looked at but not kept yet. */
export type ReceivedFile = {
  id: string;
  name: string;
  mime: string;
  bytes: number;
  sha256: Buffer;
  open: () => Readable;
};

/**
 * Puts the bytes of a file into the store. Called before the transaction takes any lock, since a store may be far away;
 * `dropStray` takes them out again where the row does not come to be.
 */
export const putFile = (deps: Deps, actor: Actor, { id, mime, bytes, open }: ReceivedFile): Promise<void> =>
  deps.storage.put(keyOf(actor.shopId, id), open(), { mime, bytes });

/**
 * Writes the row of a file whose bytes are in the store. `instead`: takes off what the subject had of the kind before. The
 * shop's row is held by the caller, so that two at once do not pass the limit together.
 * @throws {Refusal} too-large where the shop's room is used up
 */
export async function keepFile(
  trx: Trx,
  deps: Deps,
  actor: Actor,
  file: ReceivedFile,
  subject: { kind: AttachmentKind; subjectId: string; instead: boolean },
): Promise<void> {
  const { kind, subjectId, instead } = subject;
  if (instead) await removeAttachments(trx, actor.shopId, { kind, subjectId }, deps.now());
  const room = await attachmentRoom(trx, actor.shopId);
  const { SHOP_FILES, SHOP_FILES_MB } = deps.config;
  if (room.count + 1 > SHOP_FILES || room.bytes + file.bytes > SHOP_FILES_MB * 1_048_576)
    throw new Refusal('too-large', { fields: [{ path: 'body.file', message: 'the room for files is used up' }] });
  const { id, name, mime, bytes, sha256 } = file;
  const row = { id, kind, subjectId, name, mime, bytes, sha256 };
  await insertAttachment(trx, actor.shopId, row, { by: actor.accountId, at: deps.now() });
}

/**
 * After a failure: takes the bytes out again unless their row is there, for a commit may have gone through whose answer was
 * lost. What cannot be told is left to the nightly sweep.
 */
export async function dropStray(deps: Deps, actor: Actor, id: string): Promise<void> {
  try {
    const row = await inShop(deps.db, actor, (trx) => findAttachment(trx, actor.shopId, id));
    if (!row) await deps.storage.delete(keyOf(actor.shopId, id));
  } catch (error) {
    deps.log.warn({ err: error }, 'a file without a row is left to the sweep');
  }
}
