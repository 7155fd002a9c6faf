import type { ChangeKind } from '#contracts/live.ts';
import { currentSeq } from '#server/db/changes.ts';
import type { Trx } from '#server/db/in-shop.ts';

export type Line = {
  at: Date;
  accountId: string | null;
  kind: ChangeKind;
  ids: string[];
  detail?: Record<string, unknown>;
};

/** Numbers what happened in the order in which it did, as if the program had written it at the time. */
export async function putInHistory(trx: Trx, shopId: string, lines: Line[]): Promise<void> {
  const ordered = [...lines].sort((a, b) => a.at.getTime() - b.at.getTime());
  // The number of the last change of a shop that is put back; 0 of a new one.
  const last = await currentSeq(trx, shopId);
  const rows = ordered.map((line, i) => ({
    shop_id: shopId,
    at: line.at,
    seq: last + i + 1,
    account_id: line.accountId,
    kind: line.kind,
    ids: line.ids,
    detail: JSON.stringify(line.detail ?? {}),
  }));
  await trx.batchInsert('change', rows, 500);
  await trx('shop')
    .where({ id: shopId })
    .update({ change_seq: last + rows.length });
}
