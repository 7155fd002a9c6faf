import { instantOf, localDayOf, readLocal } from '#server/planning/local-time.ts';

const DAY = 24 * 60 * 60_000;

/** Working days are Monday to Friday. Day 0 is the present one, or the next where now is a weekend. */
export type DemoCalendar = {
  now: Date;
  zone: string;
  /** An instant on a working day, by the shop's clock. */
  at(day: number, time: string): Date;
  /** Local wall time `YYYY-MM-DDTHH:MM` on the Monday from which everything that recurs is counted. */
  recurringFrom(time: string): string;
  /** The calendar day that lies whole months before the present one. */
  monthsAgo(months: number): string;
};

export function demoCalendar(now: Date, zone: string): DemoCalendar {
  const midnight = readLocal(`${localDayOf(now, zone)}T00:00`);
  const iso = (floating: number): string => new Date(floating).toISOString();
  return {
    now,
    zone,
    at: (day, time) => instantOf(readLocal(`${iso(workday(midnight, day)).slice(0, 10)}T${time}`), zone),
    recurringFrom: (time) => {
      const back = midnight - 56 * DAY;
      const monday = back - ((new Date(back).getUTCDay() + 6) % 7) * DAY;
      return `${iso(monday).slice(0, 10)}T${time}`;
    },
    monthsAgo: (months) => {
      const day = new Date(midnight);
      // Day 28 is in every month.
      return iso(Date.UTC(day.getUTCFullYear(), day.getUTCMonth() - months, Math.min(28, day.getUTCDate()))).slice(
        0,
        10,
      );
    },
  };
}

const isWorkday = (floating: number): boolean => ![0, 6].includes(new Date(floating).getUTCDay());

function workday(midnight: number, day: number): number {
  let at = midnight;
  if (day >= 0) while (!isWorkday(at)) at += DAY;
  for (let left = Math.abs(day); left > 0;) {
    at += Math.sign(day) * DAY;
    if (isWorkday(at)) left -= 1;
  }
  return at;
}
