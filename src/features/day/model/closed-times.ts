import type { DayRow, DayView } from '#contracts/day.ts';

/** Time in which a row (or, with `rowId` null, the whole shop) is not used. Milliseconds. */
export type ClosedTime = {
  id: string;
  rowId: string | null;
  from: number;
  to: number;
  kind: DayRow['closed'][number]['kind'] | 'shut' | 'off';
  label: string;
};

type Stretch = { from: number; to: number };
const ms = (span: { from: string; to: string }): Stretch => ({ from: Date.parse(span.from), to: Date.parse(span.to) });

/** What is left of `whole` outside the given stretches. */
export function outside(whole: Stretch, inside: readonly Stretch[]): Stretch[] {
  const gaps: Stretch[] = [];
  let at = whole.from;
  for (const { from, to } of [...inside].sort((a, b) => a.from - b.from)) {
    if (from > at) gaps.push({ from: at, to: Math.min(from, whole.to) });
    at = Math.max(at, to);
    if (at >= whole.to) return gaps;
  }
  if (at < whole.to) gaps.push({ from: at, to: whole.to });
  return gaps;
}

/** Shop shut (all rows at once), people off shift, and what is closed by name. */
export function closedTimes(view: DayView): ClosedTime[] {
  const whole = ms(view.span);
  const shut = outside(whole, view.open.map(ms)).map((gap): ClosedTime => {
    return { id: `shut ${gap.from}`, rowId: null, ...gap, kind: 'shut', label: '' };
  });
  return shut.concat(view.rows.flatMap((row) => [...offShift(row, whole), ...byName(row)]));
}

function offShift(row: DayRow, whole: Stretch): ClosedTime[] {
  if (!row.working) return [];
  return outside(whole, row.working.map(ms)).map((gap): ClosedTime => {
    return { id: `off ${row.id} ${gap.from}`, rowId: row.id, ...gap, kind: 'off', label: '' };
  });
}

const byName = (row: DayRow): ClosedTime[] =>
  row.closed.map(({ kind, label, ...span }): ClosedTime => {
    return { id: `${kind} ${row.id} ${span.from}`, rowId: row.id, ...ms(span), kind, label };
  });
