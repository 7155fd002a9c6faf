import type { DayView } from '#contracts/day.ts';
import type { Formats } from '#src/lib/formats.ts';
import { Badge } from '#src/ui/badge.tsx';

const count = (n: number, one: string, many = `${one}s`) => `${n} ${n === 1 ? one : many}`;

/** Which plan is on the board and how it stands to the other one. */
export function PlanState({ view, formats }: { view: DayView; formats: Formats }) {
  const { draft, posted, shown } = view;
  const postedName = posted.number === 0 ? 'nothing posted yet' : `posted plan ${posted.number}`;
  if (shown === 'posted' || !draft) {
    const when = posted.at === null ? '' : `, ${formats.dateTime(posted.at)}${posted.by ? ` by ${posted.by}` : ''}`;
    return (
      <span className="figures">
        {capital(postedName)}
        {when}
        {draft ? ` · a draft with ${count(draft.changes, 'change')} is open` : ''}
      </span>
    );
  }
  return (
    <span className="figures inline-flex flex-wrap items-center gap-x-2 gap-y-1">
      <span>
        Draft, {count(draft.changes, 'change')} from {postedName}
        {draft.updatedBy ? ` · last by ${draft.updatedBy}, ${formats.dateTime(draft.updatedAt)}` : ''}
      </span>
      {draft.late > 0 && <Badge tone="crimson">{count(draft.late, 'promise')} late</Badge>}
      {draft.behind && <Badge tone="amber">the posted plan has moved on</Badge>}
    </span>
  );
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);
