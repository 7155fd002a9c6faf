import { isDay, rankOf, readRecurrence, weekdayOf, type RecurrenceForm, type Repeat } from './recurrence.ts';

/** Another first day: last day, weekday and rank go along as long as they were that day's own. */
export function toDay(form: RecurrenceForm, day: string): RecurrenceForm {
  if (!isDay(day)) return { ...form, day };
  // While one types a date it is none for a moment; the end still holds the day before then.
  const before = isDay(form.day) ? form.day : form.endDay;
  const own = { weekdays: [weekdayOf(day)], rank: { rankDay: weekdayOf(day), rank: rankOf(day) } };
  return {
    ...form,
    day,
    endDay: form.endDay === before || form.endDay < day ? day : form.endDay,
    ...(form.weekdays.join() === weekdayOf(before) ? { weekdays: own.weekdays } : {}),
    ...(form.rankDay === weekdayOf(before) && form.rank === rankOf(before) ? own.rank : {}),
  };
}

/** Another way to recur. A rule of its own begins with what the fields say so far. */
export function toRepeat(form: RecurrenceForm, repeat: Repeat): RecurrenceForm {
  if (repeat !== 'own' || form.repeat === 'own') return { ...form, repeat };
  const said = readRecurrence(form, 'length').value?.rule ?? 'FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-1';
  return { ...form, repeat, rule: said };
}
