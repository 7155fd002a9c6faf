import type { Bar, DayRow, DayView } from '#contracts/day.ts';

/** What is drawn in a row. `stage` in places, `lamp` where a lamp burns, `hands` where a person's hands are needed. */
export type Item = {
  id: string;
  kind: 'stage' | 'lamp' | 'hands';
  rowId: string;
  rowKind: DayRow['kind'];
  /** Milliseconds. */
  from: number;
  to: number;
  /** Stages of one load, in job order: one run, one bar. Never empty. */
  members: readonly [Bar, ...Bar[]];
};

const ms = (at: string) => Date.parse(at);

/** Everything to draw, from the server's answer. Bars of rows that are not there are left out. */
export function itemsOf(view: DayView): Item[] {
  const kinds = new Map(view.rows.map((row) => [row.id, row.kind]));
  return loadsOf(view.bars).flatMap((members) => {
    const place = stageItem(members, kinds);
    return place ? [place, ...lampItems(members, kinds), ...handsItems(members, kinds)] : [];
  });
}

type Kinds = ReadonlyMap<string, DayRow['kind']>;

/** Bars of one load at one place and time belong together. */
export function loadsOf(bars: readonly Bar[]): (readonly [Bar, ...Bar[]])[] {
  const loads = new Map<string, [Bar, ...Bar[]]>();
  for (const bar of bars) {
    // A chain may keep its load from stage to stage; one run is one start.
    const key = `${bar.loadId} ${bar.placeId} ${bar.from}`;
    const load = loads.get(key);
    if (load) load.push(bar);
    else loads.set(key, [bar]);
  }
  for (const load of loads.values()) load.sort((a, b) => a.jobNumber - b.jobNumber || (a.id < b.id ? -1 : 1));
  return [...loads.values()];
}

function stageItem(members: readonly [Bar, ...Bar[]], kinds: Kinds): Item | null {
  const [head] = members;
  const rowKind = kinds.get(head.placeId);
  if (!rowKind) return null;
  return { id: head.id, kind: 'stage', rowId: head.placeId, rowKind, from: ms(head.from), to: ms(head.to), members };
}

function lampItems(members: readonly [Bar, ...Bar[]], kinds: Kinds): Item[] {
  const [head] = members;
  const lit = joined(head.phases.filter((phase) => phase.lamp));
  return head.lampIds.flatMap((rowId) =>
    kinds.has(rowId)
      ? lit.map((span, i): Item => {
          return { id: `${head.id} lamp ${rowId} ${i}`, kind: 'lamp', rowId, rowKind: 'lamp', ...span, members };
        })
      : [],
  );
}

/** A load has one painter, as it has one place: its hands are drawn once. */
function handsItems(members: readonly [Bar, ...Bar[]], kinds: Kinds): Item[] {
  const [head] = members;
  const rowId = head.personId;
  if (rowId === null || !kinds.has(rowId)) return [];
  return joined(head.phases.filter((phase) => phase.attendance === 'hands')).map((span, i): Item => {
    return { id: `${head.id} hands ${i}`, kind: 'hands', rowId, rowKind: 'person', ...span, members };
  });
}

/** Phases that touch become one stretch. */
function joined(phases: Bar['phases']): { from: number; to: number }[] {
  const spans: { from: number; to: number }[] = [];
  for (const phase of phases) {
    const last = spans.at(-1);
    if (last && ms(phase.from) <= last.to) last.to = Math.max(last.to, ms(phase.to));
    else if (ms(phase.to) > ms(phase.from)) spans.push({ from: ms(phase.from), to: ms(phase.to) });
  }
  return spans;
}
