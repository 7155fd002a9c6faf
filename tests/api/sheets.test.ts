import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { emptySheet, type Coating } from '#contracts/coatings.ts';
import { insertCoating } from '#server/db/coatings.ts';
import { inShop } from '#server/db/in-shop.ts';
import { sheetRoutes } from '#server/http/sheets.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aMember, aSheet, aSheetBody, aShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
beforeAll(async () => {
  api = await testApi(sheetRoutes, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());

const clear: Coating = {
  id: randomUUID(),
  name: 'Medium-solid clear',
  kind: 'clear',
  sheet: {
    ...emptySheet,
    coats: { from: 2, to: 2 },
    flashBetweenCoats: 10,
    flashBeforeNext: 0,
    flashBeforeHeat: 10,
    recoatWithin: null,
    potLife: 120,
    airDry: { minutes: 720, celsius: 20 },
    bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
    cautions: ['Isocyanate: air-fed breathing equipment.'],
  },
};

test('process sheets and coatings of the own shop, by name, without what is retired', async () => {
  const { db } = api.deps;
  const [shop, other] = [await aShop(db), await aShop(db)];
  const painter = await aMember(db, shop, { role: 'painter' });
  const second = await aSheet(db, shop, aSheetBody({ summary: 'second' }), 'B');
  const first = await aSheet(db, shop, aSheetBody({ summary: 'first' }), 'A');
  const retired = await aSheet(db, shop, aSheetBody(), 'C');
  await aSheet(db, other, aSheetBody(), 'Theirs');
  await inShop(db, { shopId: shop.id, accountId: null }, async (trx) => {
    await trx('process_sheet').where({ shop_id: shop.id, id: retired }).update({ retired_at: new Date() });
    await insertCoating(trx, shop.id, clear);
  });
  const sheets = await api.as(painter).get(`/api/shops/${shop.id}/process-sheets`).expect(200);
  expect(sheets.body.sheets).toMatchObject([
    { id: first, name: 'A', version: 1, body: aSheetBody({ summary: 'first' }) },
    { id: second, name: 'B', version: 1, body: aSheetBody({ summary: 'second' }) },
  ]);
  const coatings = await api.as(painter).get(`/api/shops/${shop.id}/coatings`).expect(200);
  expect(coatings.body).toEqual({ coatings: [clear] });
  await api.as(painter).get(`/api/shops/${other.id}/coatings`).expect(404);
});
