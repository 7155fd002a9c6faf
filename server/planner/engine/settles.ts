import { fixedTogether } from './load-mates.ts';
import type { Placer } from './placer.ts';
import { BOOTH } from './shop.ts';
import { firstEnding } from './track.ts';

/** Whether what stands fixed before `s` may settle where it is. */
export function settles(p: Placer, s: number): boolean {
  const { at, places } = p.state;
  const track = places[at.place[s - 1]!]!;
  let i = firstEnding(track, at.end[s - 1]!);
  // What it was fixed together with may settle beside it.
  while (i < track.n && track.from[i] === at.end[s - 1] && settlesBeside(p, s, track.b[i]! >> 1)) i++;
  return i >= track.n || track.from[i]! >= at.end[s - 1]! + p.wayOf[s]!.settle + cleanUntil(p, s, track.a[i]!);
}

/** Minutes of clean-up before what is next in the booth (there `family` is that one's). */
function cleanUntil({ shop, state }: Placer, s: number, family: number): number {
  const own = state.at.way[s - 1]!.family;
  if (shop.placeKind[state.at.place[s - 1]!] !== BOOTH || own < 0 || family < 0) return 0;
  return shop.cleanup[own * shop.families + family]!;
}

const settlesBeside = ({ shop, state }: Placer, s: number, other: number): boolean =>
  shop.fixedAt[other]! < 0 &&
  other > 0 &&
  fixedTogether(shop, s - 1, other - 1) &&
  state.at.start[other]! > state.at.end[s - 1]!;
