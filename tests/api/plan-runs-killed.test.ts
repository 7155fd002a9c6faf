import { spawn, type ChildProcess } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { once } from 'node:events';
import path from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import type { PlanRun } from '#contracts/day.ts';
import { draftRoutes } from '#server/http/drafts.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aJob } from '../helpers/factories-jobs.ts';
import { aPlanShop, air, bake, spray, utc, type PlanShop } from './drafts-shop.ts';

let api: TestApi;
let shop: PlanShop;
const children: ChildProcess[] = [];
beforeAll(async () => {
  // The worker is a program of its own and has the real clock: so has this test.
  api = await testApi(draftRoutes, new Date().toISOString());
  shop = await aPlanShop(api.deps.db);
});
afterAll(async () => {
  for (const child of children) if (child.exitCode === null && child.signalCode === null) child.kill('SIGKILL');
  await api.close();
});

function startWorker(): ChildProcess {
  const { DATABASE_URL, SESSION_SECRET } = api.deps.config;
  const child = spawn(process.execPath, ['--import', 'tsx', 'jobs/worker-main.ts'], {
    cwd: path.resolve(import.meta.dirname, '../..'),
    env: { PATH: process.env['PATH'], NODE_ENV: 'test', LOG_LEVEL: 'fatal', DATABASE_URL, SESSION_SECRET },
    stdio: 'ignore',
  });
  children.push(child);
  return child;
}

const rows = (table: string): Promise<Record<string, unknown>[]> =>
  shop.in((trx) => trx(table).where({ shop_id: shop.id }).orderBy('id').select('*')) as Promise<
    Record<string, unknown>[]
  >;
const runs = (path_ = ''): string => `/api/shops/${shop.id}/plan-runs${path_}`;
const read = async (id: string): Promise<PlanRun> => {
  const answer = await api
    .as(shop.lead)
    .get(runs(`/${id}`))
    .expect(200);
  return answer.body as PlanRun;
};
const patiently = { timeout: 60_000, interval: 100 };

it(
  'a worker killed in the middle of planning leaves the old draft whole, and the next one plans anew',
  { timeout: 180_000 },
  async () => {
    const stages: string[] = [];
    for (let i = 0; i < 12; i++) {
      const ways = {
        stages: [
          { title: 'Clear', ways: [spray] },
          { title: 'Bake', ways: [bake, air] },
        ],
      };
      stages.push(
        ...(await aJob(api.deps.db, shop, { title: `Job ${i}`, releaseAt: utc('02T06:00'), ...ways })).stages,
      );
    }
    const opened = await api.as(shop.lead).post(`/api/shops/${shop.id}/draft`).send({}).expect(200);
    const before = { draft: await rows('draft'), items: await rows('draft_item') };
    const id = randomUUID();
    await api.as(shop.lead).post(runs()).send({ id, scope: 'all', seconds: 120, seed: 1 }).expect(200);

    const first = startWorker();
    await expect.poll(async () => (await read(id)).progress, patiently).not.toBeNull();
    first.kill('SIGKILL');
    await once(first, 'exit');
    expect(await read(id)).toMatchObject({ state: 'running' });
    expect({ draft: await rows('draft'), items: await rows('draft_item') }).toEqual(before);

    const { startedAt } = await read(id);
    startWorker();
    await expect.poll(async () => (await read(id)).startedAt, patiently).not.toBe(startedAt);
    await api
      .as(shop.lead)
      .post(runs(`/${id}/stop`))
      .send({})
      .expect(200);
    await expect.poll(async () => (await read(id)).state, patiently).toBe('stopped');
    const items = await rows('draft_item');
    const [draft] = await rows('draft');
    const left = new Set((draft?.['unplaced'] as { jobId: string }[]).map(({ jobId }) => jobId));
    expect(items).toHaveLength(stages.length - 2 * left.size);
    expect(draft).toMatchObject({ id: opened.body.id, version: 2 });
    const [task] = (await api.deps.db('task').where({ kind: 'run-plan', key: id }).select('*')) as Record<
      string,
      unknown
    >[];
    expect(task).toMatchObject({ attempts: 2, dead_at: null });
  },
);
