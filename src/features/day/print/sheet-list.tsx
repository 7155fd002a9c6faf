import type { Drawn } from '../model/board.ts';
import { numbersOf, type Say } from '../model/describe.ts';
import { windowOf } from '../model/window-of.ts';
import type { SheetDay } from './sheet-days.ts';

/** The same bars in figures, place by place. */
export function SheetList({ sheet, say }: { sheet: SheetDay; say: Say }) {
  const rows = sheet.rows.filter((row) => row.bars.length > 0);
  if (rows.length === 0) return <p>Nothing is booked on this day.</p>;
  return (
    <table className="sheet-list">
      <thead>
        <tr>
          {['Place', 'From', 'To', 'Job', 'Part', 'Stage', 'Who', 'Start by', ''].map((head) => (
            <th key={head} scope="col">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      {rows.map(({ row, bars }) => (
        <tbody key={row.id}>
          {bars.map(({ item }, i) => (
            <ListLine key={item.id} item={item} place={i === 0 ? row.name : ''} say={say} />
          ))}
        </tbody>
      ))}
    </table>
  );
}

function ListLine({ item, place, say }: { item: Drawn; place: string; say: Say }) {
  const [head] = item.members;
  const { latest } = windowOf(item.members);
  const marks = [
    item.members.some((bar) => bar.late) ? 'late' : '',
    item.members.some((bar) => bar.pinned) ? 'pinned' : '',
    head.state === 'planned' ? '' : head.state,
  ];
  return (
    <tr>
      <th scope="row">{place}</th>
      <td>{say.time(item.from)}</td>
      <td>{say.time(item.to)}</td>
      <td>{numbersOf(item.members)}</td>
      <td>{[...new Set(item.members.map((bar) => bar.partNames))].join(' + ')}</td>
      <td>
        {head.title}, {head.wayLabel}
      </td>
      <td>{head.personName ?? ''}</td>
      <td>{latest === null ? '' : say.moment(Date.parse(latest))}</td>
      <td>{marks.filter(Boolean).join(', ')}</td>
    </tr>
  );
}
