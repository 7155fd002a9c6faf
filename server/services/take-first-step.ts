import { v7 as uuid } from 'uuid';
import type { FirstStep, FirstSteps, HoursStep, JobStep, PeopleStep, PlacesStep } from '#contracts/first-steps.ts';
import { recordChange } from '../db/changes.ts';
import { coatingNamed, insertCoating } from '../db/coatings.ts';
import {
  findOwnMember,
  insertLamps,
  insertOpening,
  insertPlaces,
  setTimeZone,
  setTrainingBlocks,
  zoneNamed,
} from '../db/first-steps.ts';
import { inShop, joinedTo, type Trx } from '../db/in-shop.ts';
import { lockShop } from '../db/locks.ts';
import { findShopFrame, insertPerson, replaceShifts, tieMember } from '../db/people.ts';
import { insertSheet, listSheets } from '../db/sheets.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { localDayOf } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';
import { coatings } from '../starter/coatings.ts';
import { bodyOf, sheets } from '../starter/sheets/index.ts';
import { starterCaution, starterUnits } from '../starter/shop.ts';
import { createJob } from './create-job.ts';
import { mondayOf } from './people-csv.ts';
import { firstStepsOf } from './read-first-steps.ts';
import { startPlanRun } from './start-plan-run.ts';

/** One step, in one transaction, one at a time in a shop; what is done already is left as it is. */
function take(deps: Deps, actor: Actor, step: FirstStep, work: (trx: Trx) => Promise<void>): Promise<FirstSteps> {
  return inShop(deps.db, actor, async (trx) => {
    await lockShop(trx, actor.shopId);
    const before = await firstStepsOf(trx, actor.shopId);
    if (before.steps.some((one) => one.step === step && one.done)) return before;
    await work(trx);
    return firstStepsOf(trx, actor.shopId);
  });
}

const minutesOf = (time: string): number => Number(time.slice(0, 2)) * 60 + Number(time.slice(3, 5));
const changed = (trx: Trx, actor: Actor, detail: object) =>
  recordChange(trx, actor, { kind: 'shop-changed', ids: [actor.shopId], detail: { firstSteps: detail } });

/** A Monday eight weeks back, so that reports of the first days have hours to look at. */
const recurringFrom = (now: Date, zone: string): string =>
  mondayOf(localDayOf(new Date(now.getTime() - 56 * 86_400_000), zone));

export const takeHours = (deps: Deps, actor: Actor, given: HoursStep) =>
  take(deps, actor, 'hours', async (trx) => {
    await setTimeZone(trx, actor.shopId, given.timeZone);
    await insertOpening(trx, actor.shopId, {
      startsLocal: `${recurringFrom(deps.now(), given.timeZone)}T${given.from}`,
      rule: `FREQ=WEEKLY;BYDAY=${[...new Set(given.days)].join(',')}`,
      minutes: minutesOf(given.to) - minutesOf(given.from),
    });
    await changed(trx, actor, given);
  });

const numbered = (count: number): number[] => Array.from({ length: count }, (_, at) => at + 1);

/** Each booth has its own air; the stations share theirs, which is the careful case: no lamp burns where one sprays. */
export const takePlaces = (deps: Deps, actor: Actor, given: PlacesStep) =>
  take(deps, actor, 'places', async (trx) => {
    const { shopId } = actor;
    const { volumeM3, airFlowM3PerHour, bakeLimitCelsius: limitCelsius, clearanceMinutes } = given;
    const booth = { volumeM3, airFlowM3PerHour, limitCelsius, clearanceMinutes };
    const bay = await zoneNamed(trx, shopId, 'Prep bay');
    for (const number of numbered(given.booths)) {
      const name = `Booth ${number}`;
      const zoneId = await zoneNamed(trx, shopId, name);
      const units = starterUnits.booth;
      await insertPlaces(trx, shopId, [{ kind: 'booth', name, zoneId, units, position: number, booth }]);
    }
    const first = given.booths;
    await insertPlaces(trx, shopId, [
      ...numbered(given.stations).map((number) => ({
        kind: 'prep' as const,
        name: `Prep ${number}`,
        zoneId: bay,
        units: starterUnits.prep,
        position: first + number,
        booth: null,
      })),
      { kind: 'rack', name: 'Rack', zoneId: null, units: starterUnits.rack, position: 99, booth: null },
    ]);
    const lamps = numbered(given.lamps).map((position) => ({
      name: `Lamp ${position}`,
      kilowatts: given.lampKilowatts,
      position,
    }));
    if (lamps.length > 0)
      await insertLamps(trx, shopId, { name: 'Lamp circuit', kilowatts: given.circuitKilowatts }, lamps);
    await changed(trx, actor, given);
  });

export const takePeople = (deps: Deps, actor: Actor, given: PeopleStep) =>
  take(deps, actor, 'people', async (trx) => {
    const { shopId } = actor;
    const { timeZone } = await findShopFrame(trx, shopId);
    const minutes = minutesOf(given.to) - minutesOf(given.from);
    const shift = {
      startsLocal: `${recurringFrom(deps.now(), timeZone)}T${given.from}`,
      rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
      minutes,
      // Half an hour around the middle of the day, for who works long enough to need it.
      breaks: minutes > 360 ? [{ after: Math.floor(minutes / 2), minutes: 30 }] : [],
    };
    const ids: string[] = [];
    for (const { isMe, ...person } of given.people) {
      const id = uuid();
      await insertPerson(trx, shopId, { id, ...person });
      await replaceShifts(trx, shopId, id, [shift]);
      if (isMe) await tieMember(trx, shopId, id, (await findOwnMember(trx, shopId, actor.accountId)) ?? null);
      ids.push(id);
    }
    if (given.onlyWarn) await setTrainingBlocks(trx, shopId, false);
    const detail = { added: given.people.map(({ name }) => name), onlyWarn: given.onlyWarn };
    await recordChange(trx, actor, { kind: 'people-changed', ids, detail });
    await changed(trx, actor, { people: ids.length });
  });

/** @throws {Refusal} bad-request where a key is none of the starter set */
export const takeSheets = (deps: Deps, actor: Actor, given: { sheets: string[] }) =>
  take(deps, actor, 'sheets', async (trx) => {
    const { shopId } = actor;
    const chosen = given.sheets.map((key) => {
      const sheet = sheets.find((one) => one.key === key);
      if (!sheet)
        throw new Refusal('bad-request', { fields: [{ path: 'body.sheets', message: `${key} is no starter sheet` }] });
      return sheet;
    });
    const idOf = await putCoatings(trx, shopId);
    const there = new Set((await listSheets(trx, shopId)).map(({ name }) => name));
    for (const sheet of new Set(chosen))
      if (!there.has(sheet.name))
        await insertSheet(trx, shopId, {
          id: uuid(),
          versionId: uuid(),
          name: sheet.name,
          body: bodyOf(sheet, (key) => idOf.get(key) ?? null),
          by: actor.accountId,
        });
    await recordChange(trx, actor, { kind: 'sheets-changed', ids: [...idOf.values()], detail: given });
    await changed(trx, actor, given);
  });

/** The starter set of data sheets; one that has the name already is taken for it. */
async function putCoatings(trx: Trx, shopId: string): Promise<Map<string, string>> {
  const idOf = new Map<string, string>();
  for (const { key, name, kind, sheet } of coatings) {
    const there = await coatingNamed(trx, shopId, name);
    const id = there?.id ?? uuid();
    const cautions = [...sheet.cautions, starterCaution];
    if (!there) await insertCoating(trx, shopId, { id, name, kind, sheet: { ...sheet, cautions } });
    idOf.set(key, id);
  }
  return idOf;
}

/** The first job as its process sheet has it, and the planner's first run over what there is. */
export const takeJob = (deps: Deps, actor: Actor, given: JobStep) =>
  take(deps, actor, 'job', async (trx) => {
    const { jobId, runId, sheetId, title, vehicle, notes, promiseAt } = given;
    const sheet = (await listSheets(trx, actor.shopId)).find(({ id }) => id === sheetId);
    await joinedTo(trx, actor, async () => {
      await createJob(deps, actor, {
        id: jobId,
        sheetId,
        title,
        vehicle,
        notes,
        promiseAt,
        colourNote: '',
        options: (sheet?.body.options ?? []).filter(({ on }) => on).map(({ key }) => key),
        parts: sheet?.body.parts ?? [],
        releaseAt: deps.now().toISOString(),
        weight: 1,
        electric: false,
        heatLimitCelsius: null,
        heatLimitMinutes: null,
      });
      await startPlanRun(deps, actor, { id: runId, scope: 'all', seconds: 3, seed: 1 });
    });
  });
