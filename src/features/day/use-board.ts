import { useMemo, useState } from 'react';
import type { DayView } from '#contracts/day.ts';
import type { Formats } from '#src/lib/formats.ts';
import { hoursWorthShowing, type Axis } from './model/axis.ts';
import { boardOf, type Drawn } from './model/board.ts';
import type { SpanKind } from './model/day-range.ts';
import { keepSame } from './model/keep-same.ts';
import { describe, type Say } from './model/describe.ts';
import type { Hint } from './model/landing.ts';
import type { BoardContextValue } from './timeline/board-context.ts';
import { createBoardStore } from './timeline/board-store.ts';
import { useSame } from './use-same.ts';

// So that hour labels fall on the same clock times each day.
const multiples: Record<SpanKind, number> = { day: 1, three: 2, week: 3 };

export function useAxis(view: DayView | undefined, days: string[], kind: SpanKind, all: boolean, zone: string): Axis {
  const busy = [...(view?.open ?? []), ...(view?.bars ?? [])].map(({ from, to }) => {
    return { from: Date.parse(from), to: Date.parse(to) };
  });
  const hours = all ? { fromMinute: 0, toMinute: 1440 } : hoursWorthShowing(zone, busy, multiples[kind]);
  return useSame({ zone, days, ...hours });
}

export function useBoardItems(view: DayView | undefined, axis: Axis, people: boolean): readonly Drawn[] {
  const next = useMemo(() => {
    const board = view ? boardOf(view, axis) : [];
    return people ? board : board.filter((item) => item.kind !== 'hands');
  }, [view, axis, people]);
  const [shown, show] = useState<{ of: readonly Drawn[]; items: readonly Drawn[] }>({ of: next, items: next });
  if (shown.of === next) return shown.items;
  const items = keepSame(shown.items, next);
  show({ of: next, items });
  return items;
}

/** What bars ask their board for; made anew only when a name or the reader's clock changes. */
export function useBoardWords(view: DayView | undefined, say: Say, open: (item: Drawn) => void): BoardContextValue {
  const [store] = useState(createBoardStore);
  const named = useSame((view?.rows ?? []).map(({ id, name }): [string, string] => [id, name]));
  return useMemo(() => {
    const names = new Map(named);
    return {
      store,
      open,
      describe: (item) => describe(item, names, say),
      placeName: (id) => names.get(id) ?? '',
      sayTime: say.time,
      sayDay: say.day,
      sayHint: (hint) => hintWords(hint, say),
    };
  }, [store, named, say, open]);
}

function hintWords(hint: Hint, say: Say): string {
  switch (hint.kind) {
    case 'taken':
      return `taken by ${hint.by.jobNumber} until ${say.time(Date.parse(hint.by.heldTo))}`;
    case 'closed':
      return hint.label ? `closed: ${hint.label}` : 'closed';
    case 'too-early':
      return `too early, from ${say.time(hint.at)}`;
    case 'too-late':
      return `too late, until ${say.time(hint.at)}`;
  }
}

export function useSay(formats: Formats): Say {
  return useMemo(
    () => ({
      time: formats.time,
      moment: (at) => (formats.dayOf(at) === formats.today() ? formats.time(at) : formats.dateTime(at)),
      day: formats.date,
    }),
    [formats],
  );
}
