import { addDays } from './calendar-days.ts';
import { localDayOf } from './wall-clock.ts';

export type Reader = { zone: string; clock: '24' | '12'; unit: 'C' | 'F' };
type Moment = string | number | Date;

// Making a formatter costs a hundred times what using it does.
const made = new Map<string, Intl.DateTimeFormat>();
function formatter(zone: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = zone + JSON.stringify(options);
  let format = made.get(key);
  if (!format) made.set(key, (format = new Intl.DateTimeFormat('en-GB', { ...options, timeZone: zone })));
  return format;
}
const parts = (at: Moment, zone: string, options: Intl.DateTimeFormatOptions): Record<string, string> =>
  Object.fromEntries(
    formatter(zone, options)
      .formatToParts(new Date(at))
      .map(({ type, value }) => [type, value]),
  );

const noonOf = (day: string) => `${day}T12:00:00Z`;

/** `9:05` or `9:05 am` on the shop's clock. */
export function formatTime(at: Moment, { zone, clock }: Pick<Reader, 'zone' | 'clock'>): string {
  const { hour = '0', minute = '00' } = parts(at, zone, { hour: 'numeric', minute: '2-digit', hourCycle: 'h23' });
  return formatMinute(Number(hour) * 60 + Number(minute), clock);
}

/** Minutes since midnight as a time of day. */
export function formatMinute(minutes: number, clock: Reader['clock']): string {
  const hour = Math.floor(minutes / 60) % 24;
  const rest = String(minutes % 60).padStart(2, '0');
  if (clock === '24') return `${hour}:${rest}`;
  return `${hour % 12 === 0 ? 12 : hour % 12}:${rest} ${hour < 12 ? 'am' : 'pm'}`;
}

/** `Thu 12 Mar`; of another year with the year. `long`: `Thursday 12 March`. `day` is a day of the calendar. */
export function formatDay(day: string, style: 'short' | 'long' = 'short', today?: string): string {
  const p = parts(noonOf(day), 'UTC', { weekday: style, day: 'numeric', month: style, year: 'numeric' });
  const year = today !== undefined && today.slice(0, 4) !== day.slice(0, 4) ? ` ${p['year']}` : '';
  return `${p['weekday']} ${p['day']} ${p['month']}${year}`;
}

/** `today`, `tomorrow`, `yesterday`, else `Thu 12 Mar`. */
export function formatNearDay(day: string, today: string): string {
  if (day === today) return 'today';
  if (day === addDays(today, 1)) return 'tomorrow';
  if (day === addDays(today, -1)) return 'yesterday';
  return formatDay(day, 'short', today);
}

/** `45 min`, `1 h 30 min`, `2 days 3 h`. */
export function formatDuration(minutes: number): string {
  const total = Math.round(Math.abs(minutes));
  const [days, hours, rest] = [Math.floor(total / 1440), Math.floor((total % 1440) / 60), total % 60];
  const said = [
    days > 0 ? `${days} ${days === 1 ? 'day' : 'days'}` : '',
    hours > 0 ? `${hours} h` : '',
    rest > 0 && days === 0 ? `${rest} min` : '',
  ].filter(Boolean);
  return `${minutes < 0 ? '−' : ''}${said.join(' ') || '0 min'}`;
}

/** Degrees as the reader counts them. A limit is rounded down, so that it never reads higher than it is. */
export function formatTemperature(celsius: number, unit: Reader['unit'], kind: 'value' | 'limit' = 'value'): string {
  const exact = unit === 'C' ? celsius : (celsius * 9) / 5 + 32;
  // A hair is forgiven: 60 C is 140 F, not 139 with a rounding error.
  return `${kind === 'limit' ? Math.floor(exact + 1e-9) : Math.round(exact)} °${unit}`;
}
/** A difference has no zero point: 3 C of margin are 5.4 F. */
export function formatDegrees(celsius: number, unit: Reader['unit']): string {
  const exact = unit === 'C' ? celsius : celsius * 1.8;
  return `${Math.round(exact * 10) / 10} °${unit}`;
}

export type Formats = Reader & {
  /** `9:05`, `9:05 am`. */
  time: (at: Moment) => string;
  /** `Thu 12 Mar`. */
  date: (at: Moment) => string;
  /** `Thu 12 Mar 9:05`; near days by their names: `tomorrow 9:05`. */
  dateTime: (at: Moment) => string;
  /** `9:05 to 10:30`, the day only where it is another one. */
  span: (from: Moment, to: Moment) => string;
  /** `tomorrow 9:05 to 10:30`; the second day too where it is another one. */
  dateSpan: (from: Moment, to: Moment) => string;
  /** Calendar day of an instant in the shop, `2026-03-12`. */
  dayOf: (at: Moment) => string;
  today: () => string;
  duration: typeof formatDuration;
  temperature: (celsius: number, kind?: 'value' | 'limit') => string;
};

/** Formats for a reader; `now` only for what is said in relation to today. */
export function formatsFor(reader: Reader, now: () => number = Date.now): Formats {
  const { zone, unit } = reader;
  const dayOf = (at: Moment) => localDayOf(new Date(at).getTime(), zone);
  const today = () => dayOf(now());
  const time = (at: Moment) => formatTime(at, reader);
  const dateTime = (at: Moment) => `${formatNearDay(dayOf(at), today())} ${time(at)}`;
  const until = (from: Moment, to: Moment) => (dayOf(from) === dayOf(to) ? time(to) : dateTime(to));
  return {
    ...reader,
    time,
    dayOf,
    today,
    dateTime,
    date: (at) => formatDay(dayOf(at), 'short', today()),
    span: (from, to) => `${time(from)} to ${until(from, to)}`,
    dateSpan: (from, to) => `${dateTime(from)} to ${until(from, to)}`,
    duration: formatDuration,
    temperature: (celsius, kind) => formatTemperature(celsius, unit, kind),
  };
}
