import type { Bar, DayView } from '#contracts/day.ts';

export type Move = {
  stageId: string;
  /** ISO. */
  start: string;
  placeId: string;
  personId?: string | null;
  pinned?: boolean;
};

const later = (at: string, by: number) => new Date(Date.parse(at) + by).toISOString();

/**
 * What the board will most likely look like after a move, drawn while the server decides: the stage, those that share
 * its load, and the stages done where it leaves the part move along. Rules are the server's.
 */
export function moveInView(view: DayView, move: Move): DayView {
  const moved = view.bars.find((bar) => bar.id === move.stageId);
  if (!moved) return view;
  const by = Date.parse(move.start) - Date.parse(moved.from);
  const going = travellers(view.bars, moved);
  return {
    ...view,
    bars: view.bars.map((bar) => {
      if (!going.has(bar.id)) return bar;
      const there = shifted(bar, by, move.placeId);
      return bar.id === moved.id ? { ...there, ...choices(move, view) } : there;
    }),
  };
}

/** Ids of the bars that move together with one: its load and the chains behind each of its members. */
export function travellers(bars: readonly Bar[], moved: Bar): Set<string> {
  const load = bars.filter((bar) => bar.loadId === moved.loadId && bar.from === moved.from);
  return new Set([moved.id, ...load.flatMap((bar) => [bar.id, ...bar.chain])]);
}

function choices(move: Move, view: DayView): Partial<Bar> {
  const person =
    move.personId === undefined ? {} : { personId: move.personId, personName: nameOf(view, move.personId) };
  return { ...person, ...(move.pinned === undefined ? {} : { pinned: move.pinned }) };
}

const nameOf = (view: DayView, id: string | null) => view.rows.find((row) => row.id === id)?.name ?? null;

function shifted(bar: Bar, by: number, placeId: string): Bar {
  return {
    ...bar,
    placeId,
    from: later(bar.from, by),
    to: later(bar.to, by),
    heldTo: later(bar.heldTo, by),
    phases: bar.phases.map((phase) => ({ ...phase, from: later(phase.from, by), to: later(phase.to, by) })),
  };
}

/** True where a move would change nothing: such a one is not sent. */
export function isWhereItWas(bar: Bar, move: Move): boolean {
  return (
    Date.parse(bar.from) === Date.parse(move.start) &&
    bar.placeId === move.placeId &&
    (move.personId === undefined || move.personId === bar.personId) &&
    (move.pinned === undefined || move.pinned === bar.pinned)
  );
}
