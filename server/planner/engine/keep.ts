import { NEVER } from './calendar.ts';
import { floorOf } from './chain.ts';
import { type Placer, takeOut } from './placer.ts';
import type { Block, Variant } from './shop.ts';
import { copyStage, enter, type Placing } from './state.ts';

/** The first stage that any variant of the block may push. */
export const lowest = (d: Placer, block: Block): number =>
  floorOf(
    d,
    block,
    block.variants.reduce((most, v) => Math.min(most, v.ways[0]!.gapMax), NEVER),
  );

/** Remembers where the stages stand that a block may push later. */
export function keepBefore(d: Placer, block: Block, floor: number): void {
  for (let s = floor; s < block.first; s++) copyStage(d.shop, d.state.at, d.before, s);
}

/** Takes the block out and puts earlier stages back where they stood. */
export function putBack(d: Placer, block: Block, floor: number): void {
  const { at } = d.state;
  for (let s = block.first; s <= block.last; s++) if (at.way[s]) takeOut(d, s);
  for (let s = floor; s < block.first; s++) restore(d, s, d.before);
}

/** Remembers a block as it stands, and what stands before it, as the best so far. */
export function keepThis(d: Placer, block: Block, floor: number): void {
  for (let s = floor; s <= block.last; s++) copyStage(d.shop, d.state.at, d.kept, s);
}

/** Puts the best remembered back. */
export function takeKept(d: Placer, block: Block, floor: number, variant: Variant): void {
  for (let s = floor; s < block.first; s++) restore(d, s, d.kept);
  for (let s = block.first; s <= block.last; s++) {
    d.wayOf[s] = d.kept.way[s]!;
    d.pinOf[s] = variant.pins[s - block.first]!;
    restore(d, s, d.kept);
  }
}

/** Puts a stage where another record says. */
export function restore(d: Placer, s: number, from: Placing): void {
  const way = from.way[s]!;
  if (way && way.rigid && way.lampCount === 0 && d.state.at.way[s] === way && standsAs(d.state.at, from, s)) return;
  takeOut(d, s);
  if (!way) return;
  copyStage(d.shop, from, d.state.at, s);
  enter(d.state, s, way);
}

/** Same times, place, person and hold; enough for ways whose segments and lamps cannot differ then. */
const standsAs = (a: Placing, b: Placing, s: number): boolean =>
  a.start[s] === b.start[s] &&
  a.place[s] === b.place[s] &&
  a.person[s] === b.person[s] &&
  a.holdFrom[s] === b.holdFrom[s] &&
  a.holdTo[s] === b.holdTo[s] &&
  a.goesOn[s] === b.goesOn[s] &&
  a.units[s] === b.units[s];
