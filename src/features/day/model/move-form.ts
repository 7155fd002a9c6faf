import { localDay } from '#contracts/common.ts';
import type { Bar } from '#contracts/day.ts';
import { parseLooseTime } from '#src/lib/loose-time.ts';
import { instantOf, localDayOf, minuteOfDay } from '#src/lib/wall-clock.ts';
import type { Move } from './move-in-view.ts';

/** What is typed into the form. `personId` empty: whoever has it keeps it if free. */
export type MoveEntry = { placeId: string; day: string; time: string; personId: string; pinned: boolean };
export type EntryFault = { field: 'day' | 'time'; message: string };

export const entryOf = (bar: Bar, zone: string, sayTime: (at: string) => string): MoveEntry => ({
  placeId: bar.placeId,
  day: localDayOf(Date.parse(bar.from), zone),
  time: sayTime(bar.from),
  personId: '',
  pinned: bar.pinned,
});

/** The move that was meant, or what cannot be understood. Only what was chosen is part of it. */
export function moveOf(entry: MoveEntry, bar: Bar, zone: string): Move | EntryFault {
  const day = localDay.safeParse(entry.day);
  if (!day.success) return { field: 'day', message: 'Give a day of the calendar.' };
  const minute = parseLooseTime(entry.time);
  if (minute === null) return { field: 'time', message: 'Give a time, such as 9, 9:30, 930 or 2 pm.' };
  return {
    stageId: bar.id,
    start: startOf(day.data, minute, bar, zone),
    placeId: entry.placeId,
    ...(entry.personId === '' ? {} : { personId: entry.personId }),
    ...(entry.pinned === bar.pinned ? {} : { pinned: entry.pinned }),
  };
}

/** Times are typed in whole minutes: a start within the minute that is shown already stays to the second. */
function startOf(day: string, minute: number, bar: Bar, zone: string): string {
  const from = Date.parse(bar.from);
  if (localDayOf(from, zone) === day && minuteOfDay(from, zone) === minute) return bar.from;
  return new Date(instantOf(day, minute, zone)).toISOString();
}

export const isFault = (result: Move | EntryFault): result is EntryFault => 'field' in result;
