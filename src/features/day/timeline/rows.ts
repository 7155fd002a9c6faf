import { factsOf } from '../model/describe.ts';
import type { DayRow, DayView } from '#contracts/day.ts';

export type RowGroup = 'Booths' | 'Prep stations' | 'Racks' | 'Cure lamps' | 'Circuit load' | 'People';
/** A row as the timeline wants it. */
export type TimelineRow = {
  id: string;
  title: string;
  group: RowGroup;
  order: number;
  facts: string;
  kind: DayRow['kind'] | 'circuit';
};

const groups: Record<DayRow['kind'], RowGroup> = {
  booth: 'Booths',
  prep: 'Prep stations',
  rack: 'Racks',
  lamp: 'Cure lamps',
  person: 'People',
};
const groupOrder: RowGroup[] = ['Booths', 'Prep stations', 'Racks', 'Cure lamps', 'Circuit load', 'People'];

/** Rows group by group; a circuit that feeds lamps gets a strip of its own below them. */
export function rowsOf(view: DayView, people: boolean): TimelineRow[] {
  const circuits = new Map(view.circuits.map((circuit) => [circuit.id, circuit.name]));
  const feeding = view.circuits.filter((circuit) => view.rows.some((row) => row.circuitId === circuit.id));
  const strips = feeding.map((circuit): Omit<TimelineRow, 'order'> => {
    return {
      id: circuit.id,
      title: circuit.name,
      group: 'Circuit load',
      facts: `limit ${circuit.kilowatts} kW`,
      kind: 'circuit',
    };
  });
  const rows = view.rows
    .filter((row) => people || row.kind !== 'person')
    .map((row): Omit<TimelineRow, 'order'> => {
      return { id: row.id, title: row.name, group: groups[row.kind], facts: factsOf(row, circuits), kind: row.kind };
    });
  return [...rows, ...strips]
    .sort((a, b) => groupOrder.indexOf(a.group) - groupOrder.indexOf(b.group))
    .map((row, order) => ({ ...row, order }));
}
