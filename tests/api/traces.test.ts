import { randomUUID } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { emptySheet } from '#contracts/coatings.ts';
import type { BakeTrace } from '#contracts/traces.ts';
import { traceRoutes } from '#server/http/traces.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aCoating, aJob, aMember, aShop, type TestShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
let shop: TestShop;
let painter: string;
let stage: string;
let jobId: string;
beforeAll(async () => {
  api = await testApi(traceRoutes, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aShop(api.deps.db);
  painter = await aMember(api.deps.db, shop, { role: 'painter' });
  const job = await aJob(api.deps.db, shop, { stages: [{ title: 'Bake clear' }] });
  jobId = job.id;
  stage = job.stages[0] ?? '';
});

const packed = (lines: readonly string[]) => gzipSync(lines.join('\n')).toString('base64');
const hold = (celsius: number, minutes: number) =>
  packed(Array.from({ length: minutes + 1 }, (_, i) => `${i},${celsius}`));
const body = (rows: string, given: object = {}) => ({
  id: randomUUID(),
  fileName: 'bake.csv',
  coatingId: null,
  points: [{ celsius: 60, minutes: 30 }],
  earlierMinutes: 0,
  limitCelsius: null,
  hottestCelsius: null,
  rows,
  ...given,
});
const attach = (sent: object, to = stage) =>
  api.as(painter).post(`/api/shops/${shop.id}/stages/${to}/traces`).send(sent);
const list = async () =>
  (
    (await api.as(painter).get(`/api/shops/${shop.id}/jobs/${jobId}/traces`).expect(200)).body as {
      traces: BakeTrace[];
    }
  ).traces;

describe('a bake trace', () => {
  // 30 min at 60 C with 50 kJ/mol are 52.4 min at 50 C (Arrhenius, R 8.314462618), so 52 min are short and 53 enough.
  test.each([
    [52, false],
    [53, true],
  ])('of %i min at 50 C is judged by the server: cured %s', async (minutes, cured) => {
    const { verdict } = (await attach(body(hold(50, minutes))).expect(200)).body as BakeTrace;
    expect(verdict).toMatchObject({
      cured,
      neededMinutes: 30,
      referenceCelsius: 60,
      peakCelsius: 50,
      rows: minutes + 1,
    });
    expect(verdict.doneMinutes).toBeCloseTo((minutes / 52.4) * 30, 1);
  });

  test('is held against the shop’s data sheet where a coating is named, whatever points were sent', async () => {
    const bake = { minutes: 40, celsius: 60, measuredAt: 'metal' as const };
    const coatingId = await aCoating(api.deps.db, shop, { name: 'Clear', sheet: { ...emptySheet, bake } });
    const { body: kept } = await attach(body(hold(60, 35), { coatingId, points: [] })).expect(200);
    expect(kept).toMatchObject({ coatingName: 'Clear', verdict: { cured: false, neededMinutes: 40 } });
    await attach(body(hold(60, 35), { coatingId: randomUUID() })).expect(400);
  });

  test('of a hundred thousand rows is worth what it is worth in one piece', async () => {
    const lines = Array.from({ length: 100_000 }, (_, i) => `${(i / 1000).toFixed(3)},${i === 70_000 ? 71.5 : 60}`);
    const { verdict, curve } = (await attach(body(packed(lines), { limitCelsius: 70 })).expect(200)).body as BakeTrace;
    expect(verdict).toMatchObject({ cured: true, rows: 100_000, peakCelsius: 71.5, tooHot: true });
    expect(verdict.doneMinutes).toBeCloseTo(99.999, 1);
    expect(curve.length).toBeLessThanOrEqual(200);
    expect(Math.max(...curve.map(([, celsius]) => celsius))).toBe(71.5);
  });

  test('sent twice is kept once; taken off it is gone, and can be put back', async () => {
    const sent = body(hold(60, 30));
    const first = (await attach(sent).expect(200)).body as BakeTrace;
    expect((await attach(sent).expect(200)).body).toEqual(first);
    await attach({ ...sent, rows: hold(60, 31) }).expect(409);
    expect((await list()).map(({ id }) => id)).toEqual([first.id]);
    const remove = (removed: boolean) =>
      api.as(painter).post(`/api/shops/${shop.id}/traces/${first.id}/remove`).send({ removed }).expect(200);
    await remove(true);
    expect(await list()).toEqual([]);
    await remove(false);
    expect(await list()).toHaveLength(1);
    const { csv } = (await api.as(painter).get(`/api/shops/${shop.id}/traces/${first.id}`).expect(200)).body as {
      csv: string;
    };
    expect(csv.split('\n').slice(0, 3)).toEqual(['time min,metal C', '0,60', '1,60']);
  });

  test.each([
    ['no gzip', 'AAAA', 'cannot be unpacked'],
    ['a word among the figures', packed(['0,20', 'x,30']), 'line 2 is no reading'],
    ['a time that goes back', packed(['0,20', '2,30', '1,30']), 'line 3: the time goes back'],
    ['a broken sensor', packed(['0,20', '1,900']), 'line 2 is no temperature'],
    ['one reading', packed(['0,20']), 'fewer than two'],
    ['more than is taken once unpacked', packed([`0,20${'0'.repeat(9_000_000)}`]), 'holds too much'],
  ])('%s: refused with the line, and nothing is kept', async (_, rows, said) => {
    const { body: answer } = await attach(body(rows)).expect(400);
    const [field] = (answer as { error: { fields: { path: string; message: string }[] } }).error.fields;
    expect([field?.path, field?.message]).toEqual(['body.rows', expect.stringContaining(said)]);
    expect(await list()).toEqual([]);
  });

  test('is of no stage of another shop', async () => {
    const other = await aShop(api.deps.db);
    const theirs = await aJob(api.deps.db, other);
    await attach(body(hold(60, 30)), theirs.stages[0]).expect(404);
  });
});
