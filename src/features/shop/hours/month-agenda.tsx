import { Link } from 'react-router-dom';
import { cx } from '#src/lib/cx.ts';
import { formatDay } from '#src/lib/formats.ts';
import { useFormats } from '#src/lib/session.ts';
import type { Hours, MonthDay, MonthEntry } from './model/month.ts';
import { kindOfEntry, nameOfEntry, sayEntryTime, sayHours } from './month-words.ts';

type DaysProps = { days: readonly MonthDay[]; things: Hours; linkOf: (entry: MonthEntry) => string | null };

/** The month by day, below each other: for a phone. Days that are past are folded away where others follow. */
export function MonthAgenda({ days, ...rest }: DaysProps) {
  const { today } = useFormats();
  const past = days.filter(({ day }) => day < today());
  const ahead = days.filter(({ day }) => day >= today());
  if (past.length === 0 || ahead.length === 0) return <Days days={days} {...rest} />;
  return (
    <>
      <details>
        <summary className="cursor-pointer py-2 font-semibold">Earlier this month</summary>
        <Days days={past} {...rest} />
      </details>
      <Days days={ahead} {...rest} />
    </>
  );
}

function Days({ days, ...rest }: DaysProps) {
  const formats = useFormats();
  return (
    <ol className="card divide-y divide-line">
      {days.map((one) => (
        <li key={one.day} className={cx('px-4 py-2.5', one.isShut && 'day-shut')}>
          <div className="flex items-baseline justify-between gap-3">
            <h4 className={cx('font-semibold', one.day === formats.today() && 'text-ember')}>
              {formatDay(one.day)}
              {one.day === formats.today() && ', today'}
            </h4>
            <span className={cx('figures text-right', one.isShut && 'text-muted')}>
              {sayHours(one, formats).join(', ')}
            </span>
          </div>
          {one.entries.length > 0 && <DayEntries day={one} {...rest} />}
        </li>
      ))}
    </ol>
  );
}

type DayEntriesProps = { day: MonthDay; things: Hours; linkOf: (entry: MonthEntry) => string | null };

/** All of a day, each as a way to where it is changed. */
export function DayEntries({ day, things, linkOf }: DayEntriesProps) {
  const formats = useFormats();
  return (
    <ul className="mt-1.5 flex flex-col gap-1.5">
      {day.entries.map((entry) => {
        const to = linkOf(entry);
        const said = (
          <span className="closed-text">
            <b>{nameOfEntry(entry)}</b> <span>{kindOfEntry(entry, things)}</span>{' '}
            <span className="figures">{sayEntryTime(entry, day.day, formats)}</span>
          </span>
        );
        const look = cx('closed-box block px-2 py-1.5', `closed-${entry.closure.kind}`);
        return (
          <li key={entry.key}>
            {to === null ? (
              <div className={look}>{said}</div>
            ) : (
              <Link to={to} className={look}>
                {said}
              </Link>
            )}
          </li>
        );
      })}
    </ul>
  );
}
