import type * as z from 'zod';
import type { JobRow, listJobs as contract } from '#contracts/jobs.ts';
import { inShop } from '../db/in-shop.ts';
import * as db from '../db/job-list.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';

type Query = z.output<typeof contract.query>;
type Page = z.output<typeof contract.reply>;

export async function listJobs(deps: Deps, actor: Actor, query: Query): Promise<Page> {
  const found = await inShop(deps.db, actor, (trx) => db.listJobs(trx, actor.shopId, query, deps.now()));
  return { rows: found.rows.map(present), total: found.total, page: query.page, size: query.size };
}

const present = (row: db.JobListRow): JobRow => ({
  id: row.id,
  number: row.number,
  title: row.title,
  vehicle: row.vehicle,
  sheetName: row.sheetName,
  state: row.state,
  releaseAt: row.releaseAt.toISOString(),
  promiseAt: row.promiseAt?.toISOString() ?? null,
  endsAt: row.endsAt?.toISOString() ?? null,
  late: row.late,
  stagesDone: row.stagesDone,
  stagesTotal: row.stagesTotal,
  weight: row.weight,
  next:
    row.nextTitle !== null && row.nextStartsAt && row.nextPlaceName !== null
      ? { title: row.nextTitle, startsAt: row.nextStartsAt.toISOString(), placeName: row.nextPlaceName }
      : null,
});
