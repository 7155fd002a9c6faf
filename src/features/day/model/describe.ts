import type { Drawn } from './board.ts';
import type { Bar, DayRow } from '#contracts/day.ts';

/** How times (ms) are said: in the shop's zone, by the reader's clock. `moment` is day and time, `day` the day in full. */
export type Say = { time: (at: number) => string; moment: (at: number) => string; day: (at: number) => string };

const stateWords: Record<Bar['state'], string> = { planned: 'planned', running: 'running now', done: 'done' };

/** `2420 + 2425` */
export const numbersOf = (members: readonly Bar[]): string => members.map((bar) => bar.jobNumber).join(' + ');

/** What stands beside the number: part, stage, painter. */
export function wordsOf(item: Pick<Drawn, 'kind' | 'members'>, placeName: string): string {
  const [head] = item.members;
  const parts = [...new Set(item.members.map((bar) => bar.partNames))].join(' + ');
  if (item.kind === 'lamp') return placeName;
  if (item.kind === 'hands') return `${head.title.toLowerCase()} · ${placeName}`;
  return [parts, head.title.toLowerCase(), head.personName].filter(Boolean).join(' · ');
}

/** The bar in one sentence, for ears and for the tooltip. */
export function describe(item: Drawn, names: ReadonlyMap<string, string>, say: Say): string {
  const [head] = item.members;
  const name = (id: string) => names.get(id) ?? '';
  const late = item.members.some((bar) => bar.late);
  const facts = [
    `${item.members.length > 1 ? 'Jobs' : 'Job'} ${numbersOf(item.members)}`,
    [...new Set(item.members.map((bar) => bar.partNames))].join(' and '),
    `${head.title}, ${head.wayLabel}`,
    item.kind === 'lamp' ? `${name(item.rowId)} at ${name(head.placeId)}` : name(head.placeId),
    `${say.time(item.from)} to ${say.time(item.to)}`,
    head.personName ?? (head.needsHands ? 'nobody yet' : ''),
    stateWords[head.state],
    item.members.some((bar) => bar.pinned) ? 'pinned' : '',
    late ? 'late for its promise' : '',
    changeWords(item.members),
    windowWords(item, say),
  ];
  return facts.filter(Boolean).join(', ');
}

function changeWords(members: readonly Bar[]): string {
  if (members.some((bar) => bar.added)) return 'new in this draft';
  return members.some((bar) => bar.posted) ? 'moved in this draft' : '';
}

function windowWords(item: Drawn, say: Say): string {
  if (item.kind !== 'stage') return '';
  const { earliest, latest } = item.members[0].window;
  if (latest === null) return '';
  const to = `latest start ${say.moment(Date.parse(latest))}`;
  const tone = { room: '', closing: ', closing', outside: ', outside it' }[item.shape.tone];
  return `${earliest === null ? '' : `earliest start ${say.moment(Date.parse(earliest))}, `}${to}${tone}`;
}

/** The second line of a row: what it is good for. */
export function factsOf(row: DayRow, circuitNames: ReadonlyMap<string, string>): string {
  const units = row.units === null ? '' : `${row.units} ${row.units === 1 ? 'unit' : 'units'}`;
  const power = row.kilowatts === null ? '' : `${row.kilowatts} kW`;
  const circuit = row.circuitId === null ? '' : (circuitNames.get(row.circuitId) ?? '');
  return [units, row.zone ?? '', power, circuit].filter(Boolean).join(' · ');
}
