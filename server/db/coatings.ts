import {
  coatingKind,
  coatingSheet,
  emptySheet,
  type Coating,
  type CoatingKind,
  type CoatingSheet,
} from '#contracts/coatings.ts';
import { attachmentFrom, type AttachmentRow } from './attachments.ts';
import type { Trx } from './in-shop.ts';

export type KeptCoating = Coating & {
  version: number;
  retiredAt: Date | null;
  document: ReturnType<typeof attachmentFrom> | null;
  usedBy: { id: string; name: string }[];
};

type Stored = { id: string; name: string; kind: string; sheet: Record<string, unknown> };
type Row = Stored & Pick<KeptCoating, 'version' | 'retiredAt' | 'usedBy'> & { document: AttachmentRow | null };

/** The shop's coatings that are in use with what their data sheets say, by name. */
export async function listCoatings(trx: Trx, shopId: string): Promise<Coating[]> {
  const rows = await trx('coating')
    .where({ shop_id: shopId })
    .whereNull('retired_at')
    .orderBy('name')
    .select<Stored[]>('id', 'name', 'kind', 'sheet');
  return rows.map(coatingFrom);
}

/** Retired ones too: jobs and sheets made before still name them. */
export async function everyCoating(trx: Trx, shopId: string): Promise<Coating[]> {
  const rows = await trx('coating')
    .where({ shop_id: shopId })
    .orderBy('name')
    .select<Stored[]>('id', 'name', 'kind', 'sheet');
  return rows.map(coatingFrom);
}

const KEPT = `
  select c.id, c.name, c.kind, c.sheet, c.version, c.retired_at as "retiredAt",
    (select json_build_object('id', a.id, 'name', a.name, 'bytes', a.bytes, 'mime', a.mime, 'at', a.created_at,
                              'by', account.name)
     from attachment a left join account on account.id = a.created_by
     where a.shop_id = c.shop_id and a.subject_id = c.id and a.kind = 'data-sheet' and a.removed_at is null) as document,
    (select coalesce(json_agg(json_build_object('id', p.id, 'name', p.name) order by p.name), '[]')
     from process_sheet p
     join process_sheet_version v on v.shop_id = p.shop_id and v.process_sheet_id = p.id and v.version = p.version
     where p.shop_id = c.shop_id and p.retired_at is null
       and v.body -> 'stages' @> jsonb_build_array(jsonb_build_object('coatingId', c.id))) as "usedBy"
  from coating c
  where c.shop_id = :shopId and (:id::uuid is null or c.id = :id::uuid)
    and (:retired::boolean is null or (c.retired_at is not null) = :retired::boolean)
  order by c.name`;

/** All that is in use, or all that is retired, by name. */
export async function surveyCoatings(trx: Trx, shopId: string, retired: boolean): Promise<KeptCoating[]> {
  const { rows } = await trx.raw<{ rows: Row[] }>(KEPT, { shopId, id: null, retired });
  return rows.map(keptFrom);
}

/** Retired or not; undefined where there is none. */
export async function findCoating(trx: Trx, shopId: string, id: string): Promise<KeptCoating | undefined> {
  const { rows } = await trx.raw<{ rows: Row[] }>(KEPT, { shopId, id, retired: null });
  return rows.map(keptFrom)[0];
}

/** Takes the row until the transaction ends. */
export async function lockCoating(trx: Trx, shopId: string, id: string): Promise<void> {
  await trx('coating').where({ shop_id: shopId, id }).forNoKeyUpdate().select('id');
}

/** Names are told apart without regard to case, so that nobody picks the wrong one of two. */
export const coatingNamed = (trx: Trx, shopId: string, name: string): Promise<{ id: string } | undefined> =>
  trx('coating')
    .where({ shop_id: shopId })
    .whereRaw('lower(name) = lower(?)', [name])
    .first<{ id: string } | undefined>('id');

export async function insertCoating(trx: Trx, shopId: string, coating: Coating): Promise<void> {
  const { id, name, kind, sheet } = coating;
  await trx('coating').insert({ shop_id: shopId, id, name, kind, sheet: JSON.stringify(sheet) });
}

export type CoatingFields = { name: string; kind: CoatingKind; sheet: CoatingSheet; retiredAt: Date | null };

/** Writes what is given and counts the version up. */
export async function updateCoating(
  trx: Trx,
  shopId: string,
  id: string,
  { name, kind, sheet, retiredAt }: Partial<CoatingFields>,
): Promise<void> {
  await trx('coating')
    .where({ shop_id: shopId, id })
    .update({
      ...(name === undefined ? {} : { name }),
      ...(kind === undefined ? {} : { kind }),
      ...(sheet === undefined ? {} : { sheet: JSON.stringify(sheet) }),
      ...(retiredAt === undefined ? {} : { retired_at: retiredAt }),
    })
    .increment('version', 1);
}

const coatingFrom = ({ id, name, kind, sheet }: Stored): Coating => ({
  id,
  name,
  kind: coatingKind.catch('other').parse(kind),
  sheet: upToDate(sheet),
});

const keptFrom = ({ version, retiredAt, usedBy, document, ...stored }: Row): KeptCoating => ({
  ...coatingFrom(stored),
  version,
  retiredAt,
  usedBy,
  document: document && attachmentFrom(document),
});

/** Rows written before a line was known lack it; the first ones had a single lamp line that named its wave. */
export function upToDate({ lamp, ...stored }: Record<string, unknown>): CoatingSheet {
  const { wave, ...cure } = (lamp ?? {}) as { wave?: 'short' | 'medium' };
  const lamps = wave === undefined ? {} : { [wave === 'short' ? 'lampShort' : 'lampMedium']: cure };
  return coatingSheet.parse({ ...emptySheet, ...lamps, ...stored });
}
