import type { Sheet, SheetBody } from '#contracts/sheets.ts';
import type { Trx } from './in-shop.ts';

export type EditionRow = {
  version: number;
  versionId: string;
  at: Date;
  by: string | null;
  note: string;
  openJobs: number;
};
export type SheetPage = Sheet & { revision: number; retiredAt: Date | null; versions: EditionRow[] };
type EditionJson = Omit<EditionRow, 'at'> & { at: string };

/** A sheet, retired or not, with all its versions and the open jobs made from each, newest first. */
export async function findSheetPage(trx: Trx, shopId: string, sheetId: string): Promise<SheetPage | undefined> {
  const { rows } = await trx.raw<{ rows: (Omit<SheetPage, 'versions'> & { versions: EditionJson[] })[] }>(
    `select p.id, p.name, p.version, p.revision, p.retired_at as "retiredAt", v.id as "versionId", v.body,
            (select json_agg(json_build_object('version', e.version, 'versionId', e.id, 'at', e.created_at,
                                               'by', a.name, 'note', e.note, 'openJobs',
                      (select count(*) from job j
                       where j.shop_id = e.shop_id and j.process_sheet_version_id = e.id and j.state = 'open'))
                    order by e.version desc)
             from process_sheet_version e left join account a on a.id = e.created_by
             where e.shop_id = p.shop_id and e.process_sheet_id = p.id) as versions
     from process_sheet p
     join process_sheet_version v
       on v.shop_id = p.shop_id and v.process_sheet_id = p.id and v.version = p.version
     where p.shop_id = ? and p.id = ?`,
    [shopId, sheetId],
  );
  const [row] = rows;
  return row && { ...row, versions: row.versions.map((one) => ({ ...one, at: new Date(one.at) })) };
}

export type SurveyRow = Sheet & { revision: number; retiredAt: Date | null; openJobs: number; savedAt: Date };

/** All sheets, those in use first, by name; with the open jobs that were made from any of their versions. */
export async function surveySheets(trx: Trx, shopId: string): Promise<SurveyRow[]> {
  const { rows } = await trx.raw<{ rows: (Omit<SurveyRow, 'openJobs'> & { openJobs: string })[] }>(
    `select p.id, p.name, p.version, p.revision, p.retired_at as "retiredAt", v.id as "versionId", v.body,
            v.created_at as "savedAt", coalesce(made.jobs, 0) as "openJobs"
     from process_sheet p
     join process_sheet_version v
       on v.shop_id = p.shop_id and v.process_sheet_id = p.id and v.version = p.version
     left join (
       select e.process_sheet_id, count(*) as jobs
       from job j join process_sheet_version e on e.shop_id = j.shop_id and e.id = j.process_sheet_version_id
       where j.shop_id = :shopId and j.state = 'open'
       group by e.process_sheet_id
     ) made on made.process_sheet_id = p.id
     where p.shop_id = :shopId
     order by p.retired_at is not null, p.name`,
    { shopId },
  );
  return rows.map((row) => ({ ...row, openJobs: Number(row.openJobs) }));
}

export type StoredEdition = Omit<EditionRow, 'openJobs'> & { body: SheetBody };

type EditionKey = { 'e.process_sheet_id': string } & ({ 'e.id': string } | { 'e.version': number });

export const findEdition = (trx: Trx, shopId: string, key: EditionKey): Promise<StoredEdition | undefined> =>
  trx('process_sheet_version as e')
    .leftJoin('account as a', 'a.id', 'e.created_by')
    .where({ 'e.shop_id': shopId, ...key })
    .first<StoredEdition | undefined>({
      version: 'e.version',
      versionId: 'e.id',
      at: 'e.created_at',
      by: 'a.name',
      note: 'e.note',
      body: 'e.body',
    });
