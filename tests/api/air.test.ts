import psychrolib from 'psychrolib';
import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { AirView, Reading } from '#contracts/air.ts';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aShop, type TestShop } from '../helpers/factories-jobs.ts';
import { aZone, figures } from '../helpers/factories-air.ts';
import { makeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let shop: TestShop;
let zone: { id: string; name: string };
let painter: Agent;
let lead: Agent;
let office: Agent;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  shop = await aShop(app.deps.db);
  zone = await aZone(app.owner, shop, { name: 'Quay bay', places: [shop.prep] });
  painter = await signedIn(app, await makeMember(app.owner, shop, { role: 'painter' }));
  lead = await signedIn(app, await makeMember(app.owner, shop, { role: 'lead' }));
  office = await signedIn(app, await makeMember(app.owner, shop, { role: 'office' }));
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const air = () => `/api/shops/${shop.id}/air`;
const readings = (id = zone.id) => `${air()}/zones/${id}/readings`;
const look = async (): Promise<AirView> => (await painter.get(air()).expect(200)).body as AirView;
const stored = (where: object) => app.owner('air_reading').where({ shop_id: shop.id, ...where });

describe('a reading by hand', () => {
  test('is the latest of its zone, with dew point and margin by the shop’s gate', async () => {
    const body = figures({ celsius: 25, humidity: 80, surfaceCelsius: 24 });
    const answer = await painter.post(readings()).send(body).expect(200);
    expect(answer.body).toEqual({ written: 1, duplicate: 0 });
    const [seen] = (await look()).zones;
    expect(seen).toMatchObject({
      name: 'Quay bay',
      places: ['Prep'],
      latest: { ...body, at: '2026-03-10T12:45:00.000Z', source: 'hand' },
    });
    // psychrolib (ASHRAE Handbook Fundamentals 2017): 25 C, 80 %: 21.309 C. The Magnus form stays within 0.15 C of it.
    psychrolib.SetUnitSystem(psychrolib.SI);
    const dew = psychrolib.GetTDewPointFromRelHum(25, 0.8);
    expect(dew).toBeCloseTo(21.309, 2);
    expect(Math.abs((seen?.gate?.dewPointCelsius ?? 0) - dew)).toBeLessThan(0.15);
    expect(seen?.gate).toMatchObject({ open: false, fresh: true, surfaceMeasured: true, neededCelsius: 3 });
  });

  test('sent again is written once; another reading under its id is refused', async () => {
    const body = figures({ celsius: 19.5 });
    await painter.post(readings()).send(body).expect(200);
    expect((await painter.post(readings()).send(body).expect(200)).body).toEqual({ written: 0, duplicate: 1 });
    for (const other of [{ celsius: 19.6 }, { at: '2026-03-10T12:46:00Z' }, { surfaceCelsius: 19 }]) {
      const refused = await painter
        .post(readings())
        .send({ ...body, ...other })
        .expect(409);
      expect(refused.body).toEqual({ error: { code: 'taken' } });
    }
    expect(await stored({ id: body.id })).toHaveLength(1);
  });

  test('five at once with one id: one row', async () => {
    const body = figures({ celsius: 18 });
    const answers = await Promise.all(Array.from({ length: 5 }, () => painter.post(readings()).send(body)));
    expect(answers.map(({ status }) => status)).toEqual(Array(5).fill(200));
    expect(answers.filter((answer) => (answer.body as { written: number }).written === 1)).toHaveLength(1);
    expect(await stored({ id: body.id })).toHaveLength(1);
  });

  test.each([
    [{ celsius: 60.1 }, 'body.celsius'],
    [{ celsius: -20.1 }, 'body.celsius'],
    [{ humidity: 100.1 }, 'body.humidity'],
    [{ humidity: -1 }, 'body.humidity'],
    [{ surfaceCelsius: 121 }, 'body.surfaceCelsius'],
    [{ at: '2026-03-10T13:16:00Z' }, 'body.at'],
    [{ at: 'noon' }, 'body.at'],
    [{ id: 'one' }, 'body.id'],
  ])('%o is refused', async (wrong, path) => {
    const answer = await painter
      .post(readings())
      .send({ ...figures(), ...wrong })
      .expect(400);
    expect((answer.body as { error: { fields: { path: string }[] } }).error.fields[0]?.path).toBe(path);
  });

  test('quite dry air has no dew point, and nothing sweats in it', async () => {
    await painter
      .post(readings())
      .send(figures({ at: '2026-03-10T12:59:00Z', humidity: 0 }))
      .expect(200);
    expect((await look()).zones[0]?.gate).toMatchObject({ open: true, dewPointCelsius: null, marginCelsius: null });
  });

  test('live screens are told', async () => {
    await painter.post(readings()).send(figures()).expect(200);
    const last = await app
      .owner('change')
      .where({ shop_id: shop.id })
      .orderBy('seq', 'desc')
      .first<object>('kind', 'ids');
    expect(last).toEqual({ kind: 'air-read', ids: [zone.id] });
  });
});

describe('a span of readings', () => {
  const day = (from: string, to: string) => `?from=${encodeURIComponent(from)}&to=${encodeURIComponent(to)}`;
  test('longer than 600 keeps its extremes and only real readings', async () => {
    const hall = await aZone(app.owner, shop);
    const rows = Array.from({ length: 3000 }, (_, i) => ({
      shop_id: shop.id,
      id: uuid(),
      zone_id: hall.id,
      at: new Date(Date.UTC(2026, 1, 1) + i * 60_000),
      celsius: i === 1234 ? 3.5 : 20 + Math.sin(i / 100),
      humidity: i === 2222 ? 97 : 50 + Math.cos(i / 90),
      surface_celsius: null,
      source: 'key',
    }));
    await app.owner.batchInsert('air_reading', rows, 500);
    const { body } = await office
      .get(`${readings(hall.id)}${day('2026-02-01T00:00:00Z', '2026-02-04T00:00:00Z')}`)
      .expect(200);
    const { total, readings: sent } = body as { total: number; readings: Reading[] };
    expect(total).toBe(3000);
    expect(sent.length).toBeLessThanOrEqual(600);
    expect(sent.length).toBeGreaterThan(200);
    const ids = new Set(rows.map(({ id }) => id));
    expect(sent.every(({ id }) => ids.has(id))).toBe(true);
    expect(Math.min(...sent.map(({ celsius }) => celsius))).toBe(3.5);
    expect(Math.max(...sent.map(({ humidity }) => humidity))).toBe(97);
    expect(sent.map(({ at }) => at)).toEqual(sent.map(({ at }) => at).toSorted());
  });

  test('is half open, and must be one', async () => {
    const hall = await aZone(app.owner, shop);
    for (const at of ['2026-03-01T00:00:00Z', '2026-03-02T00:00:00Z'])
      await painter.post(readings(hall.id)).send(figures({ at })).expect(200);
    const { body } = await office
      .get(`${readings(hall.id)}${day('2026-03-01T00:00:00Z', '2026-03-02T00:00:00Z')}`)
      .expect(200);
    expect((body as { total: number }).total).toBe(1);
    await office.get(`${readings(hall.id)}${day('2026-03-02T00:00:00Z', '2026-03-01T00:00:00Z')}`).expect(400);
    await office.get(`${readings(hall.id)}${day('2026-01-01T00:00:00Z', '2026-06-01T00:00:00Z')}`).expect(400);
  });
});

describe('a file of readings', () => {
  const send = (csv: string, tryOnly = false) =>
    lead.post(`${air()}/readings/import`).send({ csv, tryOnly }).expect(200);
  const file = (...lines: string[]) => ['zone;at;celsius;humidity;surface celsius', ...lines].join('\r\n');

  test('comes in whole, by the shop’s clock, with decimal commas; the same file again adds nothing', async () => {
    const hall = await aZone(app.owner, shop, { name: 'Hall' });
    // Amsterdam is an hour ahead of UTC on 2 March.
    const csv = file('Hall;2026-03-02 08:00;16,5;71;13', 'hall;2026-03-02T08:30:00Z;17;65;');
    expect((await send(csv, true)).body).toEqual({ lines: 2, added: 2, changed: 0, faults: [] });
    expect(await stored({ zone_id: hall.id })).toEqual([]);
    expect((await send(csv)).body).toEqual({ lines: 2, added: 2, changed: 0, faults: [] });
    expect((await send(csv)).body).toEqual({ lines: 2, added: 0, changed: 0, faults: [] });
    const rows = await stored({ zone_id: hall.id })
      .orderBy('at')
      .select<object[]>('at', 'celsius', 'humidity', 'surface_celsius', 'source');
    expect(rows).toEqual([
      { at: new Date('2026-03-02T07:00:00Z'), celsius: 16.5, humidity: 71, surface_celsius: 13, source: 'csv' },
      { at: new Date('2026-03-02T08:30:00Z'), celsius: 17, humidity: 65, surface_celsius: null, source: 'csv' },
    ]);
  });

  test('with a bad line is not taken at all, and every fault is named', async () => {
    const before = await stored({}).count<{ count: string }[]>();
    const { body } = await send(
      file('Quay bay;2026-03-02 08:00;20;50;', 'Nowhere;2026-03-02 09:00;20;50;', 'Quay bay;2026-03-02 10:00;99;50;'),
    );
    // The cells are read first: a file with a cell that is none is not looked at further.
    expect(body).toMatchObject({ lines: 3, added: 0, faults: [{ line: 4, column: 'celsius' }] });
    const again = await send(
      file('Quay bay;2026-03-02 08:00;20;50;', 'Nowhere;2026-03-02 09:00;20;50;', 'Quay bay;soon;20;50;'),
    );
    expect(again.body).toMatchObject({
      added: 0,
      faults: [
        { line: 3, column: 'zone' },
        { line: 4, column: 'at' },
      ],
    });
    expect(await stored({}).count()).toEqual(before);
  });

  test('goes out as it comes in', async () => {
    const { body } = await office.get(`${air()}/readings/export`).expect(200);
    const { csv } = body as { csv: string };
    expect(csv.split('\r\n')[0]).toBe('zone,at,celsius,humidity,surface celsius,id');
    expect(csv).toContain('Hall,2026-03-02T07:00:00.000Z,16.5,71,13,');
    expect((await send(csv)).body).toMatchObject({ added: 0, faults: [] });
  });
});

describe('where the planner takes its air from', () => {
  const put = (body: object, agent = lead) => agent.patch(`${air()}/zones/${zone.id}`).send(body);
  test('a schedule by hour, at the shop’s hour', async () => {
    const schedule = [
      { fromHour: 6, toHour: 12, celsius: 14, humidity: 70 },
      { fromHour: 12, toHour: 18, celsius: 18, humidity: 60 },
    ];
    // 13:00Z is 14:00 in Amsterdam.
    const { body } = await put({ version: 0, source: 'schedule', schedule: schedule.toReversed() }).expect(200);
    const [seen] = (body as AirView).zones.filter(({ id }) => id === zone.id);
    expect(seen).toMatchObject({ version: 1, source: 'schedule', schedule, expected: { celsius: 18, humidity: 60 } });
    const stale = await put({ version: 0, source: 'latest', schedule: [] }).expect(409);
    expect((stale.body as { error: { code: string } }).error.code).toBe('stale');
    const latest = await put({ version: 1, source: 'latest', schedule: [] }).expect(200);
    const now = (latest.body as AirView).zones.find(({ id }) => id === zone.id);
    expect(now?.expected).toEqual({ celsius: now?.latest?.celsius, humidity: now?.latest?.humidity });
  });

  test('rows that overlap, end before they begin or are missing are refused', async () => {
    const row = { fromHour: 6, toHour: 12, celsius: 14, humidity: 70 };
    for (const schedule of [[row, { ...row, fromHour: 11, toHour: 13 }], [{ ...row, toHour: 6 }], []])
      await put({ version: 2, source: 'schedule', schedule }).expect(400);
    await put({ version: 2, source: 'default', schedule: [] }, painter).expect(403);
  });

  test('the shop’s settings: version by version, and never less than 3.0 C of margin', async () => {
    const { settings } = await look();
    expect(settings).toMatchObject({
      version: 0,
      defaultCelsius: 20,
      staleCelsius: 3,
      freshMinutes: 120,
      marginCelsius: 3,
    });
    const patch = (body: object) => lead.patch(`${air()}/settings`).send(body);
    await patch({ ...settings, marginCelsius: 2.78 }).expect(400);
    const set = await patch({ ...settings, defaultCelsius: 17, marginCelsius: 4 }).expect(200);
    expect((set.body as AirView).settings).toMatchObject({ version: 1, defaultCelsius: 17, marginCelsius: 4 });
    await patch({ ...settings, defaultCelsius: 18 }).expect(409);
    await patch({ ...settings, version: 1, marginCelsius: 3, defaultCelsius: 20 }).expect(200);
  });
});

test('the table grows by months, and old readings have a place too', async () => {
  const { rows } = await app.owner.raw<{ rows: { name: string }[] }>(
    `select inhrelid::regclass::text as name from pg_inherits where inhparent = 'air_reading'::regclass order by 1`,
  );
  expect(rows.map(({ name }) => name)).toContain('air_reading_other');
  expect(rows.length).toBeGreaterThanOrEqual(5);
  await expect(app.deps.db.raw('select make_air_partitions(3)')).resolves.toBeDefined();
});
