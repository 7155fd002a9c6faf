import type { Shift } from '#contracts/people.ts';
import { weekdays } from '#contracts/recurrence.ts';
import { weekOf, type DayHours } from '#contracts/week.ts';
import { formatMinute } from '#src/lib/formats.ts';
import { sayRecurrence } from '../../parts/recurrence-words.ts';

const short = { MO: 'Mon', TU: 'Tue', WE: 'Wed', TH: 'Thu', FR: 'Fri', SA: 'Sat', SU: 'Sun' };

/** Hours in a line for each kind of day: `Mon to Fri 7:00 to 15:30`. */
export function sayShifts(shifts: readonly Shift[], clock: '24' | '12'): string[] {
  const week = weekOf(shifts);
  if (!week) return shifts.map((shift) => sayRecurrence(shift, clock));
  const said = (hours: DayHours) => `${formatMinute(hours.from, clock)} to ${formatMinute(hours.to % 1440, clock)}`;
  const runs: { first: string; last: string; days: number; hours: string }[] = [];
  let open = false;
  for (const day of weekdays) {
    const hours = week[day];
    const run = runs.at(-1);
    if (hours && open && run?.hours === said(hours)) Object.assign(run, { last: short[day], days: run.days + 1 });
    else if (hours) runs.push({ first: short[day], last: short[day], days: 1, hours: said(hours) });
    open = hours !== null;
  }
  return runs.map(({ first, last, days, hours }) => {
    const joint = days === 2 ? ' and ' : ' to ';
    return `${days === 1 ? first : `${first}${joint}${last}`} ${hours}`;
  });
}
