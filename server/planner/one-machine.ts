import { BOOTH, PREP, type Shop } from './engine/shop.ts';

type Operation = { head: number; minutes: number; tail: number };

/**
 * The preemptive one-machine bound (Jackson 1955; Carlier 1982) over every booth and prep station: of the stages that can
 * only be done there, the most urgent one that has arrived is always at work. No plan ends earlier.
 */
export function jacksonBound(shop: Shop, heads: Int32Array): number {
  const byPlace = Array.from({ length: shop.placeCount }, (): Operation[] => []);
  for (let s = 0; s < shop.stageCount; s++) {
    const ways = shop.ways[s]!;
    const place = ways[0]!.places[0];
    if (place === undefined || shop.fixedAt[s]! >= 0) continue;
    if (!ways.every((w) => !w.stay && w.load < 0 && w.places.length === 1 && w.places[0] === place)) continue;
    if (shop.placeKind[place] !== BOOTH && shop.placeKind[place] !== PREP) continue;
    byPlace[place]!.push({ head: heads[s]!, minutes: Math.min(...ways.map((w) => w.minutes)), tail: shop.tail[s]! });
  }
  return Math.max(0, ...byPlace.map(preemptiveEnd));
}

/** Latest end plus tail when, of the operations that have arrived, the one with the longest tail always works. */
export function preemptiveEnd(operations: readonly Operation[]): number {
  const left = operations.map((o) => o.minutes);
  const arrivals = [...new Set(operations.map((o) => o.head))].sort((x, y) => x - y);
  let most = 0;
  let at = 0;
  for (;;) {
    let next = -1;
    operations.forEach((o, i) => {
      if (o.head <= at && left[i]! > 0 && (next < 0 || o.tail > operations[next]!.tail)) next = i;
    });
    const arrival = arrivals.find((x) => x > at) ?? Infinity;
    if (next < 0) {
      if (arrival === Infinity) return most;
      at = arrival;
      continue;
    }
    const run = Math.min(left[next]!, arrival - at);
    at += run;
    left[next]! -= run;
    if (left[next] === 0) most = Math.max(most, at + operations[next]!.tail);
  }
}
