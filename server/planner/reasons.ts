import type { Decoder } from './engine/decode.ts';
import { NEVER } from './engine/calendar.ts';
import type { Way } from './engine/shop.ts';
import type { Stage } from './types.ts';

const hours = (minutes: number): string => {
  const h = Math.floor(minutes / 60);
  const m = minutes % 60;
  return h === 0 ? `${m} min` : m === 0 ? `${h} h` : `${h} h ${m} min`;
};

const names = (list: readonly string[]): string =>
  list.length <= 3 ? list.join(', ') : `${list.slice(0, 2).join(', ')} and ${list.length - 2} more`;

/**
 * Why stage `s` found no room, as a sentence for the people in the shop: what no way of doing it can ever have, else
 * which window or horizon it runs into as the shop is booked now.
 */
export function whyUnplaced(d: Decoder, job: number, s: number): string {
  const { shop } = d;
  const compiled = shop.jobs[job]!;
  const stage = shop.problem.jobs[job]!.stages[s - compiled.first]!;
  const lacks = shop.ways[s]!.map((way, k) => lackOf(d, way, stage, k, s === compiled.first));
  const kind = stage.kind || stage.id;
  if (lacks.every((x) => x !== null)) return `${capital(kind)} cannot be done: ${[...new Set(lacks)].join('; ')}.`;
  return roomFor(d, job, s, stage);
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** What a way of doing a stage lacks whatever is booked, or null. */
function lackOf(d: Decoder, way: Way, stage: Stage, k: number, first: boolean): string | null {
  const { shop } = d;
  const mode = stage.modes[k]!;
  const units = `${mode.units} unit${mode.units === 1 ? '' : 's'}`;
  if (way.stay && first) return 'nothing stands anywhere that it could stay with';
  if (!way.stay && mode.places.length === 0) return 'no place will do for it';
  if (!way.stay && way.places.length === 0) return `none of ${names(mode.places)} has room for its ${units}`;
  if (way.hands && way.people.length === 0) return 'nobody may do it';
  if (way.hands && way.people.every((q) => shop.working[q]!.n === 0))
    return `none of ${names(mode.people)} is at work before the horizon`;
  if (way.lamps.length < way.lampCount) return `it needs ${way.lampCount} lamps and ${way.lamps.length} will do`;
  const longest = Math.max(0, ...way.people.map((q) => longestShift(d, q)));
  const need = Math.max(0, ...Array.from(way.segMinutes).filter((_, i) => way.segNeed[i] === 1));
  if (need > longest)
    return `it takes ${hours(need)} without a break, and the longest stretch of work is ${hours(longest)}`;
  return null;
}

function longestShift(d: Decoder, person: number): number {
  const c = d.shop.working[person]!;
  let most = 0;
  for (let i = 0; i < c.n; i++) most = Math.max(most, c.to[i]! - c.from[i]!);
  return most;
}

/** Names the limit that a stage with usable ways runs into. */
function roomFor(d: Decoder, job: number, s: number, stage: Stage): string {
  const { shop } = d;
  const compiled = shop.jobs[job]!;
  const way = shop.ways[s]!.find((w) => w.stay || w.places.length > 0) ?? shop.ways[s]![0]!;
  const what = `${hours(way.minutes)} for ${stage.kind || stage.id}`;
  const where = placeWord(d, way);
  const fixedBefore = s > compiled.first && shop.fixedAt[s - 1]! >= 0;
  if (fixedBefore && way.gapMax < NEVER) {
    const closes = d.state.at.end[s - 1]! + way.gapMax;
    if (closes < shop.now)
      return `The window of ${hours(way.gapMax)} after the stage before it closed ${hours(shop.now - closes)} ago.`;
    return `${where} has ${what} before the window of ${hours(way.gapMax)} after the stage before it ends.`;
  }
  for (let k = s + 1; k <= compiled.last; k++)
    if (shop.fixedAt[k]! >= 0) return `${where} has ${what} before the stage that is pinned after it begins.`;
  if (Math.max(compiled.release, shop.now) + way.minutes + shop.tail[s]! > shop.horizon)
    return `It takes at least ${hours(way.minutes + shop.tail[s]!)} from here to the end, and the plan's horizon comes before that.`;
  if (s > compiled.first && way.gapMax < NEVER)
    return `${where} has ${what} within ${hours(way.gapMax)} after the stage before it, up to the plan's horizon.`;
  return `${where} has ${what} before the plan's horizon, as the shop is booked.`;
}

function placeWord(d: Decoder, way: Way): string {
  const kinds = new Set([...way.places].map((p) => d.shop.placeKind[p]));
  if (way.stay) return 'The place where it has to stay no longer';
  if (kinds.size > 1) return 'No place';
  return kinds.has(0) ? 'No booth' : kinds.has(1) ? 'No prep station' : 'No rack';
}
