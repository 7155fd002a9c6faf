import { personFields, type Person, type PersonFields } from '#contracts/people.ts';
import { weekdays, type Weekday } from '#contracts/recurrence.ts';
import { emptyWeek, readDayHours, sayDayHours, shiftsOf, weekOf, type Week } from '#contracts/week.ts';

/** As it is typed: all of it text, so that half an hour is kept as it stands. */
export type PersonForm = {
  name: string;
  skills: string[];
  trained: string;
  memberId: string;
  /** Null: hours that are more than a week that repeats, which stay as they are. */
  days: Record<Weekday, string> | null;
};
export type PersonFaults = Partial<Record<'name' | 'skills' | 'trained' | Weekday, string>>;

export const usualHours = '07:00-15:30 (09:30-09:45, 11:45-12:15)';
const week = (say: (day: Weekday) => string): Record<Weekday, string> =>
  Object.fromEntries(weekdays.map((day) => [day, say(day)])) as Record<Weekday, string>;

export const newPerson = (): PersonForm => ({
  name: '',
  skills: [],
  trained: '',
  memberId: '',
  days: week((day) => (day === 'SA' || day === 'SU' ? '' : usualHours)),
});

export function formOf(person: Person): PersonForm {
  const hours = weekOf(person.shifts);
  return {
    name: person.name,
    skills: person.skills,
    trained: person.sprayTrainedOn ?? '',
    memberId: person.member?.id ?? '',
    days: hours && week((day) => sayDayHours(hours[day])),
  };
}

export const isPersonForm = (value: unknown): value is PersonForm =>
  typeof value === 'object' && value !== null && 'skills' in value && 'trained' in value && 'days' in value;

type Read = { fields: PersonFields; faults: null } | { fields: null; faults: PersonFaults };

/** What was typed, or what is wrong with which field. New hours recur from `monday`, or from when the old ones did. */
export function readForm(form: PersonForm, before: Person | null, monday: string): Read {
  const faults: PersonFaults = {};
  const hours: Week = emptyWeek();
  for (const day of form.days ? weekdays : []) {
    const read = readDayHours(form.days?.[day] ?? '');
    if ('fault' in read) faults[day] = read.fault;
    else hours[day] = read.hours;
  }
  const fields = personFields.safeParse({
    name: form.name,
    skills: form.skills,
    sprayTrainedOn: form.trained === '' ? null : form.trained,
    memberId: form.memberId === '' ? null : form.memberId,
    shifts: shiftsToSend(form, before, hours, monday),
  });
  for (const issue of fields.error?.issues ?? []) {
    if (issue.path[0] === 'name') faults.name = 'Enter a name of at most 120 letters.';
    else if (issue.path[0] === 'skills') faults.skills = 'A skill has at most 40 letters, and none of , ; |';
    else if (issue.path[0] === 'sprayTrainedOn') faults.trained = 'Choose a day.';
  }
  if (!fields.success || Object.keys(faults).length > 0) return { fields: null, faults };
  return { fields: fields.data, faults: null };
}

function shiftsToSend(form: PersonForm, before: Person | null, hours: Week, monday: string) {
  const was = before && weekOf(before.shifts);
  const isAsBefore = was && weekdays.every((day) => sayDayHours(was[day]) === sayDayHours(hours[day]));
  if (before && (form.days === null || isAsBefore)) return before.shifts;
  const since = (before?.shifts ?? []).map(({ startsLocal }) => startsLocal.slice(0, 10)).sort()[0];
  return shiftsOf(hours, since !== undefined && since < monday ? since : monday);
}

/** The Monday of the week of a day. */
export function mondayOf(day: string): string {
  const at = new Date(`${day}T12:00:00Z`);
  at.setUTCDate(at.getUTCDate() - ((at.getUTCDay() + 6) % 7));
  return at.toISOString().slice(0, 10);
}
