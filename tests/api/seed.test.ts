import { verify } from '@node-rs/argon2';
import type { Knex } from 'knex';
import { afterEach, describe, expect, test } from 'vitest';
import { coating } from '#contracts/coatings.ts';
import { sheetBody } from '#contracts/sheets.ts';
import { connect } from '#server/db/connect.ts';
import { inShop, type Trx } from '#server/db/in-shop.ts';
import { listCoatings } from '#server/db/coatings.ts';
import { listJobs } from '#server/db/job-list.ts';
import { loadResources } from '#server/db/resources.ts';
import { listSheets } from '#server/db/sheets.ts';
import { openSpans } from '#server/planning/calendars.ts';
import { loadFacts } from '#server/planning/facts.ts';
import { judge } from '#server/planning/judge.ts';
import { frameOf } from '#server/planning/problem/build-problem.ts';
import signIns from '../../seeds/demo-sign-ins.json' with { type: 'json' };
import { demoShopId, seedDemo } from '../../seeds/index.ts';
import { freshDatabase } from '../helpers/database.ts';

const closing: (() => Promise<void>)[] = [];
afterEach(async () => {
  for (const close of closing.splice(0)) await close();
});

async function seeded(now: string) {
  const database = await freshDatabase();
  const db = connect(database.url, 2);
  closing.push(async () => {
    await db.destroy();
    await database.drop();
  });
  expect(await seedDemo(database.ownerUrl, new Date(now))).toBe(true);
  return { db, ownerUrl: database.ownerUrl };
}
const inDemo = <T>(db: Knex, work: (trx: Trx) => Promise<T>): Promise<T> =>
  inShop(db, { shopId: demoShopId, accountId: null }, work);
const all = { state: 'all', sort: 'number', page: 1, size: 200 } as const;
type Booked = { state: string; from: Date; to: Date };
const bookings = (trx: Trx): Promise<Booked[]> =>
  trx('booking')
    .where({ shop_id: demoShopId })
    .orderBy('id')
    .select<Booked[]>('id', 'state', trx.raw('lower(during) as "from"'), trx.raw('upper(during) as "to"'));

const slow = 60_000;

describe('the demo shop', () => {
  test(
    'stands in the middle of a week, with jobs in every state and a plan that breaks no rule',
    async () => {
      const now = new Date('2026-03-04T10:20:00Z');
      const { db } = await seeded(now.toISOString());
      await inDemo(db, async (trx) => {
        const { rows } = await listJobs(trx, demoShopId, all, now);
        expect(rows).toHaveLength(30);
        const count = (state: string): number => rows.filter((row) => row.state === state).length;
        expect(count('done')).toBeGreaterThanOrEqual(5);
        expect(count('running')).toBeGreaterThanOrEqual(3);
        expect(count('planned')).toBeGreaterThanOrEqual(1);
        expect(count('waiting')).toBe(4);
        expect(count('withdrawn')).toBe(1);
        expect(rows.filter((row) => row.late && row.state !== 'done').length).toBeGreaterThanOrEqual(1);
        const made = await bookings(trx);
        expect(made.some((b) => b.state === 'running' && b.from <= now && b.to > now)).toBe(true);
        expect(made.some((b) => b.state === 'done')).toBe(true);
        expect(made.filter((b) => b.state === 'planned').every((b) => b.from > now)).toBe(true);
        const facts = await loadFacts(trx, demoShopId, now);
        const { verdict } = judge(facts, frameOf(facts), { loose: new Set(), now });
        expect(verdict.violations).toEqual([]);
      });
    },
    slow,
  );

  test(
    'is put in once, is the same every time, and its sign-ins work',
    async () => {
      const now = '2026-06-10T08:00:00Z';
      const [one, two] = [await seeded(now), await seeded(now)];
      expect(await seedDemo(one.ownerUrl, new Date(now))).toBe(false);
      expect(await inDemo(one.db, bookings)).toEqual(await inDemo(two.db, bookings));
      const accounts = await one
        .db('account')
        .select<{ email: string; password_hash: string }[]>('email', 'password_hash');
      expect(accounts).toHaveLength(signIns.length);
      for (const { email, password } of signIns) {
        const account = accounts.find((candidate) => candidate.email === email);
        expect(account?.password_hash).toMatch(/^\$argon2id\$/);
        expect(await verify(account?.password_hash ?? '', password)).toBe(true);
      }
      expect(new Set(signIns.map(({ role }) => role))).toEqual(new Set(['owner', 'lead', 'painter', 'office']));
    },
    slow,
  );

  test(
    'keeps to the shapes the program promises',
    async () => {
      const { db } = await seeded('2026-03-04T10:20:00Z');
      await inDemo(db, async (trx) => {
        const sheets = await listSheets(trx, demoShopId);
        expect(sheets).toHaveLength(7);
        for (const sheet of sheets) expect(sheetBody.parse(sheet.body)).toEqual(sheet.body);
        const coatings = await listCoatings(trx, demoShopId);
        expect(coatings).toHaveLength(6);
        for (const one of coatings) expect(coating.parse(one)).toEqual(one);
        const known = new Set(coatings.map(({ id }) => id));
        const used = sheets.flatMap(({ body }) => body.stages.flatMap(({ coatingId }) => coatingId ?? []));
        expect(used.every((id) => known.has(id))).toBe(true);
        const setUp = await loadResources(trx, demoShopId);
        expect(setUp.people).toHaveLength(9);
        expect(setUp.places.map(({ kind }) => kind)).toEqual([
          ...Array(2).fill('booth'),
          ...Array(5).fill('prep'),
          'rack',
        ]);
        // Not all lamps may burn together.
        for (const { id, kilowatts } of setUp.circuits.slice(0, 1)) {
          const drawn = setUp.lamps
            .filter(({ circuitId }) => circuitId === id)
            .reduce((sum, lamp) => sum + lamp.kilowatts, 0);
          expect(drawn).toBeGreaterThan(kilowatts);
        }
        // Training is good for five years (40 CFR 63.11173); one lapses within 90 days.
        const lapses = setUp.people.flatMap(({ sprayTrainedOn }) => {
          if (sprayTrainedOn === null) return [];
          const day = new Date(`${sprayTrainedOn}T00:00:00Z`);
          day.setUTCFullYear(day.getUTCFullYear() + 5);
          return (day.getTime() - Date.parse('2026-03-04T00:00:00Z')) / 86_400_000;
        });
        expect(lapses.filter((days) => days > 0 && days <= 90)).toHaveLength(1);
        expect(lapses.every((days) => days > 0)).toBe(true);
      });
    },
    slow,
  );

  test.each([
    ['a Saturday', '2026-03-07T12:00:00Z', '2026-03-09'],
    ['a Sunday night before the clocks change', '2026-03-28T23:30:00Z', '2026-03-30'],
    ['a Tuesday night', '2026-03-03T22:30:00Z', '2026-03-04'],
    ['a Friday evening', '2026-03-06T17:30:00Z', '2026-03-09'],
  ])(
    'makes sense on %s: work was done, and there is some for the next working day',
    async (_name, now, nextDay) => {
      const { db } = await seeded(now);
      await inDemo(db, async (trx) => {
        const made = await bookings(trx);
        expect(made.some(({ state }) => state === 'done')).toBe(true);
        const next = made.filter(({ state, from }) => state === 'planned' && from.toISOString().startsWith(nextDay));
        expect(next.length).toBeGreaterThanOrEqual(3);
        const range = { from: new Date(`${nextDay}T00:00:00Z`), to: new Date(`${nextDay}T23:00:00Z`) };
        expect(openSpans(await loadResources(trx, demoShopId), range)).toHaveLength(1);
      });
    },
    slow,
  );
});
