import { jointWay, mayJoin } from './joint-ways.ts';
import type { Block, Shop, Variant, Way } from './shop.ts';

/** Whether two stages are fixed in one load. */
export function fixedTogether(shop: Shop, s: number, t: number): boolean {
  const { fixed } = shop.problem;
  const load = fixed[shop.fixedAt[s]!]?.load ?? null;
  return load !== null && fixed[shop.fixedAt[t]!]?.load === load;
}

/** Whether a load may begin with the variant's stage `k`. */
const begins = (variant: Variant, k: number): boolean => {
  const way = variant.ways[k]!;
  return way.load >= 0 && (k === 0 || !way.stay);
};

/** Stages from `k` on that stay where they are: one load all the way (rule 5). 0 where one of them is never shared. */
export function runLength(ways: readonly Way[], k: number): number {
  let n = 1;
  while (k + n < ways.length && ways[k + n]!.stay) n++;
  for (let i = k; i < k + n; i++) if (ways[i]!.load < 0) return 0;
  return n;
}

/**
 * Whether stages `k...` of one variant and `m...` of another can run as one load, with `joint` (the first's own ways, or
 * those of the load that it is in already) as what the second joins. Fills `into` with the load's ways.
 */
export function joins(
  shop: Shop,
  joint: readonly Way[],
  place: number,
  other: Variant,
  m: number,
  into: Way[],
): boolean {
  const n = joint.length;
  if (!begins(other, m) || runLength(other.ways, m) !== n || other.pins[m] !== place) return false;
  for (let i = 0; i < n; i++) {
    const way = jointWay(shop, joint[i]!, other.ways[m + i]!);
    if (!way || (place >= 0 && !fits(shop, way, place))) return false;
    into[i] = way;
  }
  into.length = n;
  return true;
}

const fits = (shop: Shop, way: Way, place: number): boolean =>
  way.stay ? way.units <= shop.placeUnits[place]! : way.places.includes(place);

/** The stages in which a variant could begin a load. */
export function headsOf(variant: Variant): number[] {
  return [...variant.ways.keys()].filter((k) => begins(variant, k) && runLength(variant.ways, k) > 0);
}

/** Blocks that may run in a load at all: what is fixed after them would be their deadline, which a load does not know. */
function shareable(shop: Shop, { job, first, last, variants }: Block): boolean {
  const compiled = shop.jobs[job]!;
  if (last < compiled.last && shop.fixedAt[last + 1]! >= 0) return false;
  const loads = (s: number): boolean => shop.ways[s]!.some((w) => w.load >= 0);
  for (let s = first; s <= last; s++) if (loads(s)) return variants.length > 0;
  return false;
}

/** Notes which blocks may run as one load, and which do so already. */
export function addLoads(shop: Shop): void {
  shop.mates = matesOf(shop);
  shop.shares = shop.mates.some((list) => list.length > 0);
  if (!shop.shares) return;
  const { baseline } = shop.problem;
  const loadOf = new Map(baseline.flatMap(({ stage, load }) => (load === null ? [] : [[stage, load] as const])));
  const inBaseline = (id: number): Set<string> => {
    const { first, last } = shop.blocks[id]!;
    return new Set(shop.stageIds.slice(first, last + 1).flatMap((stage) => loadOf.get(stage) ?? []));
  };
  const loads = shop.blocks.map(({ id }) => inBaseline(id));
  shop.mates.forEach((list, a) =>
    list.forEach((b) => {
      if (b < a) return;
      const before = [shop.blocks[a]!.first - 1, shop.blocks[b]!.first - 1] as const;
      if (before[0] >= 0 && before[1] >= 0 && fixedTogether(shop, ...before)) shop.standing.push([a, b]);
      if ([...loads[a]!].some((load) => loads[b]!.has(load))) shop.published.push([a, b]);
    }),
  );
}

/** Per block the blocks of other jobs that could share a run with it, as far as kinds, families and room say. */
function matesOf(shop: Shop): Int32Array[] {
  const mates = shop.blocks.map((): number[] => []);
  const able = shop.blocks.filter((b) => shareable(shop, b)).map((block) => ({ block, starts: startsOf(block) }));
  able.forEach((a, i) => {
    for (const b of able.slice(i + 1)) {
      if (a.block.job === b.block.job) continue;
      if (!a.starts.some((x) => b.starts.some((y) => mayStart(shop, a.block, x, b.block, y)))) continue;
      mates[a.block.id]!.push(b.block.id);
      mates[b.block.id]!.push(a.block.id);
    }
  });
  return mates.map((list) => Int32Array.from(list));
}

/** One stage of one variant where a load may begin, and the stages that stay with it. */
type Start = { k: number; place: number; ways: Way[] };

const startsOf = ({ variants }: Block): Start[] =>
  variants.flatMap((v) =>
    headsOf(v).map((k) => ({ k, place: v.pins[k]!, ways: v.ways.slice(k, k + runLength(v.ways, k)) })),
  );

const mayStart = (shop: Shop, a: Block, x: Start, b: Block, y: Start): boolean =>
  x.place === y.place &&
  x.ways.length === y.ways.length &&
  standAlike(shop, a.first + x.k, x.ways[0]!, b.first + y.k, y.ways[0]!) &&
  x.ways.every((way, i) => mayJoin(shop, way, y.ways[i]!, x.place));

/** Where a load begins by staying, its members must have stood together before: in one fixed load. */
export const standAlike = (shop: Shop, s: number, way: Way, t: number, other: Way): boolean =>
  way.stay ? other.stay && fixedTogether(shop, s - 1, t - 1) : !other.stay;
