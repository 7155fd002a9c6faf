import { v7 as uuid } from 'uuid';
import type { TouchedByCoating } from '#contracts/retiming.ts';
import { recordChange } from '../db/changes.ts';
import { lockCoating } from '../db/coatings.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import { lockJobsWithStages, setWays } from '../db/retiming.ts';
import { insertVersion, takeSheet, updateSheet } from '../db/sheets.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { coatingInShop } from './coating-view.ts';
import { namingOf, presentNaming, type Naming } from './touched-by-coating.ts';

type Wanted = { version: number; sheetIds: string[]; jobIds: string[] };
export type RetimedReply = { sheets: number; jobs: number; bookedStages: number; touched: TouchedByCoating };

/**
 * Takes the times of these process sheets and open jobs from the data sheet as it is now, all or none: sheets get a new
 * version, jobs keep theirs and their waiting stages change. What has its times already stays untouched, so sending twice is
 * harmless. Bookings stay where they are; the plan has to be made anew where it no longer fits them.
 * @throws {Refusal} not-found, for the data sheet and for what does not name it; stale with the data sheet as it is now
 */
export function retimeWithCoating(deps: Deps, actor: Actor, coatingId: string, wanted: Wanted): Promise<RetimedReply> {
  return inShop(deps.db, actor, async (trx) => {
    const { shopId } = actor;
    await lockJobsWithStages(trx, shopId, wanted.jobIds);
    await lockShop(trx, shopId);
    await lockCoating(trx, shopId, coatingId);
    const naming = await namingOf(trx, shopId, coatingId);
    if (naming.version !== wanted.version)
      throw new Refusal('stale', { current: await coatingInShop(trx, shopId, coatingId) });
    refuseStrangers(naming, wanted);
    const made = { coatingId, name: naming.name, at: deps.now() };
    const sheets = await retimeSheets(trx, actor, naming, wanted.sheetIds, made);
    const jobs = await retimeJobs(trx, actor, naming, wanted.jobIds, made);
    return { sheets, ...jobs, touched: presentNaming(await namingOf(trx, shopId, coatingId)) };
  });
}

/** A job that was finished meanwhile names nothing any more: told, or it would seem to be done. */
function refuseStrangers({ sheets, jobs }: Naming, { sheetIds, jobIds }: Wanted): void {
  const known = new Set([...sheets.map(({ sheet }) => sheet.id), ...jobs.map(({ job }) => job.id)]);
  if ([...sheetIds, ...jobIds].some((id) => !known.has(id))) throw new Refusal('not-found');
}

type Made = { coatingId: string; name: string; at: Date };

async function retimeSheets(
  trx: Trx,
  actor: Actor,
  naming: Naming,
  ids: string[],
  { coatingId, name, at }: Made,
): Promise<number> {
  const changed = naming.sheets.filter(
    ({ sheet, stages }) => ids.includes(sheet.id) && stages.some(({ differs }) => differs),
  );
  for (const { sheet, stages } of changed.toSorted((a, b) => a.sheet.id.localeCompare(b.sheet.id))) {
    await takeSheet(trx, actor.shopId, sheet.id);
    const after = new Map(stages.map(({ stage, after: ways }) => [stage, ways]));
    const body = {
      ...sheet.body,
      stages: sheet.body.stages.map((stage) => ({ ...stage, ways: after.get(stage) ?? stage.ways })),
    };
    const version = sheet.version + 1;
    const edition = { sheetId: sheet.id, versionId: uuid(), version, body };
    const note = `Re-timed with the data sheet ${name}`;
    await insertVersion(trx, actor.shopId, { ...edition, note, by: actor.accountId, at });
    await updateSheet(trx, actor.shopId, sheet.id, { version });
  }
  if (changed.length > 0)
    await recordChange(trx, actor, {
      kind: 'sheets-changed',
      ids: changed.map(({ sheet }) => sheet.id),
      detail: { retimedWith: { coatingId, name } },
    });
  return changed.length;
}

async function retimeJobs(
  trx: Trx,
  actor: Actor,
  naming: Naming,
  ids: string[],
  { coatingId, name }: Made,
): Promise<{ jobs: number; bookedStages: number }> {
  const changed = naming.jobs.filter(
    ({ job, stages }) => ids.includes(job.id) && stages.some(({ differs }) => differs),
  );
  const stages = changed.flatMap((job) => job.stages.filter(({ differs }) => differs));
  for (const { stage, after } of stages) await setWays(trx, actor.shopId, stage.id, after);
  if (changed.length > 0)
    await recordChange(trx, actor, {
      kind: 'job-changed',
      ids: changed.map(({ job }) => job.id),
      detail: { retimedWith: { coatingId, name } },
    });
  return { jobs: changed.length, bookedStages: stages.filter(({ stage }) => stage.booked).length };
}
