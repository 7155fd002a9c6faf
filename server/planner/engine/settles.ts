import { fixedTogether } from './load-mates.ts';
import type { Placer } from './placer.ts';
import { firstEnding } from './track.ts';

/** Whether what stands fixed before `s` may settle where it is. */
export function settles(p: Placer, s: number): boolean {
  const { at, places } = p.state;
  const track = places[at.place[s - 1]!]!;
  let i = firstEnding(track, at.end[s - 1]!);
  // What it was fixed together with may settle beside it.
  while (i < track.n && track.from[i] === at.end[s - 1] && settlesBeside(p, s, track.b[i]! >> 1)) i++;
  return i >= track.n || track.from[i]! >= at.end[s - 1]! + p.wayOf[s]!.settle;
}

const settlesBeside = ({ shop, state }: Placer, s: number, other: number): boolean =>
  shop.fixedAt[other]! < 0 &&
  other > 0 &&
  fixedTogether(shop, s - 1, other - 1) &&
  state.at.start[other]! > state.at.end[s - 1]!;
