import { v7 as uuid } from 'uuid';
import * as z from 'zod';
import type { CsvFault } from '#contracts/csv.ts';
import { allOrNothing } from '../csv/all-or-nothing.ts';
import { readRows } from '../csv/read-rows.ts';
import { writeRows } from '../csv/write-rows.ts';
import { insertAbsence } from '../db/absences.ts';
import { recordChange } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { findShopFrame, loadPeople, type PersonRow } from '../db/people.ts';
import type { Deps } from '../deps.ts';
import { floatingOf, instantOf, localDayOf, readLocal } from '../planning/local-time.ts';
import type { Actor } from '../policies.ts';

const DAY = 86_400_000;
const fault = 'Write a day such as 2027-03-31, or a day and a time such as 2027-03-31 13:00.';
const localMoment = z
  .string()
  .regex(/^\d{4}-\d\d-\d\d([ T]\d\d:\d\d)?$/, fault)
  .refine((text) => isReal(text), fault);

const isReal = (text: string): boolean => {
  const at = Date.parse(`${text.replace(' ', 'T')}${text.length === 10 ? 'T00:00' : ''}Z`);
  return !Number.isNaN(at) && new Date(at).toISOString().startsWith(text.slice(0, 10));
};

const row = z.object({
  person: z.string(),
  from: localMoment,
  /** A bare day belongs to the absence; empty: until further notice. */
  to: localMoment.optional(),
  reason: z.string().max(200).default(''),
});

export function exportAbsences(deps: Deps, actor: Actor): Promise<{ fileName: string; csv: string }> {
  return inShop(deps.db, actor, async (trx) => {
    const { timeZone } = await findShopFrame(trx, actor.shopId);
    const people = (await loadPeople(trx, actor.shopId)).filter(({ retired }) => !retired);
    const rows = people.flatMap(({ name, absences }) =>
      absences.map(({ from, to, reason }) => ({
        person: name,
        from: sayMoment(new Date(from), timeZone, 'from'),
        to: to === null ? null : sayMoment(new Date(to), timeZone, 'to'),
        reason,
      })),
    );
    const fileName = `absences-${localDayOf(deps.now(), timeZone)}.csv`;
    return { fileName, csv: writeRows(['person', 'from', 'to', 'reason'], rows) };
  });
}

/** Midnight is said as a day: the first, or the last that belongs to it. */
function sayMoment(at: Date, zone: string, side: 'from' | 'to'): string {
  const wall = floatingOf(at, zone);
  const text = (floating: number) => new Date(floating).toISOString();
  if (wall % DAY !== 0) return text(wall).slice(0, 16).replace('T', ' ');
  return text(side === 'from' ? wall : wall - DAY).slice(0, 10);
}

function readMoment(text: string, zone: string, side: 'from' | 'to'): Date {
  if (text.length > 10) return instantOf(readLocal(text.replace(' ', 'T')), zone);
  return instantOf(readLocal(`${text}T00:00`) + (side === 'to' ? DAY : 0), zone);
}

/** Adds the absences that are not there yet. None is taken away. */
export function importAbsences(deps: Deps, actor: Actor, input: { csv: string; tryOnly: boolean }) {
  const read = readRows(input.csv, row);
  const { shopId } = actor;
  return allOrNothing(deps.db, actor, { lines: read.lines, tryOnly: input.tryOnly }, async (trx) => {
    const { timeZone } = await findShopFrame(trx, shopId);
    const people = (await loadPeople(trx, shopId)).filter(({ retired }) => !retired);
    const faults: CsvFault[] = [...read.faults];
    const ids = new Set<string>();
    const known = new Set(people.flatMap((person) => person.absences.map((one) => keyOf(person.id, one.from, one.to))));
    let added = 0;
    for (const { line, value } of read.rows) {
      const person = personOf(people, value.person);
      const from = readMoment(value.from, timeZone, 'from');
      const to = value.to === undefined ? null : readMoment(value.to, timeZone, 'to');
      if (typeof person === 'string') faults.push({ line, column: 'person', message: person });
      else if (to !== null && to <= from) faults.push({ line, column: 'to', message: 'It ends before it begins.' });
      else if (!known.has(keyOf(person.id, from, to))) {
        known.add(keyOf(person.id, from, to));
        await insertAbsence(trx, shopId, person.id, { id: uuid(), from, to, reason: value.reason });
        ids.add(person.id);
        added += 1;
      }
    }
    const detail = { absencesImported: added };
    if (added > 0) await recordChange(trx, actor, { kind: 'people-changed', ids: [...ids], detail });
    return { added, changed: 0, faults };
  });
}

const keyOf = (personId: string, from: Date | string, to: Date | string | null): string =>
  [personId, new Date(from).getTime(), to === null ? '' : new Date(to).getTime()].join(' ');

/** The person, or what is wrong with the name. */
function personOf(people: readonly PersonRow[], name: string): PersonRow | string {
  const named = people.filter((person) => person.name.toLowerCase() === name.toLowerCase());
  const [person, ...more] = named;
  if (!person) return 'Nobody on the roster has this name.';
  return more.length > 0 ? 'Several people have this name; enter it on the page.' : person;
}
