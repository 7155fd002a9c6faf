import type { RefObject } from 'react';
import { fractionAt, instantAt, type Axis } from '../model/axis.ts';
import type { Drawn } from '../model/board.ts';
import type { BoardStore } from './board-store.ts';
import { edgePull } from './edge-pull.ts';
import { lineAt, type Layout } from './layout.ts';
import { headerOf, NAMES } from './sizes.ts';

/** Bars land on full five minutes of the clock. */
const SNAP = 5;

export type Scene = {
  board: readonly Drawn[];
  axis: Axis;
  layout: Layout;
  laneWidth: number;
  movable: boolean;
  store: BoardStore;
  onDrop: (item: Drawn, start: number, placeId: string) => void;
};
export type Point = { clientX: number; clientY: number };
/** A bar that is held: where it was taken, where the pointer was last, and whether it has left its place yet. */
export type Grip = { item: Drawn; pointer: number; from: Point; laneX: number; last: Point; dragging: boolean };

type Box = RefObject<HTMLElement | null>;

/** Pixels from the beginning of the drawn time. */
export function laneX(box: Box, at: Point): number {
  const element = box.current;
  return element ? at.clientX - element.getBoundingClientRect().left + element.scrollLeft - NAMES : 0;
}

const placeKinds = new Set(['booth', 'prep', 'rack']);

/** Works out where a held bar would land, and says so where that has changed. Rows that take no bar leave it where it was. */
export function aim(box: Box, { axis, layout, laneWidth, store }: Scene, held: Grip): void {
  const element = box.current;
  if (!element) return;
  const { item } = held;
  const moved = (laneX(box, held.last) - held.laneX) / laneWidth;
  const start = moved === 0 ? item.from : instantAt(axis, fractionAt(axis, item.from) + moved, SNAP);
  const y = held.last.clientY - element.getBoundingClientRect().top + element.scrollTop - headerOf(axis);
  const line = lineAt(layout, y);
  const before = store.get().dragged;
  const takes = line?.kind === 'row' && placeKinds.has(line.row.kind);
  const placeId = takes ? line.row.id : (before?.placeId ?? item.rowId);
  if (before?.start !== start || before.placeId !== placeId) store.set({ dragged: { item, start, placeId } });
}

/** Lifts a held bar; from now on all of the pointer's moves come to the box, which scrolls at its edges. */
export function lift(box: Box, scene: () => Scene, held: Grip, isHeld: () => boolean): void {
  held.dragging = true;
  box.current?.setPointerCapture(held.pointer);
  aim(box, scene(), held);
  const point = () => (isHeld() ? held.last : null);
  edgePull(box, headerOf(scene().axis), point, () => aim(box, scene(), held));
}

/** Lets go. Where it was already nothing has happened. */
export function drop({ store, onDrop }: Scene, { item }: Grip): void {
  const { dragged } = store.get();
  store.set({ dragged: null });
  if (dragged && (dragged.start !== item.from || dragged.placeId !== item.rowId))
    onDrop(item, dragged.start, dragged.placeId);
}
