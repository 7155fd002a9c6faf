import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { emptySheet, type Coating } from '#contracts/coatings.ts';
import type { SheetDetail } from '#contracts/sheets.ts';
import { insertCoating } from '#server/db/coatings.ts';
import { inShop } from '#server/db/in-shop.ts';
import { sheetRoutes } from '#server/http/sheets.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aMember, aSheetBody, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
let shop: TestShop;
let other: TestShop;
let lead: string;
let painter: string;
beforeAll(async () => {
  api = await testApi(sheetRoutes, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aShop(api.deps.db);
  other = await aShop(api.deps.db);
  lead = await aMember(api.deps.db, shop, { role: 'lead' });
  painter = await aMember(api.deps.db, shop, { role: 'painter' });
});

const at = (rest = '') => `/api/shops/${shop.id}/process-sheets${rest}`;
const made = async (name = 'Wing', body = aSheetBody()): Promise<SheetDetail> =>
  (await api.as(lead).post(at()).send({ id: randomUUID(), name, body }).expect(200)).body;

describe('files', () => {
  const clear: Coating = { id: randomUUID(), name: 'Medium-solid clear', kind: 'clear', sheet: emptySheet };
  const withClear = (coatingId: string) =>
    aSheetBody({ stages: aSheetBody().stages.map((stage, i) => (i === 1 ? { ...stage, coatingId } : stage)) });
  const keep = (of: TestShop, coating: Coating) =>
    inShop(api.deps.db, { shopId: of.id, accountId: null }, (trx) => insertCoating(trx, of.id, coating));

  test('a sheet goes to another shop, where its coating has the same name and another id', async () => {
    await keep(shop, clear);
    const sheet = await made('Wing', withClear(clear.id));
    const { body: out } = await api
      .as(painter)
      .get(at(`/${sheet.id}/file`))
      .expect(200);
    expect(out.fileName).toBe('wing.json');
    expect(out.file.body.stages[1]).toMatchObject({ coating: 'Medium-solid clear' });
    expect(JSON.stringify(out.file)).not.toContain(clear.id);
    const theirLead = await aMember(api.deps.db, other, { role: 'lead' });
    const into = (id: string) =>
      api.as(theirLead).post(`/api/shops/${other.id}/process-sheet-imports`).send({ id, file: out.file });
    const { body: refused } = await into(randomUUID()).expect(400);
    expect(refused.error.fields).toEqual([
      { path: 'body.file.body.stages.1.coating', message: 'this shop has no coating “Medium-solid clear”' },
    ]);
    const theirs = { ...clear, id: randomUUID() };
    await keep(other, theirs);
    const id = randomUUID();
    const { body: first } = await into(id).expect(200);
    expect(first.body).toEqual(withClear(theirs.id));
    expect((await into(id).expect(200)).body).toEqual(first);
  });

  test('all sheets as a table, a line a phase, that a spreadsheet runs no formula from', async () => {
    await keep(shop, clear);
    const body = withClear(clear.id);
    await made('=Wing', {
      ...body,
      stages: body.stages.map((stage) => ({ ...stage, ways: [aWay({ id: 'a' }), aWay({ id: 'b' })] })),
    });
    const { body: out } = await api.as(painter).get(`/api/shops/${shop.id}/process-sheets-csv`).expect(200);
    const lines = (out.csv as string).trim().split('\r\n');
    expect(lines).toHaveLength(5);
    expect(lines[0]).toMatch(/sheet.*minutes/i);
    expect(lines[1]).toMatch(/^'=Wing,1,1,Prepare/);
    expect(lines[4]).toContain('Medium-solid clear');
  });
});
