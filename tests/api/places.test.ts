import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { v7 as uuid } from 'uuid';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aBooking, aJob, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';
import { makeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let shop: TestShop;
let owner: Agent;
let at: string;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
});
beforeEach(async () => {
  shop = await aShop(app.deps.db);
  owner = await signedIn(app, await makeMember(app.owner, shop, { role: 'owner' }));
  at = `/api/shops/${shop.id}`;
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const booth = {
  kind: 'booth',
  name: 'Booth 9',
  zoneId: null,
  units: 4,
  bakes: true,
  bakeLimitCelsius: 80,
  volumeM3: 96,
  airFlowM3PerHour: 5000,
  clearanceMinutes: 5,
};
const changes = () => app.owner('change').where({ shop_id: shop.id, kind: 'shop-changed' });
const places = async () => (await owner.get(`${at}/places`).expect(200)).body.places as Record<string, unknown>[];

describe('a place', () => {
  test('is made with the purge that its volume and flow ask for (IFC 2018 ch. 24: 96 m3 at 5,000 m3/h, 4.608 min)', async () => {
    const { body } = await owner.post(`${at}/places`).send(booth).expect(200);
    expect(body).toMatchObject({
      clashes: [],
      place: { ...booth, version: 1, retired: false, purge: { minutes: 4.608, refused: null } },
    });
    expect((await places()).map(({ name }) => name)).toEqual(['Booth', 'Prep', 'Rack', 'Booth 9']);
    expect(await changes()).toMatchObject([{ ids: [body.place.id], detail: { place: 'Booth 9', added: true } }]);
  });

  test('without a known flow has no purge, and says what is missing', async () => {
    const { body } = await owner
      .post(`${at}/places`)
      .send({ ...booth, airFlowM3PerHour: null })
      .expect(200);
    expect(body.place.purge).toEqual({ minutes: null, refused: 'air-flow-unknown' });
  });

  test('sent twice with one key is made once', async () => {
    const key = uuid();
    const send = () => owner.post(`${at}/places`).set('Idempotency-Key', key).send(booth).expect(200);
    expect((await send()).body).toEqual((await send()).body);
    expect(await places()).toHaveLength(4);
  });

  test.each([
    [{ name: '' }, ['body.name']],
    [{ units: 0 }, ['body.units']],
    [{ bakeLimitCelsius: 140, volumeM3: -1 }, ['body.bakeLimitCelsius', 'body.volumeM3']],
    [{ name: 'booth' }, ['body.name']],
    [{ zoneId: uuid() }, ['body.zoneId']],
  ])('that is wrong is refused by field: %j', async (more, fields) => {
    const { body } = await owner
      .post(`${at}/places`)
      .send({ ...booth, ...more })
      .expect(400);
    expect((body.error.fields as { path: string }[]).map(({ path }) => path)).toEqual(fields);
    expect(await places()).toHaveLength(3);
  });

  test('is changed by who has seen it last; others are told how it stands', async () => {
    const path = `${at}/places/${shop.booth}`;
    const { body } = await owner.patch(path).send({ version: 1, units: 6 }).expect(200);
    expect(body.place).toMatchObject({ name: 'Booth', units: 6, version: 2 });
    const stale = await owner.patch(path).send({ version: 1, units: 8 }).expect(409);
    expect(stale.body.error).toMatchObject({ code: 'stale', current: { units: 6, version: 2 } });
    await owner.patch(path).send({ version: 1, units: 6 }).expect(200);
    expect(await changes()).toMatchObject([{ detail: { before: { units: 4 }, after: { units: 6 } } }]);
  });

  test('that no longer suits posted work tells which', async () => {
    const job = await aJob(app.deps.db, shop, {
      title: 'Door',
      parts: [{ name: 'Door', substrate: 'steel', units: 3 }],
    });
    await aBooking(app.deps.db, shop, {
      stage: job.stages[0] ?? '',
      place: shop.prep,
      person: shop.painter,
      from: new Date('2026-03-11T09:00:00Z'),
    });
    const { body } = await owner.patch(`${at}/places/${shop.prep}`).send({ version: 1, units: 2 }).expect(200);
    expect(body.place.units).toBe(2);
    expect(body.clashes).toMatchObject([
      { stageId: job.stages[0], jobNumber: job.number, jobTitle: 'Door', from: '2026-03-11T09:00:00.000Z' },
    ]);
    expect(body.clashes[0].reason).toMatchObject({ stageId: job.stages[0] });
  });

  test('is retired and brought back, but not while posted work stands in it', async () => {
    const job = await aJob(app.deps.db, shop, { title: 'Door' });
    await aBooking(app.deps.db, shop, {
      stage: job.stages[0] ?? '',
      place: shop.prep,
      from: new Date('2026-03-11T09:00:00Z'),
    });
    const refused = await owner.post(`${at}/places/${shop.prep}/retire`).send({ version: 1 }).expect(422);
    expect(refused.body.error.reasons).toMatchObject([
      {
        code: 'still-booked',
        stageId: job.stages[0],
        names: ['Prep', `${job.number} Door, Stage 1`],
        at: ['2026-03-11T09:00:00.000Z', '2026-03-11T10:00:00.000Z'],
        minutes: [1],
      },
    ]);
    const gone = await owner.post(`${at}/places/${shop.booth}/retire`).send({ version: 1 }).expect(200);
    expect(gone.body).toMatchObject({ retired: true, version: 2 });
    await owner.post(`${at}/places/${shop.booth}/bring-back`).send({ version: 1 }).expect(409);
    const back = await owner.post(`${at}/places/${shop.booth}/bring-back`).send({ version: 2 }).expect(200);
    expect(back.body.retired).toBe(false);
  });

  test('stands where the order puts it', async () => {
    await owner
      .post(`${at}/places-order`)
      .send({ placeIds: [shop.rack, shop.booth, shop.prep] })
      .expect(204);
    expect((await places()).map(({ name }) => name)).toEqual(['Rack', 'Booth', 'Prep']);
  });
});

describe('a zone', () => {
  test('is named, renamed, and taken away once no place is in it; its name may come back', async () => {
    const zone = (await owner.post(`${at}/zones`).send({ name: 'Quay' }).expect(200)).body;
    await owner.post(`${at}/zones`).send({ name: 'quay ' }).expect(400);
    await owner.patch(`${at}/places/${shop.prep}`).send({ version: 1, zoneId: zone.id }).expect(200);
    const held = await owner.delete(`${at}/zones/${zone.id}`).send({ version: 1 }).expect(422);
    expect(held.body.error.reasons).toMatchObject([{ code: 'still-used-by', names: ['Quay', 'Prep'] }]);
    await owner.patch(`${at}/places/${shop.prep}`).send({ version: 2, zoneId: null }).expect(200);
    const renamed = await owner.patch(`${at}/zones/${zone.id}`).send({ version: 1, name: 'Harbour' }).expect(200);
    expect(renamed.body).toEqual({ id: zone.id, name: 'Harbour', version: 2 });
    await owner.delete(`${at}/zones/${zone.id}`).send({ version: 1 }).expect(409);
    await owner.delete(`${at}/zones/${zone.id}`).send({ version: 2 }).expect(204);
    expect((await owner.get(`${at}/places`)).body.zones).toEqual([]);
    const back = await owner.post(`${at}/zones`).send({ name: 'Harbour' }).expect(200);
    expect(back.body.id).toBe(zone.id);
  });
});

describe('places as a file', () => {
  test('come back as they went out', async () => {
    await owner.post(`${at}/places`).send(booth).expect(200);
    const { body } = await owner.get(`${at}/places-csv`).expect(200);
    expect((body.csv as string).split('\r\n')[0]).toBe(
      'name,kind,zone,units,bakes,bake limit celsius,volume m3,air flow,clearance minutes',
    );
    const report = await owner.post(`${at}/places-csv`).send({ csv: body.csv, tryOnly: false }).expect(200);
    expect(report.body).toEqual({ lines: 4, added: 0, changed: 0, faults: [] });
  });

  test('are taken whole or not at all, with zones made on the way', async () => {
    const csv = 'name;kind;units;zone;volume m3\nPrep;prep;5;Bay;\nBooth 7;booth;4;Bay;96,5\n';
    const bad = await owner
      .post(`${at}/places-csv`)
      .send({ csv: `${csv}Booth 8;oven;4;;\n`, tryOnly: false })
      .expect(200);
    expect(bad.body).toMatchObject({ added: 0, changed: 0, faults: [{ line: 4, column: 'kind' }] });
    const tried = await owner.post(`${at}/places-csv`).send({ csv, tryOnly: true }).expect(200);
    expect(tried.body).toMatchObject({ added: 1, changed: 1, faults: [] });
    expect(await places()).toHaveLength(3);
    await owner.post(`${at}/places-csv`).send({ csv, tryOnly: false }).expect(200);
    expect(await places()).toMatchObject([{}, { name: 'Prep', units: 5 }, {}, { name: 'Booth 7', volumeM3: 96.5 }]);
    expect((await owner.get(`${at}/places`)).body.zones).toMatchObject([{ name: 'Bay' }]);
  });
});

describe('lamps and circuits', () => {
  const circuit = { name: 'Yard', kilowatts: 12, volts: 400, phases: 3, breakerAmperes: 32 };
  test('are made, changed and ordered', async () => {
    const made = (await owner.post(`${at}/circuits`).send(circuit).expect(200)).body.circuit;
    const lamp = { name: 'Lamp 2', circuitId: made.id, kilowatts: 6, wave: 'medium' };
    const second = (await owner.post(`${at}/lamps`).send(lamp).expect(200)).body.lamp;
    expect(second).toMatchObject({ ...lamp, version: 1, retired: false });
    await owner
      .post(`${at}/lamps`)
      .send({ ...lamp, name: 'LAMP 2' })
      .expect(400);
    await owner
      .post(`${at}/lamps`)
      .send({ ...lamp, name: 'Lamp 3', circuitId: uuid() })
      .expect(400);
    await owner.patch(`${at}/lamps/${second.id}`).send({ version: 1, kilowatts: 5 }).expect(200);
    await owner.patch(`${at}/lamps/${second.id}`).send({ version: 1, kilowatts: 4 }).expect(409);
    await owner
      .post(`${at}/lamps-order`)
      .send({ lampIds: [second.id, shop.lamp] })
      .expect(204);
    const { body } = await owner.get(`${at}/lamps`).expect(200);
    expect(body.lamps).toMatchObject([{ name: 'Lamp 2', kilowatts: 5 }, { name: 'Lamp' }]);
    const held = await owner.delete(`${at}/circuits/${made.id}`).send({ version: 1 }).expect(422);
    expect(held.body.error.reasons).toMatchObject([{ code: 'still-used-by', names: ['Yard', 'Lamp 2'] }]);
  });

  test('a circuit that carries less than what burns on it tells which work clashes', async () => {
    const lampWay = aWay({
      id: 'lamp',
      lampCount: 1,
      bakeCelsius: 60,
      phases: [{ kind: 'bake', minutes: 30, attendance: 'none', lamp: true }],
      skill: null,
    });
    const job = await aJob(app.deps.db, shop, { stages: [{ ways: [lampWay] }] });
    await aBooking(app.deps.db, shop, {
      stage: job.stages[0] ?? '',
      place: shop.prep,
      way: 'lamp',
      lamps: [shop.lamp],
      from: new Date('2026-03-11T09:00:00Z'),
      phases: [30],
    });
    const { circuits } = (await owner.get(`${at}/lamps`).expect(200)).body;
    const { body } = await owner
      .patch(`${at}/circuits/${circuits[0].id}`)
      .send({ version: 1, kilowatts: 5 })
      .expect(200);
    expect(body.clashes).toMatchObject([{ stageId: job.stages[0], reason: { code: 'circuit-full' } }]);
    const refused = await owner.post(`${at}/lamps/${shop.lamp}/retire`).send({ version: 1 }).expect(422);
    expect(refused.body.error.reasons).toMatchObject([{ code: 'still-booked', stageId: job.stages[0] }]);
  });

  test('lamps as a file name a circuit that is there', async () => {
    const out = (await owner.get(`${at}/lamps-csv`).expect(200)).body.csv;
    expect(out).toBe('name,circuit,kilowatts,wave\r\nLamp,Circuit,6,short\r\n');
    const csv = 'name,circuit,kilowatts\nLamp,Circuit,5.5\nLamp 2,Nowhere,3\n';
    const bad = await owner.post(`${at}/lamps-csv`).send({ csv, tryOnly: false }).expect(200);
    expect(bad.body.faults).toMatchObject([{ line: 3, column: 'circuit' }]);
    const good = await owner.post(`${at}/lamps-csv`).send({ csv: csv.replace('Nowhere', 'circuit'), tryOnly: false });
    expect(good.body).toMatchObject({ added: 1, changed: 1, faults: [] });
  });
});
