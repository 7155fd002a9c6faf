import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import type { Person, Shift } from '#contracts/people.ts';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aShop, type TestShop } from '../helpers/factories-jobs.ts';
import { makeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let shop: TestShop;
let agent: Agent;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
});
beforeEach(async () => {
  // Tuesday 2026-03-10, 14:00 in Amsterdam.
  shop = await aShop(app.deps.db);
  agent = await signedIn(app, await makeMember(app.owner, shop, { role: 'owner' }));
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const at = (more = '') => `/api/shops/${shop.id}/people${more}`;
const early: Shift = {
  startsLocal: '2026-03-09T07:00',
  rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
  minutes: 510,
  breaks: [{ after: 150, minutes: 15 }],
};
const fresh = { name: 'Tavi', skills: ['paint'], sprayTrainedOn: null, shifts: [early], memberId: null };
const roster = async () => (await agent.get(at()).expect(200)).body as { people: Person[] };
const painter = async (): Promise<Person> =>
  (await roster()).people.find(({ id }) => id === shop.painter) ?? expect.fail('no painter');

describe('as a file', () => {
  const csv = async () => ((await agent.get(at('-csv')).expect(200)).body as { csv: string }).csv;
  const take = async (text: string, tryOnly = false) =>
    (await agent.post(at('-csv')).send({ csv: text, tryOnly }).expect(200)).body as object;

  test('goes out and comes in again without a change', async () => {
    await agent.post(at()).send(fresh).expect(200);
    const out = await csv();
    expect(out.split('\r\n')[3]).toBe(`Tavi,paint,${',07:00-15:30 (09:30-09:45)'.repeat(5)},,`);
    expect(await take(out)).toEqual({ lines: 3, added: 0, changed: 0, faults: [] });
    expect(await csv()).toBe(out);
  });

  test('adds who is new, changes who is there, and leaves what it does not speak of', async () => {
    const file = 'Name;Skills;Monday\nPainter;paint;7-11\nSanva;polish, prep;8:00 to 12 (9-9:15)';
    expect(await take(file, true)).toEqual({ lines: 2, added: 1, changed: 1, faults: [] });
    expect((await roster()).people).toHaveLength(2);
    expect(await take(file)).toEqual({ lines: 2, added: 1, changed: 1, faults: [] });
    const { people } = await roster();
    expect(people.map(({ name, skills, shifts }) => [name, skills, shifts.map(({ rule }) => rule)])).toEqual([
      ['Painter', ['paint'], ['FREQ=WEEKLY;BYDAY=MO']],
      ['Helper', ['prep'], ['FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR']],
      ['Sanva', ['polish', 'prep'], ['FREQ=WEEKLY;BYDAY=MO']],
    ]);
    await take('name,skills\nSanva,prep');
    expect((await roster()).people[2]).toMatchObject({ skills: ['prep'], shifts: [{ minutes: 240 }] });
  });

  test('with one fault is not taken at all', async () => {
    const file = 'name,monday,spray trained on\nSanva,7-15,\nSanva,9-8-7,\nTavi,,31.12.2025';
    expect(await take(file)).toMatchObject({
      lines: 3,
      added: 0,
      changed: 0,
      faults: [
        { line: 3, column: 'monday' },
        { line: 4, column: 'spray trained on' },
      ],
    });
    expect((await roster()).people).toHaveLength(2);
    expect(await app.owner('change').where({ shop_id: shop.id })).toEqual([]);
  });

  test('hours that are more than a week stay as they are', async () => {
    const odd = { ...early, rule: 'FREQ=WEEKLY;INTERVAL=2;BYDAY=MO' };
    await agent
      .patch(at(`/${shop.helper}`))
      .send({ version: 1, shifts: [odd] })
      .expect(200);
    expect(await csv()).toContain('Helper,prep,,as they are,');
    expect(await take(await csv())).toMatchObject({ changed: 0 });
    expect((await roster()).people[1]?.shifts).toEqual([odd]);
  });

  test('absences go out and in by the shop’s clock', async () => {
    const path = `/api/shops/${shop.id}/absences-csv`;
    const file = 'person,from,to,reason\nPainter,2026-03-28,2026-03-29,"=fair, yes"\nhelper,2026-03-30 13:00,,\n';
    const send = (text: string) => agent.post(path).send({ csv: text, tryOnly: false }).expect(200);
    expect((await send(file)).body).toEqual({ lines: 2, added: 2, changed: 0, faults: [] });
    // The clocks go forward on 29 March: the second day has 23 hours.
    expect((await painter()).absences).toMatchObject([
      { from: '2026-03-27T23:00:00.000Z', to: '2026-03-29T22:00:00.000Z', reason: '=fair, yes' },
    ]);
    const { csv } = (await agent.get(path).expect(200)).body as { csv: string };
    expect(csv).toBe(
      `person,from,to,reason\r\nPainter,2026-03-28,2026-03-29,"'=fair, yes"\r\nHelper,2026-03-30 13:00,,\r\n`,
    );
    expect((await send(csv)).body).toMatchObject({ added: 0, faults: [] });
    expect((await send('person,from\nNobody,2026-03-01\nPainter,soon')).body.faults).toMatchObject([
      { line: 2, column: 'person' },
      { line: 3, column: 'from' },
    ]);
  });
});
