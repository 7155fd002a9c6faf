import type { WeekSpan } from '#contracts/hours.ts';
import { rulePartsOf, weekdays, type Weekday } from '#contracts/recurrence.ts';
import type { Opening } from '#server/db/resources.ts';

const MINUTE = 60_000;
const DAY_MINUTES = 1440;

/** A rule of the usual week: every week, on named days, until a day perhaps. */
type Plain = { opening: Opening; days: Weekday[]; until: string | null };

/** Days the usual week of a rule ends on are kept as a local UNTIL of that day's last second. */
const lastDayOf = (until: string | undefined): string | null =>
  until === undefined ? null : `${until.slice(0, 4)}-${until.slice(4, 6)}-${until.slice(6, 8)}`;

function plainOf(opening: Opening): Plain | null {
  if (opening.rule === null) return null;
  const parts = rulePartsOf(opening.rule);
  const isPlain = [...parts.keys()].every((name) => ['FREQ', 'BYDAY', 'WKST', 'UNTIL'].includes(name));
  const until = parts.get('UNTIL');
  const days = parts.get('BYDAY')?.split(',') ?? [];
  if (!isPlain || parts.get('FREQ') !== 'WEEKLY' || days.length === 0) return null;
  if (until !== undefined && !/^\d{8}(T235959)?$/.test(until)) return null;
  return { opening, days: days as Weekday[], until: lastDayOf(until) };
}

const startDay = ({ startsLocal }: Opening): string => startsLocal.slice(0, 10);
const startMinute = ({ startsLocal }: Opening): number =>
  Number(startsLocal.slice(11, 13)) * 60 + Number(startsLocal.slice(14, 16));

const spansOf = (plain: readonly Plain[]): WeekSpan[] =>
  plain
    .flatMap(({ opening, days }) =>
      days.map((day) => ({ day, from: startMinute(opening), to: startMinute(opening) + opening.minutes })),
    )
    .sort((a, b) => weekdays.indexOf(a.day) - weekdays.indexOf(b.day) || a.from - b.from);

export type OpeningWeek = {
  /** The usual week as it holds on the day. */
  week: WeekSpan[];
  /** A week that begins later. */
  next: { from: string; week: WeekSpan[] } | null;
  /** What is no part of a usual week and is not over yet. */
  extra: Opening[];
};

/** Opening hours as people think of them, from a calendar day (`2026-03-10`) on. */
export function openingWeek(openings: readonly Opening[], today: string): OpeningWeek {
  const plain = openings.flatMap((opening) => plainOf(opening) ?? []);
  const lasting = plain.filter(({ until }) => until === null || until >= today);
  const later = lasting.filter(({ opening }) => startDay(opening) > today);
  const first = later.map(({ opening }) => startDay(opening)).sort()[0];
  return {
    week: spansOf(lasting.filter(({ opening }) => startDay(opening) <= today)),
    next: first === undefined ? null : { from: first, week: spansOf(later) },
    extra: openings.filter((opening) => plainOf(opening) === null && !isOver(opening, today)),
  };
}

function isOver(opening: Opening, today: string): boolean {
  if (opening.rule === null) return startDay(opening) < today;
  const until = rulePartsOf(opening.rule).get('UNTIL');
  return until !== undefined && (lastDayOf(until) ?? '') < today;
}

export type WeekChange = { end: { id: string; rule: string }[]; remove: string[]; add: Omit<Opening, 'id'>[] };

const dayBefore = (day: string): string =>
  new Date(Date.parse(`${day}T12:00:00Z`) - DAY_MINUTES * MINUTE).toISOString().slice(0, 10);

/**
 * What to write so that the usual week is another one from `from` on: what holds now ends the day before, so that the
 * past stays as it was; what would begin later is taken away.
 */
export function changeWeek(openings: readonly Opening[], from: string, week: readonly WeekSpan[]): WeekChange {
  const plain = openings.flatMap((opening) => plainOf(opening) ?? []);
  const last = dayBefore(from);
  const remove = plain.filter(({ opening }) => startDay(opening) >= from).map(({ opening }) => opening.id);
  const end = plain
    .filter(({ opening, until }) => startDay(opening) < from && (until === null || until > last))
    .map(({ opening }) => ({ id: opening.id, rule: endingOn(opening.rule ?? '', last) }));
  return { end, remove, add: rulesFor(week, from) };
}

const endingOn = (rule: string, day: string): string =>
  [
    ...rule
      .replace(/^RRULE:/i, '')
      .split(';')
      .filter((part) => !/^UNTIL=/i.test(part)),
    `UNTIL=${day.replaceAll('-', '')}T235959`,
  ].join(';');

/** One rule for all days of the same hours. */
function rulesFor(week: readonly WeekSpan[], from: string): Omit<Opening, 'id'>[] {
  const byHours = new Map<string, WeekSpan[]>();
  for (const span of week) {
    const key = `${span.from} ${span.to}`;
    byHours.set(key, [...(byHours.get(key) ?? []), span]);
  }
  return [...byHours.values()].flatMap((spans) => {
    const [first] = spans;
    if (!first) return [];
    const days = weekdays.filter((day) => spans.some((span) => span.day === day));
    const time = `${String(Math.floor(first.from / 60)).padStart(2, '0')}:${String(first.from % 60).padStart(2, '0')}`;
    return {
      startsLocal: `${from}T${time}`,
      rule: `FREQ=WEEKLY;BYDAY=${days.join(',')}`,
      minutes: first.to - first.from,
    };
  });
}
