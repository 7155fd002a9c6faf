import type { Attachment } from '#contracts/attachments.ts';
import type { Trx } from './in-shop.ts';

/** What files are kept for. The kind says which table the subject is in. */
export type AttachmentKind = 'data-sheet' | 'photo' | 'trace';

/** As SQL hands it out, `at` as a Date or as the text that JSON makes of it. */
export type AttachmentRow = Omit<Attachment, 'at' | 'bytes'> & { at: Date | string; bytes: number | string };

export const attachmentFrom = ({ at, bytes, ...row }: AttachmentRow): Attachment => ({
  ...row,
  bytes: Number(bytes),
  at: new Date(at).toISOString(),
});

export type NewAttachment = {
  id: string;
  kind: AttachmentKind;
  subjectId: string;
  name: string;
  bytes: number;
  mime: string;
  sha256: Buffer;
};

export async function insertAttachment(
  trx: Trx,
  shopId: string,
  { subjectId, ...file }: NewAttachment,
  made: { by: string; at: Date },
): Promise<void> {
  await trx('attachment').insert({
    shop_id: shopId,
    ...file,
    subject_id: subjectId,
    created_by: made.by,
    created_at: made.at,
  });
}

/** Takes off what a subject has of a kind; answers with how many there were. */
export const removeAttachments = (
  trx: Trx,
  shopId: string,
  subject: { kind: AttachmentKind; subjectId: string },
  at: Date,
): Promise<number> =>
  trx('attachment')
    .where({ shop_id: shopId, kind: subject.kind, subject_id: subject.subjectId })
    .whereNull('removed_at')
    .update({ removed_at: at });

export type FoundAttachment = { id: string; name: string; mime: string; bytes: number };

/** One that was not taken off. */
export async function findAttachment(trx: Trx, shopId: string, id: string): Promise<FoundAttachment | undefined> {
  const row = await trx('attachment')
    .where({ shop_id: shopId, id })
    .whereNull('removed_at')
    .first<(Omit<FoundAttachment, 'bytes'> & { bytes: string }) | undefined>('id', 'name', 'mime', 'bytes');
  return row && { ...row, bytes: Number(row.bytes) };
}

/** How much room a shop's files take, those taken off not counted. */
export async function attachmentRoom(trx: Trx, shopId: string): Promise<{ count: number; bytes: number }> {
  const { rows } = await trx.raw<{ rows: { count: string; bytes: string }[] }>(
    `select count(*) as count, coalesce(sum(bytes), 0) as bytes from attachment where shop_id = ? and removed_at is null`,
    [shopId],
  );
  return { count: Number(rows[0]?.count ?? 0), bytes: Number(rows[0]?.bytes ?? 0) };
}

/** Those of these ids whose bytes are still wanted: not taken off, or taken off after `since`. */
export async function wantedAttachments(trx: Trx, shopId: string, ids: string[], since: Date): Promise<Set<string>> {
  const rows = await trx('attachment')
    .where({ shop_id: shopId })
    .whereIn('id', ids)
    .where((either) => {
      void either.whereNull('removed_at').orWhere('removed_at', '>=', since);
    })
    .select<{ id: string }[]>('id');
  return new Set(rows.map(({ id }) => id));
}
