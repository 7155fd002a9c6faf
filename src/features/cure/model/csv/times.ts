const clock = /^(\d{1,4}):(\d{2})(?::(\d{2})(?:[.,](\d+))?)?\s*(am|pm)?$/i;
const iso = /^(\d{4})-(\d{1,2})-(\d{1,2})(?:[T ](.+?))?(Z|[+-]\d{2}:?\d{2})?$/i;
const european = /^(\d{1,2})([./-])(\d{1,2})\2(\d{2,4})(?:,?\s+(.+))?$/;

const day = 86_400;

export type Moment = {
  seconds: number;
  /** `clock`: time of day or elapsed, begins anew at midnight; `date`: a moment; `number`: in a unit to be told. */
  kind: 'clock' | 'date' | 'number';
};
export type DateOrder = 'day-first' | 'month-first';

/** A logger's time cell. Numbers come back as they stand. Null where it is no time. */
export function momentOf(cell: string, order: DateOrder = 'day-first'): Moment | null {
  const text = cell.trim();
  const plain = text.replace(',', '.');
  if (/^\d+(\.\d*)?$|^\.\d+$/.test(plain)) return { seconds: Number(plain), kind: 'number' };
  const time = clockSeconds(text);
  if (time !== null) return { seconds: time, kind: 'clock' };
  const seconds = isoSeconds(text) ?? writtenSeconds(text, order);
  return seconds === null ? null : { seconds, kind: 'date' };
}

/** `10:05`, `10:05:30`, `10:05:30.250`, `1:05 pm`, and elapsed `125:00:00`: hours first. */
export function clockSeconds(text: string): number | null {
  const match = clock.exec(text.trim());
  if (!match) return null;
  const [, hours = '', minutes = '', seconds = '0', part = '0', half] = match;
  if (Number(minutes) > 59 || Number(seconds) > 59 || (half !== undefined && (Number(hours) > 12 || hours === '0')))
    return null;
  const hour = half === undefined ? Number(hours) : (Number(hours) % 12) + (half.toLowerCase() === 'pm' ? 12 : 0);
  return hour * 3600 + Number(minutes) * 60 + Number(seconds) + Number(`0.${part}`);
}

function isoSeconds(text: string): number | null {
  const match = iso.exec(text);
  if (!match) return null;
  const [, year, month, date, time, zone] = match;
  return onDate(Number(year), Number(month), Number(date), time, zoneSeconds(zone));
}

/** `12.03.2026 10:05:30` or `3/12/2026 10:05 AM`. */
function writtenSeconds(text: string, order: DateOrder): number | null {
  const match = european.exec(text);
  if (!match) return null;
  const [, first, sign, second, year, time] = match;
  const monthFirst = order === 'month-first' && sign !== '.';
  const [month, date] = monthFirst ? [Number(first), Number(second)] : [Number(second), Number(first)];
  return onDate(Number(year) < 100 ? 2000 + Number(year) : Number(year), month, date, time, 0);
}

function onDate(year: number, month: number, date: number, time: string | undefined, zone: number): number | null {
  const seconds = time === undefined ? 0 : clockSeconds(time);
  const noon = new Date(Date.UTC(year, month - 1, date, 12));
  if (seconds === null || seconds >= day || noon.getUTCMonth() !== month - 1) return null;
  return Date.UTC(year, month - 1, date) / 1000 + seconds - zone;
}

function zoneSeconds(zone: string | undefined): number {
  if (zone === undefined || /^z$/i.test(zone)) return 0;
  const sign = zone.startsWith('-') ? -1 : 1;
  return sign * (Number(zone.slice(1, 3)) * 3600 + Number(zone.slice(-2)) * 60);
}

/** A clock that jumps back by more than half a day has passed midnight: so many seconds to add from there on. */
export const pastMidnight = (before: number, now: number): number => (before - now > day / 2 ? day : 0);
