import * as z from 'zod';
import type { CsvFault } from '#contracts/csv.ts';
import { skill } from '#contracts/people.ts';
import { name } from '#contracts/common.ts';
import { weekdays, type Weekday } from '#contracts/recurrence.ts';
import { readDayHours, sayDayHours, shiftsOf, weekOf, type DayHours, type Week } from '#contracts/week.ts';
import { allOrNothing } from '../csv/all-or-nothing.ts';
import { csvDay, csvWords } from '../csv/fields.ts';
import { readRows } from '../csv/read-rows.ts';
import { writeRows, type CsvCell } from '../csv/write-rows.ts';
import { recordChange } from '../db/changes.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { findShopFrame, insertPerson, loadPeople, replaceShifts, type PersonRow } from '../db/people.ts';
import type { Deps } from '../deps.ts';
import { localDayOf } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';
import { v7 as uuid } from 'uuid';
import { differing, putPerson } from './change-person.ts';

/** Stands in every day of somebody whose hours are more than a week that repeats; read back it leaves them alone. */
const asTheyAre = 'as they are';

const dayColumns = {
  monday: 'MO',
  tuesday: 'TU',
  wednesday: 'WE',
  thursday: 'TH',
  friday: 'FR',
  saturday: 'SA',
  sunday: 'SU',
} as const satisfies Record<string, Weekday>;
type DayColumn = keyof typeof dayColumns;
const dayKeys = Object.keys(dayColumns) as DayColumn[];

const hours = z
  .string()
  .optional()
  .transform((text, context): DayHours | null | typeof asTheyAre => {
    if (text?.toLowerCase() === asTheyAre) return asTheyAre;
    const read = readDayHours(text ?? '');
    if ('hours' in read) return read.hours;
    context.addIssue({ code: 'custom', message: read.fault });
    return z.NEVER;
  });

const row = z.object({
  name,
  skills: csvWords.pipe(z.array(skill)).default([]),
  sprayTrainedOn: csvDay.nullable().default(null),
  monday: hours,
  tuesday: hours,
  wednesday: hours,
  thursday: hours,
  friday: hours,
  saturday: hours,
  sunday: hours,
});
type Row = z.output<typeof row>;

export function exportPeople(deps: Deps, actor: Actor): Promise<{ fileName: string; csv: string }> {
  return inShop(deps.db, actor, async (trx) => {
    const people = (await loadPeople(trx, actor.shopId)).filter(({ retired }) => !retired);
    const { timeZone } = await findShopFrame(trx, actor.shopId);
    const keys = ['name', 'skills', 'sprayTrainedOn', ...dayKeys] as const;
    return {
      fileName: `people-${localDayOf(deps.now(), timeZone)}.csv`,
      csv: writeRows(keys, people.map(lineOf)),
    };
  });
}

function lineOf({ name, skills, sprayTrainedOn, shifts }: PersonRow) {
  const week = weekOf(shifts);
  const days = Object.fromEntries(
    dayKeys.map((key) => [key, week ? sayDayHours(week[dayColumns[key]]) : asTheyAre]),
  ) as Record<DayColumn, CsvCell>;
  return { name, skills, sprayTrainedOn, ...days };
}

/** Lines are people by name: who is new is added, who is there is made as the line says. Nobody is taken off. */
export async function importPeople(deps: Deps, actor: Actor, input: { csv: string; tryOnly: boolean }) {
  const read = readRows(input.csv, row);
  const { shopId } = actor;
  return allOrNothing(deps.db, actor, { lines: read.lines, tryOnly: input.tryOnly }, async (trx) => {
    const { timeZone } = await findShopFrame(trx, shopId);
    const monday = mondayOf(localDayOf(deps.now(), timeZone));
    const byName = groupByName(await loadPeople(trx, shopId));
    const faults: CsvFault[] = [...read.faults];
    const written = { added: [] as string[], changed: [] as string[] };
    const seen = new Set<string>();
    for (const { line, value } of read.rows) {
      const key = value.name.toLowerCase();
      const there = byName.get(key) ?? [];
      const fault = (message: string) => faults.push({ line, column: 'name', message });
      if (seen.has(key)) fault('This name is in the file twice.');
      else if (there.length > 1) fault('There are several people of this name; change them on the page.');
      else await take(trx, { shopId, monday, columns: read.columns }, value, there[0], written);
      seen.add(key);
    }
    const ids = [...written.added, ...written.changed];
    if (ids.length > 0)
      await recordChange(trx, actor, { kind: 'people-changed', ids, detail: { imported: ids.length } });
    return { added: written.added.length, changed: written.changed.length, faults };
  });
}

type Written = { added: string[]; changed: string[] };
/** What the file does not speak of stays as it is. */
type Frame = { shopId: string; monday: string; columns: ReadonlySet<string> };

async function take(
  trx: Trx,
  { shopId, monday, columns }: Frame,
  value: Row,
  there: PersonRow | undefined,
  written: Written,
): Promise<void> {
  const shifts = dayKeys.some((key) => columns.has(key)) ? shiftsIn(value, there, monday) : undefined;
  const fields = { skills: [...new Set(value.skills)], sprayTrainedOn: value.sprayTrainedOn };
  if (!there) {
    const id = uuid();
    await insertPerson(trx, shopId, { id, name: value.name, ...fields });
    await replaceShifts(trx, shopId, id, shifts ?? []);
    written.added.push(id);
    return;
  }
  const changed = differing(there, {
    name: value.name,
    skills: columns.has('skills') ? fields.skills : undefined,
    sprayTrainedOn: columns.has('sprayTrainedOn') ? fields.sprayTrainedOn : undefined,
    shifts,
  });
  if (Object.keys(changed).length === 0) return;
  await putPerson(trx, shopId, there.id, changed);
  written.changed.push(there.id);
}

/** The shifts of a line; undefined where they stay as they are. */
function shiftsIn(value: Row, there: PersonRow | undefined, monday: string) {
  const typed = dayKeys.map((key) => value[key]);
  if (typed.includes(asTheyAre)) return undefined;
  const week = Object.fromEntries(weekdays.map((day, at) => [day, typed[at] ?? null])) as Week;
  const before = there && weekOf(there.shifts);
  if (before && weekdays.every((day) => sayDayHours(before[day]) === sayDayHours(week[day]))) return undefined;
  return shiftsOf(week, monday);
}

function groupByName(people: readonly PersonRow[]): Map<string, PersonRow[]> {
  const byName = new Map<string, PersonRow[]>();
  for (const person of people) {
    if (person.retired) continue;
    const key = person.name.toLowerCase();
    byName.set(key, [...(byName.get(key) ?? []), person]);
  }
  return byName;
}

/** The Monday of the week of a day. */
export function mondayOf(day: string): string {
  const at = new Date(`${day}T12:00:00Z`);
  at.setUTCDate(at.getUTCDate() - ((at.getUTCDay() + 6) % 7));
  return at.toISOString().slice(0, 10);
}
