import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { Coating } from '#contracts/coatings.ts';
import { insertCoating } from '#server/db/coatings.ts';
import { inShop } from '#server/db/in-shop.ts';
import { coatingRoutes } from '#server/http/coatings.ts';
import { sheetRoutes } from '#server/http/sheets.ts';
import { testApi, type TestApi } from '../helpers/api-as.ts';
import { aNewCoating, clear } from '../helpers/coatings.ts';
import { aMember, aShop, type TestShop } from '../helpers/factories-jobs.ts';

let api: TestApi;
let shop: TestShop;
let lead: string;
let painter: string;
beforeAll(async () => {
  api = await testApi((routes, deps) => {
    coatingRoutes(routes, deps);
    sheetRoutes(routes, deps);
  }, '2026-03-02T08:00:00Z');
});
afterAll(() => api.close());
beforeEach(async () => {
  shop = await aShop(api.deps.db);
  lead = await aMember(api.deps.db, shop, { role: 'lead' });
  painter = await aMember(api.deps.db, shop, { role: 'painter' });
});

const at = (path = '') => `/api/shops/${shop.id}/coatings${path}`;
const put = (coating = aNewCoating()) => api.as(lead).post(at()).send(coating).expect(200);
const names = async (retired = 'no') => {
  const { body } = await api.as(lead).get(`/api/shops/${shop.id}/coating-survey?retired=${retired}`).expect(200);
  return (body.coatings as Coating[]).map(({ name }) => name);
};

describe('a data sheet', () => {
  test('is made once however often it is sent, read by everybody, kept by leads and owners', async () => {
    const coating = aNewCoating();
    const made = await put(coating);
    expect(made.body).toEqual({ ...coating, version: 1, retiredAt: null, document: null, usedBy: [] });
    expect((await put(coating)).body).toEqual(made.body);
    await api
      .as(lead)
      .post(at())
      .send({ ...coating, kind: 'primer' })
      .expect(409);
    expect(
      (
        await api
          .as(painter)
          .get(at(`/${coating.id}`))
          .expect(200)
      ).body,
    ).toEqual(made.body);
    await api
      .as(painter)
      .post(at())
      .send(aNewCoating({ name: 'Mine' }))
      .expect(403);
    await api
      .as(painter)
      .patch(at(`/${coating.id}`))
      .send({ version: 1, name: 'Mine' })
      .expect(403);
    expect(await names()).toEqual([coating.name]);
  });

  test('sent five times with one key, two at once, is one', async () => {
    const coating = aNewCoating();
    const send = () => api.as(lead).post(at()).set('Idempotency-Key', 'one-sheet-1').send(coating).expect(200);
    const answers = [...(await Promise.all([send(), send()])), await send(), await send(), await send()];
    for (const { body } of answers) expect(body).toEqual(answers[0]?.body);
    expect(await names()).toHaveLength(1);
  });

  test('is changed with its version; who has an old one is told how it stands', async () => {
    const { id, name } = (await put()).body;
    const sheet = { ...clear, flashBetweenCoats: 12 };
    const changed = await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, sheet })
      .expect(200);
    expect(changed.body).toMatchObject({ version: 2, name, sheet });
    // The same once more changes nothing, whatever the version.
    expect(
      (
        await api
          .as(lead)
          .patch(at(`/${id}`))
          .send({ version: 1, sheet })
          .expect(200)
      ).body.version,
    ).toBe(2);
    const stale = await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, name: 'Other' })
      .expect(409);
    expect(stale.body.error).toMatchObject({ code: 'stale', current: changed.body });
    const history = await inShop(api.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
      trx('change').where({ shop_id: shop.id, kind: 'sheets-changed' }).orderBy('seq').select('detail'),
    );
    expect((history as { detail: { coating: string } }[]).map(({ detail }) => detail.coating)).toEqual([
      'made',
      'changed',
    ]);
    expect(history[1].detail.before.sheet.flashBetweenCoats).toBe(10);
  });

  test('is taken out of use and brought back, and keeps its name meanwhile', async () => {
    const { id, name } = (await put()).body as Coating;
    const retired = await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 1, retired: true })
      .expect(200);
    expect(retired.body.retiredAt).toBe('2026-03-02T08:00:00.000Z');
    expect([await names(), await names('yes')]).toEqual([[], [name]]);
    expect((await api.as(lead).get(at()).expect(200)).body.coatings).toEqual([]);
    const taken = await api
      .as(lead)
      .post(at())
      .send(aNewCoating({ name: name.toUpperCase() }))
      .expect(400);
    expect(taken.body.error.fields).toEqual([{ path: 'body.name', message: 'another data sheet has this name' }]);
    await api
      .as(lead)
      .patch(at(`/${id}`))
      .send({ version: 2, retired: false })
      .expect(200);
    expect(await names()).toEqual([name]);
  });

  test.each<[string, object, string]>([
    ['fewer coats at most than at least', { coats: { from: 3, to: 2 } }, 'body.sheet.coats'],
    ['a window that ends before it begins', { flashBeforeNext: 20, recoatWithin: 10 }, 'body.sheet.recoatWithin'],
    ['a bake above the own limit', { heatLimitCelsius: 55 }, 'body.sheet.bake'],
    ['a turned range', { holds: { from: 30, to: 15 } }, 'body.sheet.holds'],
    ['a time that is none', { flashBetweenCoats: -1 }, 'body.sheet.flashBetweenCoats'],
    ['half a line', { airDry: { minutes: 10 } }, 'body.sheet.airDry.celsius'],
    ['what no sheet has', { colour: 'red' }, 'body.sheet'],
  ])('is refused for %s', async (_, given, path) => {
    const answer = await api
      .as(lead)
      .post(at())
      .send({ ...aNewCoating(), sheet: { ...clear, ...given } })
      .expect(400);
    expect((answer.body.error.fields as { path: string }[]).map((field) => field.path)).toContain(path);
    expect(await names()).toEqual([]);
  });

  test('of another shop is the same as one that does not exist', async () => {
    const other = await aShop(api.deps.db);
    const theirs = aNewCoating();
    await inShop(api.deps.db, { shopId: other.id, accountId: null }, (trx) => insertCoating(trx, other.id, theirs));
    for (const id of [theirs.id, randomUUID()]) {
      await api
        .as(lead)
        .get(at(`/${id}`))
        .expect(404);
      await api
        .as(lead)
        .get(at(`/${id}/touched`))
        .expect(404);
      await api
        .as(lead)
        .patch(at(`/${id}`))
        .send({ version: 1, name: 'Mine' })
        .expect(404);
      await api
        .as(lead)
        .post(at(`/${id}/retime`))
        .send({ version: 1, sheetIds: [randomUUID()], jobIds: [] })
        .expect(404);
    }
  });

  test('stored before lamps had a line each is read with both', async () => {
    const id = randomUUID();
    const { lampShort: _, lampMedium: _m, maker: _n, ...old } = clear;
    await inShop(api.deps.db, { shopId: shop.id, accountId: null }, (trx) =>
      trx('coating').insert({
        shop_id: shop.id,
        id,
        name: 'Old',
        kind: 'topcoat',
        sheet: JSON.stringify({ ...old, lamp: { minutes: 25, wave: 'medium', metres: 0.8 } }),
      }),
    );
    const { body } = await api
      .as(lead)
      .get(at(`/${id}`))
      .expect(200);
    expect(body).toMatchObject({ kind: 'other', sheet: { ...clear, lampMedium: { minutes: 25, metres: 0.8 } } });
  });
});

describe('as CSV', () => {
  const importIt = (csv: string, tryOnly = false) =>
    api.as(lead).post(`/api/shops/${shop.id}/coating-imports`).send({ csv, tryOnly }).expect(200);
  const exported = async (): Promise<string> =>
    (await api.as(painter).get(`/api/shops/${shop.id}/coatings-csv`).expect(200)).body.csv;

  test('goes out and comes in again without a change, into another shop whole', async () => {
    const primer = aNewCoating({
      name: '=Primer, "grey"',
      kind: 'primer',
      sheet: {
        ...clear,
        maker: 'Can of the shelf',
        lampShort: { minutes: 20, metres: 0.75 },
        holds: { from: 15, to: 30 },
        coldAir: { belowCelsius: 18, factor: 1.25 },
        bake: { minutes: 30, celsius: 60, measuredAt: 'air', heatUp: 5 },
        cautions: ['First, second.', 'Third'],
      },
    });
    await put(aNewCoating());
    await put(primer);
    const csv = await exported();
    expect((await importIt(csv)).body).toEqual({ lines: 2, added: 0, changed: 0, faults: [] });
    shop = await aShop(api.deps.db);
    lead = await aMember(api.deps.db, shop, { role: 'lead' });
    painter = lead;
    expect((await importIt(csv, true)).body).toMatchObject({ added: 2 });
    expect(await names()).toEqual([]);
    expect((await importIt(csv)).body).toMatchObject({ added: 2, faults: [] });
    expect(await exported()).toBe(csv);
  });

  test('changes what the file speaks of: an empty cell takes a figure off, a missing column leaves it', async () => {
    const { id } = (await put()).body;
    const csv = 'name;kind;flash between coats;air minutes;air celsius\r\nMEDIUM-SOLID CLEAR;clear;12;;\r\n';
    expect((await importIt(csv)).body).toEqual({ lines: 1, added: 0, changed: 1, faults: [] });
    const { body } = await api
      .as(lead)
      .get(at(`/${id}`))
      .expect(200);
    expect(body.sheet).toEqual({ ...clear, flashBetweenCoats: 12, airDry: null });
  });

  test('is taken whole or not at all, with every fault at its line and column', async () => {
    await put(aNewCoating({ name: 'Kept' }));
    const rows = [
      'name,kind,coats from,coats to,flash between coats,bake minutes,bake celsius,bake measured at',
      'Fine,clear,1,2,10,,,',
      'Odd kind,lacquer,1,2,10,,,',
      'Half a bake,clear,1,2,10,30,,metal',
      'Turned,clear,3,2,10,,,',
      'No flash,clear,1,2,,,,',
      'Fine,clear,1,2,10,,,',
    ];
    const { body } = await importIt(rows.join('\n'));
    expect(body).toMatchObject({ lines: 6, added: 0, changed: 0 });
    expect((body.faults as { line: number; column: string }[]).map(({ line, column }) => [line, column])).toEqual([
      [3, 'kind'],
      [4, 'bake celsius'],
      [5, null],
      [6, 'flash between coats'],
      [7, 'name'],
    ]);
    expect(await names()).toEqual(['Kept']);
  });
});
