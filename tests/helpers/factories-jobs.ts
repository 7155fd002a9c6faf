import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import type { Role, Substrate } from '#contracts/common.ts';
import { emptySheet, type Coating } from '#contracts/coatings.ts';
import type { NewJob } from '#contracts/jobs.ts';
import type { SheetBody, Way } from '#contracts/sheets.ts';
import { insertCoating } from '#server/db/coatings.ts';
import { inShop } from '#server/db/in-shop.ts';
import { insertJob, takeJobNumber } from '#server/db/jobs.ts';
import { insertSheet } from '#server/db/sheets.ts';
import { insertStages } from '#server/db/stages.ts';

const MINUTE = 60_000;

/** A shop with one booth, one prep station, a rack, a lamp, and two people, open Monday to Friday from 7 to 18. */
export type TestShop = {
  id: string;
  timeZone: string;
  booth: string;
  prep: string;
  rack: string;
  lamp: string;
  painter: string;
  helper: string;
};

const objective = { tardiness: 1, flow: 0.01, makespan: 0, booth: 0.02, moves: 1, unplaced: 100_000 };

export async function aShop(db: Knex, given: { timeZone?: string; name?: string } = {}): Promise<TestShop> {
  const id = randomUUID();
  const timeZone = given.timeZone ?? 'Europe/Amsterdam';
  const made: TestShop = {
    id,
    timeZone,
    booth: randomUUID(),
    prep: randomUUID(),
    rack: randomUUID(),
    lamp: randomUUID(),
    painter: randomUUID(),
    helper: randomUUID(),
  };
  const circuit = randomUUID();
  const weekdays = 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR';
  const inIt = { shop_id: id };
  await inShop(db, { shopId: id, accountId: null }, async (trx) => {
    await trx('shop').insert({
      id,
      name: given.name ?? 'Shop of a test',
      time_zone: timeZone,
      objective: JSON.stringify(objective),
    });
    await trx('place').insert([
      { ...inIt, id: made.booth, kind: 'booth', name: 'Booth', units: 4, bakes: true, position: 1 },
      { ...inIt, id: made.prep, kind: 'prep', name: 'Prep', units: 4, position: 2 },
      { ...inIt, id: made.rack, kind: 'rack', name: 'Rack', units: 12, position: 3 },
    ]);
    await trx('circuit').insert({ ...inIt, id: circuit, name: 'Circuit', kilowatts: 12 });
    await trx('lamp').insert({ ...inIt, id: made.lamp, name: 'Lamp', circuit_id: circuit, kilowatts: 6 });
    await trx('opening').insert({
      ...inIt,
      id: randomUUID(),
      starts_local: '2026-01-05T07:00',
      rule: weekdays,
      minutes: 660,
    });
    await trx('person').insert([
      { ...inIt, id: made.painter, name: 'Painter', skills: ['paint', 'prep'], position: 1 },
      { ...inIt, id: made.helper, name: 'Helper', skills: ['prep'], position: 2 },
    ]);
    for (const person of [made.painter, made.helper])
      await trx('shift').insert({
        ...inIt,
        id: randomUUID(),
        person_id: person,
        starts_local: '2026-01-05T08:00',
        rule: weekdays,
        minutes: 510,
        breaks: JSON.stringify([{ after: 240, minutes: 30 }]),
      });
  });
  return made;
}

/** An account that belongs to the shop. It has no password: who needs one gives a hash. */
export async function aMember(
  db: Knex,
  shop: { id: string },
  given: { role: Role; personId?: string; email?: string; passwordHash?: string },
): Promise<string> {
  const id = randomUUID();
  await inShop(db, { shopId: shop.id, accountId: null }, async (trx) => {
    const email = given.email ?? `${given.role}-${id}@shop.test`;
    await trx('account').insert({ id, email, name: `The ${given.role}`, password_hash: given.passwordHash ?? null });
    await trx('membership').insert({
      shop_id: shop.id,
      id: randomUUID(),
      account_id: id,
      role: given.role,
      person_id: given.personId ?? null,
    });
  });
  return id;
}

export const aWay = (given: Partial<Way> = {}): Way => ({
  id: 'by-hand',
  label: 'By hand',
  placeKinds: ['prep'],
  stay: false,
  skill: 'prep',
  lampCount: 0,
  family: null,
  load: null,
  gap: { min: 0, max: null, settle: 0 },
  split: false,
  bakeCelsius: null,
  phases: [{ kind: 'work', minutes: 60, attendance: 'hands' }],
  ...given,
});

export const aSheetBody = (given: Partial<SheetBody> = {}): SheetBody => ({
  summary: 'For a test',
  options: [],
  parts: [{ name: 'Panel', substrate: 'steel', units: 2 }],
  stages: [
    { key: 'prep', kind: 'prep', title: 'Prepare', option: null, coatingId: null, ways: [aWay()] },
    { key: 'finish', kind: 'finish', title: 'Finish', option: null, coatingId: null, ways: [aWay()] },
  ],
  ...given,
});

export async function aSheet(db: Knex, shop: { id: string }, body = aSheetBody(), name = 'Sheet'): Promise<string> {
  const id = randomUUID();
  await inShop(db, { shopId: shop.id, accountId: null }, (trx) =>
    insertSheet(trx, shop.id, { id, versionId: randomUUID(), name, body }),
  );
  return id;
}

export async function aCoating(db: Knex, shop: { id: string }, given: Partial<Coating> = {}): Promise<string> {
  const id = given.id ?? randomUUID();
  await inShop(db, { shopId: shop.id, accountId: null }, (trx) =>
    insertCoating(trx, shop.id, { name: 'Coating', kind: 'clear', sheet: emptySheet, ...given, id }),
  );
  return id;
}

/** The row of a file without its bytes. */
export async function anAttachment(db: Knex, shop: { id: string }): Promise<string> {
  const id = randomUUID();
  await inShop(db, { shopId: shop.id, accountId: null }, (trx) =>
    trx('attachment').insert({
      shop_id: shop.id,
      id,
      kind: 'photo',
      subject_id: randomUUID(),
      name: 'photo.png',
      bytes: 1,
      mime: 'image/png',
      sha256: Buffer.alloc(32),
    }),
  );
  return id;
}

export type TestJob = { id: string; number: number; stages: string[] };
export type TestJobInput = {
  title?: string;
  vehicle?: string;
  releaseAt?: Date;
  promiseAt?: Date | null;
  parts?: { name: string; substrate: Substrate; units: number }[];
  stages?: { title?: string; kind?: string; coatingId?: string | null; ways?: Way[] }[];
};

/** A job of two stages of an hour each unless said otherwise. */
export async function aJob(db: Knex, shop: { id: string }, given: TestJobInput = {}): Promise<TestJob> {
  const id = randomUUID();
  const stages = (given.stages ?? [{}, {}]).map((stage, i) => ({
    id: randomUUID(),
    kind: stage.kind ?? 'prep',
    title: stage.title ?? `Stage ${i + 1}`,
    coatingId: stage.coatingId ?? null,
    ways: stage.ways ?? [aWay()],
  }));
  return inShop(db, { shopId: shop.id, accountId: null }, async (trx) => {
    const number = await takeJobNumber(trx, shop.id);
    const parts = given.parts ?? [{ name: 'Panel', substrate: 'steel' as const, units: 2 }];
    await insertJob(trx, shop.id, {
      id,
      number,
      title: given.title ?? `Job ${number}`,
      vehicle: given.vehicle ?? '',
      colourNote: '',
      notes: '',
      releaseAt: given.releaseAt ?? new Date('2026-03-02T06:00:00Z'),
      promiseAt: given.promiseAt ?? null,
      weight: 1,
      electric: false,
      heatLimitCelsius: null,
      heatLimitMinutes: null,
      sheetVersionId: null,
      createdBy: null,
      parts: parts.map((part) => ({ id: randomUUID(), ...part })),
    });
    await insertStages(trx, shop.id, id, stages);
    return { id, number, stages: stages.map((stage) => stage.id) };
  });
}

export type TestBooking = {
  stage: string;
  place: string;
  person?: string | null;
  from: Date;
  /** Phases in minutes from the start, end to end unless pairs are given. */
  phases?: (number | [number, number])[];
  way?: string;
  load?: string;
  lamps?: string[];
  draft?: string;
};

/** Books a stage in the posted plan, or in a draft, and takes its place for the time it lasts. */
export async function aBooking(db: Knex, shop: { id: string; rack?: string }, given: TestBooking): Promise<string> {
  const id = randomUUID();
  const phases = pairs(given.phases ?? [60]);
  const to = new Date(given.from.getTime() + (phases.at(-1)?.[1] ?? 0) * MINUTE);
  const load = given.load ?? randomUUID();
  const during = `[${given.from.toISOString()},${to.toISOString()})`;
  const row = {
    shop_id: shop.id,
    id,
    stage_id: given.stage,
    way: given.way ?? 'by-hand',
    place_id: given.place,
    person_id: given.person ?? null,
    lamp_ids: given.lamps ?? [],
    load_id: load,
    during,
    phases: JSON.stringify(phases),
  };
  await inShop(db, { shopId: shop.id, accountId: null }, async (trx) => {
    if (given.draft !== undefined) return trx('draft_item').insert({ ...row, draft_id: given.draft });
    await trx('booking').insert({ ...row, plan_number: 1 });
    // Racks are counted, not occupied.
    if (given.place === shop.rack) return undefined;
    return trx('occupancy').insert({
      shop_id: shop.id,
      id: randomUUID(),
      booking_id: id,
      load_id: load,
      place_id: given.place,
      during,
    });
  });
  return id;
}

function pairs(phases: (number | [number, number])[]): [number, number][] {
  let at = 0;
  return phases.map((phase) => {
    const pair: [number, number] = typeof phase === 'number' ? [at, at + phase] : phase;
    at = pair[1];
    return pair;
  });
}

export async function aDraft(db: Knex, shop: { id: string }, given: { unplaced?: object[] } = {}): Promise<string> {
  const id = randomUUID();
  await inShop(db, { shopId: shop.id, accountId: null }, (trx) =>
    trx('draft').insert({
      shop_id: shop.id,
      id,
      plan_number: 0,
      unplaced: JSON.stringify(given.unplaced ?? []),
    }),
  );
  return id;
}

/** A job as the office sends it: one steel door of two units, four days to the promise. */
export const newJob = (sheetId: string, given: Partial<NewJob> = {}): NewJob => ({
  id: randomUUID(),
  sheetId,
  options: [],
  parts: [{ name: 'Door', substrate: 'steel', units: 2 }],
  title: 'Door, left front',
  vehicle: 'Grey estate',
  colourNote: '',
  notes: '',
  releaseAt: '2026-03-02T07:00:00.000Z',
  promiseAt: '2026-03-06T16:00:00.000Z',
  weight: 1,
  electric: false,
  heatLimitCelsius: null,
  heatLimitMinutes: null,
  ...given,
});
