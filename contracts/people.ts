import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant, localDay, name } from './common.ts';
import { csvExport, csvImport, csvReport } from './csv.ts';
import { localTime, recurrenceRule } from './recurrence.ts';

/** A word that process sheets ask for: `paint`, `prep`. Divided by commas and semicolons in files, so it has none. */
export const skill = z
  .string()
  .trim()
  .toLowerCase()
  .min(1)
  .max(40)
  .regex(/^[^,;|]+$/, 'a skill has no comma, semicolon or bar');
export const skills = z
  .array(skill)
  .max(30)
  .transform((words) => [...new Set(words)]);

/** Working hours that recur, with breaks counted from the start; all on the shop's wall clock. */
export const shift = z
  .strictObject({
    startsLocal: localTime,
    rule: recurrenceRule.nullable(),
    minutes: z.number().int().min(1).max(1440),
    breaks: z.array(z.strictObject({ after: z.number().int().min(0), minutes: z.number().int().min(1) })).max(12),
  })
  .refine(({ breaks, minutes }) => breaks.every((rest) => rest.after + rest.minutes <= minutes), {
    path: ['breaks'],
    message: 'breaks lie inside the shift',
  });
export type Shift = z.output<typeof shift>;

/** `to` null: until further notice. */
export const absence = z.strictObject({ id, from: instant, to: instant.nullable(), reason: z.string() });
export type Absence = z.output<typeof absence>;

/**
 * How the spray training stands today: good for five years, that day included (40 CFR 63.11173(g)); `ends-soon`: 90 days
 * or fewer are left. `daysLeft` is negative once it has lapsed.
 */
export const training = z.strictObject({
  standing: z.enum(['good', 'ends-soon', 'lapsed', 'not-yet', 'never-trained']),
  goodThrough: localDay.nullable(),
  daysLeft: z.number().int().nullable(),
});

export const person = z.strictObject({
  id,
  version: z.number().int(),
  name: z.string(),
  skills: z.array(z.string()),
  sprayTrainedOn: localDay.nullable(),
  training,
  shifts: z.array(shift),
  absences: z.array(absence),
  /** The account that works as this person. */
  member: z.strictObject({ id, name: z.string() }).nullable(),
  /** The last day of somebody who is leaving. */
  leavesOn: localDay.nullable(),
  retired: z.boolean(),
});
export type Person = z.output<typeof person>;

/** Posted work that no longer fits the person's hours. It stands until somebody plans again. */
export const clash = z.strictObject({
  stageId: id,
  jobId: id,
  jobNumber: z.number().int(),
  jobTitle: z.string(),
  stageTitle: z.string(),
  from: instant,
  to: instant,
});
export type Clash = z.output<typeof clash>;

const one = inShop.extend({ personId: id });
const changed = z.strictObject({ person, clashes: z.array(clash) });
const shifts = z.array(shift).max(30);

export const listPeople = endpoint({
  name: 'list-people',
  method: 'GET',
  path: '/api/shops/:shopId/people',
  params: inShop,
  reply: z.strictObject({
    people: z.array(person),
    /** Skills in use: those that process sheets ask for, then those that people have. */
    skills: z.array(z.string()),
    /** Members who may be tied to a person; empty for who may not do so. */
    members: z.array(z.strictObject({ id, name: z.string(), personId: id.nullable() })),
    trainingBlocks: z.boolean(),
  }),
});

export const personFields = z.strictObject({
  name,
  skills,
  sprayTrainedOn: localDay.nullable(),
  shifts,
  memberId: id.nullable(),
});
export type PersonFields = z.output<typeof personFields>;

export const createPerson = endpoint({
  name: 'create-person',
  method: 'POST',
  path: '/api/shops/:shopId/people',
  params: inShop,
  body: personFields,
  reply: changed,
});
/** Fields that are given; `shifts` are all of them. */
export const changePerson = endpoint({
  name: 'change-person',
  method: 'PATCH',
  path: '/api/shops/:shopId/people/:personId',
  params: one,
  body: personFields.partial().extend({ version: z.number().int() }),
  reply: changed,
});
/** All people who are not retired, in the order in which rows are to stand. */
export const orderPeople = endpoint({
  name: 'order-people',
  method: 'POST',
  path: '/api/shops/:shopId/people-order',
  params: inShop,
  body: z.strictObject({ personIds: z.array(id).min(1).max(500) }),
});
/** Takes somebody off the roster: at once, or after a last day. Refused while posted work after that names them. */
export const retirePerson = endpoint({
  name: 'retire-person',
  method: 'POST',
  path: '/api/shops/:shopId/people/:personId/retire',
  params: one,
  body: z.strictObject({ version: z.number().int(), lastDay: localDay.nullable() }),
  reply: person,
});
export const bringBackPerson = endpoint({
  name: 'bring-back-person',
  method: 'POST',
  path: '/api/shops/:shopId/people/:personId/bring-back',
  params: one,
  body: z.strictObject({ version: z.number().int() }),
  reply: person,
});

export const addAbsence = endpoint({
  name: 'add-absence',
  method: 'POST',
  path: '/api/shops/:shopId/people/:personId/absences',
  params: one,
  body: z
    .strictObject({ from: instant, to: instant.nullable(), reason: z.string().trim().max(200) })
    .refine(({ from, to }) => to === null || Date.parse(from) < Date.parse(to), {
      path: ['to'],
      message: 'ends before it begins',
    }),
  reply: changed,
});
export const removeAbsence = endpoint({
  name: 'remove-absence',
  method: 'DELETE',
  path: '/api/shops/:shopId/people/:personId/absences/:absenceId',
  params: one.extend({ absenceId: id }),
  reply: person,
});

export const exportPeople = endpoint({
  name: 'export-people',
  method: 'GET',
  path: '/api/shops/:shopId/people-csv',
  params: inShop,
  reply: csvExport,
});
export const importPeople = endpoint({
  name: 'import-people',
  method: 'POST',
  path: '/api/shops/:shopId/people-csv',
  params: inShop,
  body: csvImport,
  reply: csvReport,
});
export const exportAbsences = endpoint({
  name: 'export-absences',
  method: 'GET',
  path: '/api/shops/:shopId/absences-csv',
  params: inShop,
  reply: csvExport,
});
export const importAbsences = endpoint({
  name: 'import-absences',
  method: 'POST',
  path: '/api/shops/:shopId/absences-csv',
  params: inShop,
  body: csvImport,
  reply: csvReport,
});
