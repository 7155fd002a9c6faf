import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aBooking, aJob, aShop, aWay, type TestShop } from '../helpers/factories-jobs.ts';
import { makeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let shop: TestShop;
let owner: Agent;
let painter: Agent;
let at: string;
beforeAll(async () => {
  database = await freshDatabase();
  // Tuesday 10 March 2026, 14:00 in Amsterdam.
  app = await testApp(database);
});
beforeEach(async () => {
  shop = await aShop(app.deps.db);
  owner = await signedIn(app, await makeMember(app.owner, shop, { role: 'owner' }));
  painter = await signedIn(app, await makeMember(app.owner, shop, { role: 'painter', name: 'Tove' }));
  at = `/api/shops/${shop.id}`;
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const exhaust = () => ({
  placeId: shop.booth,
  name: 'Exhaust',
  changeAfterHours: 10,
  changeAfterDays: null,
  pascalLimit: 150,
  efficiencyPercent: 98,
});
const made = async (more: object = {}) =>
  (
    await owner
      .post(`${at}/filters`)
      .send({ ...exhaust(), ...more })
      .expect(200)
  ).body;
const note = (filterId: string, more: object, by = painter) =>
  by
    .post(`${at}/filters/${filterId}/entries`)
    .send({ id: uuid(), kind: 'change', at: '2026-03-01T08:00:00Z', pascals: null, note: '', ...more });

const sprayWay = aWay({
  id: 'spray',
  placeKinds: ['booth'],
  phases: [
    { kind: 'setup', minutes: 15, attendance: 'hands' },
    { kind: 'spray', minutes: 60, attendance: 'hands' },
    { kind: 'flash', minutes: 20, attendance: 'none' },
    { kind: 'spray', minutes: 30, attendance: 'hands' },
  ],
});
/** A stage sprayed in the booth for an hour and a half, tapped done. */
async function sprayed(from: string, load?: string) {
  const job = await aJob(app.deps.db, shop, { stages: [{ ways: [sprayWay] }] });
  const stage = job.stages[0] ?? '';
  const id = await aBooking(app.deps.db, shop, {
    stage,
    place: shop.booth,
    way: 'spray',
    from: new Date(from),
    phases: [15, 60, 20, 30],
    ...(load === undefined ? {} : { load }),
  });
  await app.owner('booking').where({ id }).update({ state: 'done' });
  await app.owner('stage').where({ id: stage }).update({ state: 'done', started_at: from, finished_at: from });
}

describe('a filter', () => {
  test('counts hours of spraying from its last change on, a shared booth run once', async () => {
    const filter = await made();
    expect(filter.standing).toMatchObject({ state: 'never-changed', sprayHours: 0, dueOn: null });
    await sprayed('2026-02-20T08:00:00Z');
    await note(filter.id, { at: '2026-03-01T08:00:00Z' }).expect(200);
    await sprayed('2026-03-03T08:00:00Z');
    const load = uuid();
    await sprayed('2026-03-04T08:00:00Z', load);
    await sprayed('2026-03-04T08:00:00Z', load);
    const [seen] = (await painter.get(`${at}/filters`).expect(200)).body.filters;
    // 1.5 h on each of two runs since the change; 4.5 h in the last four weeks.
    expect(seen.standing).toMatchObject({ state: 'good', sprayHours: 3, hoursPerDay: 0.2 });
    // 7 h are left at 4.5 h in 28 days: 43.6 days from 10 March.
    expect(seen.standing.dueOn).toBe('2026-04-23');
    expect(seen.entries).toMatchObject([{ kind: 'change', by: 'Tove', at: '2026-03-01T08:00:00.000Z' }]);
  });

  test('is due by its hours, by its days, or by its pressure whatever the calendar says', async () => {
    const byHours = await made({ changeAfterHours: 1 });
    await note(byHours.id, {}).expect(200);
    await sprayed('2026-03-03T08:00:00Z');
    const byDays = await made({ name: 'Ceiling', changeAfterHours: null, changeAfterDays: 14, pascalLimit: null });
    await note(byDays.id, {}).expect(200);
    const byPressure = await made({ name: 'Floor', changeAfterHours: null });
    await note(byPressure.id, {}).expect(200);
    const read = await note(byPressure.id, { kind: 'pressure', at: '2026-03-09T08:00:00Z', pascals: 151 }).expect(200);
    expect(read.body.standing).toMatchObject({ state: 'due', because: 'pressure', pascals: 151 });
    const { filters } = (await owner.get(`${at}/filters`).expect(200)).body as {
      filters: { name: string; standing: object }[];
    };
    const standing = (name: string) => filters.find((one) => one.name === name)?.standing;
    expect(standing('Exhaust')).toMatchObject({ state: 'due', because: 'hours', dueOn: '2026-03-10' });
    // 14 days after 1 March is the 15th, five days ahead.
    expect(standing('Ceiling')).toMatchObject({ state: 'soon', because: 'days', dueOn: '2026-03-15' });
    // A change takes the old reading with it.
    const changed = await note(byPressure.id, { at: '2026-03-10T09:00:00Z', pascals: 60 }).expect(200);
    expect(changed.body.standing).toMatchObject({ state: 'good', pascals: 60 });
  });

  test('has entries by whoever works in the bay, each once, struck out by who plans', async () => {
    const filter = await made();
    const entry = { id: uuid(), kind: 'pressure', pascals: 120, note: 'After lunch' };
    await note(filter.id, entry).expect(200);
    const twice = await note(filter.id, entry).expect(200);
    expect(twice.body.entries).toHaveLength(1);
    await note(filter.id, { kind: 'pressure', pascals: null }).expect(400);
    await note(filter.id, { at: '2026-03-11T08:00:00Z' }).expect(400);
    await painter.delete(`${at}/filters/${filter.id}/entries/${entry.id}`).expect(403);
    const gone = await owner.delete(`${at}/filters/${filter.id}/entries/${entry.id}`).expect(200);
    expect(gone.body.entries).toEqual([]);
    await owner.delete(`${at}/filters/${filter.id}/entries/${entry.id}`).expect(404);
  });

  test('is changed by who has seen it last, retired and brought back', async () => {
    const filter = await made();
    const path = `${at}/filters/${filter.id}`;
    await owner
      .post(`${at}/filters`)
      .send({ ...exhaust(), name: 'exhaust' })
      .expect(400);
    await owner.patch(path).send({ version: 1, pascalLimit: 200 }).expect(200);
    const stale = await owner.patch(path).send({ version: 1, pascalLimit: 250 }).expect(409);
    expect(stale.body.error.current).toMatchObject({ pascalLimit: 200, version: 2 });
    expect((await owner.patch(path).send({ version: 2, retired: true }).expect(200)).body.retired).toBe(true);
    expect((await owner.patch(path).send({ version: 3, retired: false }).expect(200)).body.retired).toBe(false);
  });
});
