import { fractionAt, type Axis } from './axis.ts';
import type { Item } from './items.ts';
import { windowOf } from './window-of.ts';
import type { PhaseKind } from '#contracts/common.ts';
import { windowTone, type WindowTone } from '#src/lib/window-tone.ts';

/** All figures in per cent of the bar's own width, from its left edge; they may lie outside 0 to 100. */
export type Stretch = { left: number; width: number };
export type WindowLine = Stretch & { goesOnLeft: boolean; goesOnRight: boolean };
export type Shape = {
  segments: readonly (Stretch & { kind: PhaseKind })[];
  /** Place still taken, nothing done. */
  tail: Stretch | null;
  /** Room for the label: to the next bar of the row, or the bar's own width where bars are stacked. */
  labelRoom: number;
  /** Where hidden hours are cut out of the bar. */
  seams: readonly number[];
  tone: WindowTone;
  /** The window at its true length. */
  window: WindowLine;
  /** The same, cut so that it cannot run into the neighbours' lines. */
  shortWindow: WindowLine;
};

type Neighbours = { before: Item | null; after: Item | null };

/** Null where the bar lies in hidden hours altogether. */
export function shapeOf(item: Item, { before, after }: Neighbours, axis: Axis): Shape | null {
  const start = fractionAt(axis, item.from);
  const end = fractionAt(axis, item.to);
  const width = end - start;
  if (width <= 0) return null;
  const at = (fraction: number) => ((fraction - start) / width) * 100;
  const stretch = (from: number, to: number): Stretch => ({ left: at(from), width: at(to) - at(from) });
  const edgeBefore = before ? fractionAt(axis, before.to) : 0;
  const edgeAfter = after ? fractionAt(axis, after.from) : 1;
  const stacked = item.rowKind === 'rack';

  const window = windowOf(item.members);
  const from = window.earliest === null ? 0 : fractionAt(axis, Date.parse(window.earliest));
  const to = window.latest === null ? 1 : fractionAt(axis, Date.parse(window.latest));
  const lineFrom = Math.min(from, start);
  const lineTo = Math.max(to, start);
  const leastLeft = stacked ? start : Math.min(start, (edgeBefore + start) / 2);
  const mostRight = stacked ? end : Math.max(end, (edgeAfter + end) / 2);
  return {
    segments: segmentsOf(item, axis, stretch),
    tail: tailOf(item, after, axis, stretch),
    labelRoom: stacked ? 100 : Math.max(100, at(edgeAfter)),
    seams: seamsOf(axis, start, end).map(at),
    tone: windowTone(window, item.from),
    window: {
      ...stretch(lineFrom, lineTo),
      goesOnLeft: window.earliest === null,
      goesOnRight: window.latest === null,
    },
    shortWindow: {
      ...stretch(Math.max(lineFrom, leastLeft), Math.min(lineTo, mostRight)),
      goesOnLeft: window.earliest === null || lineFrom < leastLeft,
      goesOnRight: window.latest === null || lineTo > mostRight,
    },
  };
}

type Draw = (from: number, to: number) => Stretch;

function segmentsOf(item: Item, axis: Axis, stretch: Draw): Shape['segments'] {
  return item.members[0].phases.flatMap(({ kind, from, to }) => {
    const left = Math.max(Date.parse(from), item.from);
    const right = Math.min(Date.parse(to), item.to);
    if (right <= left) return [];
    return [{ kind, ...stretch(fractionAt(axis, left), fractionAt(axis, right)) }];
  });
}

function tailOf(item: Item, after: Item | null, axis: Axis, stretch: Draw): Stretch | null {
  if (item.kind !== 'stage') return null;
  const held = Math.max(...item.members.map((bar) => Date.parse(bar.heldTo)));
  const until = after && item.rowKind !== 'rack' ? Math.min(held, after.from) : held;
  const tail = stretch(fractionAt(axis, item.to), fractionAt(axis, Math.max(until, item.to)));
  return tail.width > 0 ? tail : null;
}

function seamsOf(axis: Axis, start: number, end: number): number[] {
  return axis.days.map((_, i) => i / axis.days.length).filter((seam) => seam > start && seam < end);
}
