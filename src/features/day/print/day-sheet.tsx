import type { DayView } from '#contracts/day.ts';
import { fractionAt } from '../model/axis.ts';
import { numbersOf, wordsOf, type Say } from '../model/describe.ts';
import { instantOf } from '#src/lib/wall-clock.ts';
import { BarBody, BarWindow } from '../timeline/bar-body.tsx';
import { SheetList } from './sheet-list.tsx';
import { sheetDays, type SheetDay, type SheetRow } from './sheet-days.ts';

export type DaySheetProps = {
  view: DayView;
  days: readonly string[];
  zone: string;
  shopName: string;
  say: Say;
  printedAt: number;
};

/** What hangs on the booth door: black on white, a sheet a day, bars by pattern and a list with every time in figures. */
export function DaySheet({ view, days, zone, shopName, say, printedAt }: DaySheetProps) {
  const plan = view.shown === 'draft' ? 'Draft, not posted' : `Posted plan ${view.posted.number}`;
  return (
    <div className="day-sheet">
      {sheetDays(view, days, zone).map((sheet) => (
        <section key={sheet.day} className="sheet">
          <header>
            <h1>{say.day(instantOf(sheet.day, 12 * 60, zone))}</h1>
            <p>
              {shopName} · {plan} · printed {say.moment(printedAt)}
            </p>
          </header>
          <SheetChart sheet={sheet} say={say} />
          <SheetList sheet={sheet} say={say} />
          <footer>
            The maker’s data sheet, local fire and environmental codes and the licensed people responsible come before
            any time on this sheet. Supplied air for isocyanates. Nobody enters a booth during purge or bake.
          </footer>
        </section>
      ))}
    </div>
  );
}

function SheetChart({ sheet, say }: { sheet: SheetDay; say: Say }) {
  const left = (minute: number) => {
    const at = instantOf(sheet.day, minute, sheet.axis.zone);
    return { at, style: { left: `${fractionAt(sheet.axis, at) * 100}%` } };
  };
  return (
    <div className="sheet-chart">
      <div className="sheet-hours">
        {sheet.hours.map((minute) => (
          <span key={minute} style={left(minute).style}>
            {say.time(left(minute).at)}
          </span>
        ))}
      </div>
      {sheet.rows.map((row) => (
        <ChartRow key={row.row.id} row={row} sheet={sheet} />
      ))}
    </div>
  );
}

function ChartRow({ row, sheet }: { row: SheetRow; sheet: SheetDay }) {
  return (
    <div className="sheet-row">
      <b>{row.row.name}</b>
      <div className="sheet-lane" style={{ height: `${row.lanes * 48 + 2}px` }}>
        {row.bars.map(({ item, lane }) => {
          const from = fractionAt(sheet.axis, item.from) * 100;
          const width = fractionAt(sheet.axis, item.to) * 100 - from;
          const room = row.lanes > 1 ? 100 : item.shape.labelRoom;
          return (
            <div
              key={item.id}
              className="bar sheet-bar"
              style={{ left: `${from}%`, width: `${width}%`, top: `${lane * 48}px` }}
            >
              <div className="bar-label" style={{ width: `${room}%` }}>
                <span className="bar-label-text">
                  <b>{numbersOf(item.members)}</b>
                  {item.members.some((bar) => bar.late) && <em className="bar-late-word">late</em>}
                  <span className="bar-words">{wordsOf(item, '')}</span>
                </span>
              </div>
              <BarBody item={item} />
              <BarWindow shape={item.shape} whole={false} />
            </div>
          );
        })}
      </div>
    </div>
  );
}
