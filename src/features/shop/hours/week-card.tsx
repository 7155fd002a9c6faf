import type { WeekSpan } from '#contracts/hours.ts';
import { weekdays } from '#contracts/recurrence.ts';
import { useFormats } from '#src/lib/session.ts';
import { weekdayWord } from '../parts/recurrence-words.ts';
import { sayDay } from './model/week-form.ts';

/** Opening hours of the seven days side by side; on a phone below each other. */
export function WeekCard({ week }: { week: readonly WeekSpan[] }) {
  const { clock } = useFormats();
  return (
    <dl className="card grid divide-line max-md:divide-y md:grid-cols-7 md:divide-x">
      {weekdays.map((day) => {
        const hours = sayDay(week, day, clock);
        return (
          <div key={day} className="flex items-baseline justify-between gap-3 px-4 py-2.5 md:flex-col md:gap-1">
            <dt className="text-[0.8125rem] font-semibold text-muted">{weekdayWord[day]}</dt>
            <dd className={hours ? 'figures font-semibold' : 'text-muted'}>
              {hours
                ? hours.split(', ').map((span) => (
                    <span key={span} className="block">
                      {span.replace('-', ' to ')}
                    </span>
                  ))
                : 'closed'}
            </dd>
          </div>
        );
      })}
    </dl>
  );
}
