import type { ChangeKind } from '#contracts/live.ts';
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
  const rows = ordered.map((line, i) => ({
    shop_id: shopId,
    at: line.at,
    seq: i + 1,
    account_id: line.accountId,
    kind: line.kind,
    ids: line.ids,
    detail: JSON.stringify(line.detail ?? {}),
  }));
  await trx.batchInsert('change', rows, 500);
  await trx('shop').where({ id: shopId }).update({ change_seq: rows.length });
}
