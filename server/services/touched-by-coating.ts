import { retimeStages, type Retimed } from '#chemistry/sheets/retime-stages.ts';
import type { TouchedByCoating } from '#contracts/retiming.ts';
import type { Way } from '#contracts/sheets.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { jobsNaming, sheetsNaming, type NamingJob, type NamingSheet } from '../db/retiming.ts';
import type { Deps } from '../deps.ts';
import type { Actor } from '../policies.ts';
import { keptCoating } from './coating-view.ts';

type Stage<T> = { stage: T; before: readonly Way[]; after: Way[]; differs: boolean };
/** What names a coating, with the ways of its stages as they are and as the data sheet would have them. */
export type Naming = {
  version: number;
  name: string;
  sheets: { sheet: NamingSheet; stages: Stage<NamingSheet['body']['stages'][number]>[] }[];
  jobs: { job: NamingJob; stages: Stage<NamingJob['stages'][number]>[] }[];
};

/** @throws {Refusal} not-found */
export async function namingOf(trx: Trx, shopId: string, coatingId: string): Promise<Naming> {
  const { name, version, sheet: figures } = await keptCoating(trx, shopId, coatingId);
  const coating = { id: coatingId, sheet: figures };
  const sheets = (await sheetsNaming(trx, shopId, coatingId)).map((sheet) => ({
    sheet,
    stages: withStages(sheet.body.stages, retimeStages<Way>(sheet.body.stages, coating)),
  }));
  const jobs = (await jobsNaming(trx, shopId, coatingId)).flatMap((job) => {
    const stages = withStages(job.stages, retimeStages<Way>(job.stages, coating));
    // What has begun is over: its times are what they were.
    const waiting = stages.filter(({ stage }) => stage.state === 'waiting');
    return waiting.length > 0 ? [{ job, stages: waiting }] : [];
  });
  return { name, version, sheets, jobs };
}

const withStages = <T>(stages: readonly T[], retimed: readonly Retimed<Way>[]): Stage<T>[] =>
  retimed.flatMap(({ index, ...times }) => {
    const stage = stages[index];
    return stage === undefined ? [] : [{ stage, ...times }];
  });

/** What a data sheet touches, and what it would change there. @throws {Refusal} not-found */
export const readTouched = (deps: Deps, actor: Actor, coatingId: string): Promise<TouchedByCoating> =>
  inShop(deps.db, actor, async (trx) => presentNaming(await namingOf(trx, actor.shopId, coatingId)));

export const presentNaming = ({ version, sheets, jobs }: Naming): TouchedByCoating => ({
  version,
  sheets: sheets.map(({ sheet: { id, name, version: edition }, stages }) => ({
    id,
    name,
    version: edition,
    differs: stages.some(({ differs }) => differs),
    stages: stages.map((one) => presentStage(one, { title: one.stage.title, booked: false })),
  })),
  jobs: jobs.map(({ job: { id, number, title }, stages }) => ({
    id,
    number,
    title,
    differs: stages.some(({ differs }) => differs),
    stages: stages.map((one) => presentStage(one, one.stage)),
  })),
});

type ShownWay = TouchedByCoating['sheets'][number]['stages'][number]['ways'][number];

const presentStage = (
  { before, after }: Pick<Stage<unknown>, 'before' | 'after'>,
  { title, booked }: { title: string; booked: boolean },
) => ({
  title,
  booked,
  ways: before.map((way, i) => presentWay(way, after[i] ?? way)),
});

const minutesOf = ({ phases }: Way): number => phases.reduce((sum, { minutes }) => sum + minutes, 0);

function presentWay(before: Way, after: Way): ShownWay {
  const change = <T>(from: T, to: T) => (from === to ? null : { from, to });
  const heat = before.bakeCelsius !== null && after.bakeCelsius !== null;
  return {
    label: before.label,
    minutes: change(minutesOf(before), minutesOf(after)),
    earliest: change(before.gap.min, after.gap.min),
    latest: change(before.gap.max, after.gap.max),
    bakeCelsius: heat ? change(before.bakeCelsius ?? 0, after.bakeCelsius ?? 0) : null,
  };
}
