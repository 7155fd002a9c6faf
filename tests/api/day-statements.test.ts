import { afterAll, beforeAll, expect, test } from 'vitest';
import type { DayView } from '#contracts/day.ts';
import { dayRoutes } from '#server/http/day.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aBooking, aDraft, aJob, aMember, aShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
beforeAll(async () => {
  api = await testApi(dayRoutes, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());

const isRead = (sql: string): boolean => !/^(begin|commit|select set_config)/i.test(sql);

test('the day asks the same few questions of ten jobs and of a hundred', async () => {
  const { db } = api.deps;
  const shop = await aShop(db);
  const lead = await aMember(db, shop, { role: 'lead' });
  const fill = async (count: number) => {
    for (let i = 0; i < count; i++) {
      const job = await aJob(db, shop, { stages: [{}, {}, {}] });
      for (const [hour, stage] of job.stages.entries())
        await aBooking(db, shop, { stage, place: shop.rack, from: new Date(Date.UTC(2026, 2, 2, 8 + hour)) });
    }
  };
  const asked = async () => {
    const sent: string[] = [];
    const hear = (query: { sql: string }) => sent.push(query.sql);
    db.on('query', hear);
    const answer = await api
      .as(lead)
      .get(`/api/shops/${shop.id}/day?from=2026-03-02T05:00:00Z&to=2026-03-02T20:00:00Z&plan=draft`)
      .expect(200);
    db.off('query', hear);
    const view = answer.body as DayView;
    return { sent, shown: view.bars.length, unplaced: view.unplaced.length };
  };
  await fill(10);
  const few = await asked();
  expect(few.shown).toBe(30);
  await fill(90);
  const many = await asked();
  expect(many.shown).toBe(300);
  expect(many.sent).toEqual(few.sent);
  // who asks is one of them
  expect(many.sent.filter(isRead).length).toBeLessThanOrEqual(7);
  await aDraft(db, shop);
  const drafted = await asked();
  expect(drafted).toMatchObject({ sent: few.sent, shown: 0, unplaced: 100 });
});
