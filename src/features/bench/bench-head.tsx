import { useQuery } from '@tanstack/react-query';
import { ChevronLeft, ChevronRight } from 'lucide-react';
import type { BenchView } from '#contracts/bench.ts';
import { formatDay, formatNearDay } from '#src/lib/formats.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { addDays } from '#src/lib/calendar-days.ts';
import { Button } from '#src/ui/button.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { Select } from '#src/ui/select.tsx';
import { peopleQuery, type BenchAsked } from './data/bench-queries.ts';

type BenchHeadProps = {
  data: BenchView | undefined;
  asked: BenchAsked;
  go: (part: { day?: string | null; person?: string }) => void;
};

/** Which day, whose bench, and from when to when that person works. */
export function BenchHead({ data, asked, go }: BenchHeadProps) {
  const { today } = useFormats();
  const day = asked.day ?? data?.day ?? today();
  const toDay = (next: string) => go({ day: next === today() ? null : next });
  const near = formatNearDay(day, today());
  return (
    <header className="flex flex-col gap-3">
      <div className="flex items-center gap-2">
        <IconButton
          bordered
          size="bay"
          label="Day before"
          icon={<ChevronLeft size={26} aria-hidden="true" />}
          onClick={() => toDay(addDays(day, -1))}
        />
        <div className="min-w-0 grow text-center">
          <h1 className="text-xl first-letter:uppercase sm:text-2xl">{near}</h1>
          <p className="text-muted">{formatDay(day, 'long')}</p>
        </div>
        <IconButton
          bordered
          size="bay"
          label="Day after"
          icon={<ChevronRight size={26} aria-hidden="true" />}
          onClick={() => toDay(addDays(day, 1))}
        />
      </div>
      <div className="flex flex-wrap items-end justify-between gap-x-4 gap-y-2">
        <Whose data={data} asked={asked} day={day} onPerson={(person) => go({ person })} />
        {asked.day !== undefined && asked.day !== today() && (
          <Button size="bay" onClick={() => go({ day: null })}>
            Back to today
          </Button>
        )}
      </div>
    </header>
  );
}

type WhoseProps = Pick<BenchHeadProps, 'data' | 'asked'> & { day: string; onPerson: (person: string) => void };

function Whose({ data, asked, day, onPerson }: WhoseProps) {
  const shop = useShop();
  const { zone } = useFormats();
  const isLead = may.plan(shop.role);
  const { data: people } = useQuery({ ...peopleQuery(shop.id, day, zone), enabled: isLead });
  const shifts = <Shifts working={data?.working ?? []} />;
  if (!isLead || !people)
    return (
      <p className="text-base">
        <b>{data?.person?.name}</b> {shifts}
      </p>
    );
  const chosen = asked.personId ?? data?.person?.id ?? '';
  return (
    <div className="flex min-w-0 flex-wrap items-center gap-x-3 gap-y-1 text-base">
      <Select
        label="Whose bench"
        hideLabel
        className="w-56"
        value={chosen}
        onChange={(event) => onPerson(event.target.value === shop.personId ? '' : event.target.value)}
      >
        {chosen === '' && <option value="">Choose a person</option>}
        {people.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </Select>
      {shifts}
    </div>
  );
}

function Shifts({ working }: { working: BenchView['working'] }) {
  const { span } = useFormats();
  if (working.length === 0) return null;
  return <span className="figures text-muted">{working.map(({ from, to }) => span(from, to)).join(', ')}</span>;
}
