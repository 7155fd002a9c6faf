import type { Sheet } from './sheet-of.ts';
import { readTable, type TraceTable } from './csv/read-table.ts';
import type { Values } from './desk-state.ts';
import { judge, type Judged } from './judge.ts';
import { packTrace, type PackedTrace } from './pack-trace.ts';
import { thinned } from './plot-geometry.ts';
import type { Answer } from './reader.ts';
import { traceOf, type TraceChoice } from './trace.ts';
import type { Unit } from './typed.ts';

/** What the page needs to know of a file; its readings stay where they were read. */
export type TraceHead = Pick<TraceTable, 'layout' | 'rows' | 'bad' | 'badCount'> & {
  columns: { name: string; unit: Unit | null; hottest: number }[];
};
export type JudgeQuestion = { values: Values; choice: TraceChoice; sheet: Sheet; unit: Unit };
/** `trace` is thinned to what can be drawn; figures are of all readings. */
export type JudgeAnswer = Answer<Judged | 'no-cure' | 'no-rows'>;

export type TraceDeed =
  { kind: 'read'; text: string } | { kind: 'judge'; question: JudgeQuestion } | { kind: 'pack'; choice: TraceChoice };
export type TraceReply =
  | { kind: 'read'; result: { ok: true; head: TraceHead } | { ok: false; what: string } }
  | { kind: 'judge'; answer: JudgeAnswer }
  | { kind: 'pack'; packed: PackedTrace };

const drawn = 1000;

/** Reads a file and answers about it. A hundred thousand rows take it a second: it works in a worker where there is one. */
export function traceEngine() {
  let table: TraceTable | null = null;
  const there = (): TraceTable => {
    if (!table) throw new Error('No file was read.');
    return table;
  };
  return async (
    deed: TraceDeed,
    options: { signal?: AbortSignal; onProgress?: (share: number) => void } = {},
  ): Promise<TraceReply> => {
    switch (deed.kind) {
      case 'read': {
        const result = await readTable(deed.text, options);
        if (!result.ok) return { kind: 'read', result };
        table = result.table;
        return { kind: 'read', result: { ok: true, head: headOf(table) } };
      }
      case 'judge': {
        const { values, choice, sheet, unit } = deed.question;
        return { kind: 'judge', answer: forDrawing(judge(values, traceOf(there(), choice), sheet, unit)) };
      }
      case 'pack':
        return { kind: 'pack', packed: await packTrace(traceOf(there(), deed.choice)) };
      default:
        return deed satisfies never;
    }
  };
}

const headOf = ({ layout, rows, bad, badCount, columns }: TraceTable): TraceHead => ({
  ...{ layout, rows, bad, badCount },
  columns: columns.map(({ name, unit, values }) => ({
    name,
    unit,
    hottest: values.reduce((most, value) => (value > most ? value : most), -Infinity),
  })),
});

function forDrawing(answer: JudgeAnswer): JudgeAnswer {
  if (!answer.ok || typeof answer.value === 'string') return answer;
  const points = answer.value.trace.map(({ minutes, metalCelsius }) => ({ x: minutes, y: metalCelsius }));
  const trace = thinned(points, drawn).map(({ x, y }) => ({ minutes: x, metalCelsius: y }));
  return { ...answer, value: { ...answer.value, trace } };
}
