import { isDeepStrictEqual } from 'node:util';
import { v7 as uuid } from 'uuid';
import type * as z from 'zod';
import type { Job, newJob } from '#contracts/jobs.ts';
import type { Sheet } from '#contracts/sheets.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { askedFor, findJob, insertJob, takeJobNumber } from '../db/jobs.ts';
import { lockShop } from '../db/locks.ts';
import { findSheet } from '../db/sheets.ts';
import { insertStages } from '../db/stages.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { expandSheet } from '../sheets/expand-sheet.ts';
import { jobInShop } from './read-job.ts';

export type NewJobInput = z.output<typeof newJob>;

/**
 * Makes a job from the newest version of a process sheet: its stages are those the chosen options leave, with the ways
 * copied, so that a later change of the sheet does not touch it. Sent twice with the same id it is made once.
 * @throws {Refusal} bad-request with fields; key-reused where the id belongs to a job that was asked for otherwise.
 */
export function createJob(deps: Deps, actor: Actor, input: NewJobInput): Promise<Job> {
  return inShop(deps.db, actor, async (trx) => {
    // Two who send the same new job are served one after the other.
    await lockShop(trx, actor.shopId);
    if (!(await wasMade(trx, actor.shopId, input))) await makeJob(trx, actor, input);
    return jobInShop(trx, actor.shopId, input.id, deps.now());
  });
}

async function wasMade(trx: Trx, shopId: string, input: NewJobInput): Promise<boolean> {
  const job = await findJob(trx, shopId, input.id);
  if (!job) return false;
  const asked = await askedFor(trx, shopId, job.id);
  if (!isDeepStrictEqual(asked, JSON.parse(JSON.stringify(input)))) throw new Refusal('key-reused');
  return true;
}

async function makeJob(trx: Trx, actor: Actor, input: NewJobInput): Promise<void> {
  const { id, sheetId, options, parts, releaseAt, promiseAt, ...fields } = input;
  const sheet = await findSheet(trx, actor.shopId, sheetId);
  const stages = stagesFor(sheet, input);
  const number = await takeJobNumber(trx, actor.shopId);
  await insertJob(trx, actor.shopId, {
    ...fields,
    id,
    number,
    releaseAt: new Date(releaseAt),
    promiseAt: promiseAt === null ? null : new Date(promiseAt),
    sheetVersionId: sheet?.versionId ?? null,
    createdBy: actor.accountId,
    parts: parts.map((part) => ({ id: uuid(), ...part })),
  });
  await insertStages(trx, actor.shopId, id, stages);
  await recordChange(trx, actor, { kind: 'job-created', ids: [id], detail: input });
}

/** The stages the options leave. Everything that is wrong is said at once. */
function stagesFor(sheet: Sheet | undefined, input: NewJobInput) {
  const stages = sheet ? expandSheet(sheet.body, input.options) : [];
  const fields = [
    ...(sheet ? optionFaults(sheet, input.options) : [{ path: 'body.sheetId', message: 'no such process sheet' }]),
    ...(sheet && stages.length === 0 ? [{ path: 'body.options', message: 'no stage is left' }] : []),
    ...promiseFault(input.releaseAt, input.promiseAt),
  ];
  if (fields.length > 0) throw new Refusal('bad-request', { fields });
  return stages.map(({ kind, title, coatingId, ways }) => ({ id: uuid(), kind, title, coatingId, ways }));
}

/** An option is named as often as it is chosen: once, or up to what the sheet allows of extra coats. */
const optionFaults = ({ body }: Sheet, chosen: readonly string[]) =>
  chosen.flatMap((key, i) => {
    const path = `body.options.${i}`;
    const option = body.options.find((one) => one.key === key);
    if (!option) return [{ path, message: 'not an option of this process sheet' }];
    const { most = 1 } = option;
    const before = chosen.slice(0, i).filter((one) => one === key).length;
    return before >= most ? [{ path, message: `can be chosen ${most === 1 ? 'once' : `${most} times at most`}` }] : [];
  });

export const promiseFault = (releaseAt: string, promiseAt: string | null) =>
  promiseAt !== null && new Date(promiseAt) < new Date(releaseAt)
    ? [{ path: 'body.promiseAt', message: 'the promise lies before the day the job arrives' }]
    : [];
