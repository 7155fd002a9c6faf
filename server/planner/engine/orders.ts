import { NEVER } from './calendar.ts';
import type { Shop } from './shop.ts';

/** Job orders to begin with, each by a rule of thumb: due date, slack, weighted due date, release, and work content. */
export function jobOrders(shop: Shop): number[][] {
  const ids = shop.jobs.map((_, j) => j);
  const work = shop.jobs.map((job) => Math.min(...shop.ways[job.first]!.map((w) => w.minutes)) + shop.tail[job.first]!);
  const due = shop.jobs.map((job) => (job.due >= 0 ? job.due : shop.horizon));
  const keys: ((j: number) => number)[] = [
    (j) => due[j]!,
    (j) => due[j]! - work[j]!,
    (j) => due[j]! - 300 * shop.jobs[j]!.weight,
    (j) => shop.jobs[j]!.release,
    (j) => -work[j]!,
    (j) => work[j]! / Math.max(0.1, shop.jobs[j]!.weight),
  ];
  return keys.map((key) => {
    const at = ids.map(key);
    return [...ids].sort((x, y) => at[x]! - at[y]! || shop.jobs[x]!.release - shop.jobs[y]!.release || x - y);
  });
}

/** Jobs with something fixed come first: what they hold, they hold already. */
export function runningFirst(shop: Shop, order: readonly number[]): number[] {
  const running = (j: number): boolean => {
    const { first, last } = shop.jobs[j]!;
    for (let s = first; s <= last; s++) if (shop.fixedAt[s]! >= 0) return true;
    return false;
  };
  return [...order.filter(running), ...order.filter((j) => !running(j))];
}

export const blocksInOrder = (shop: Shop, jobs: readonly number[]): Int32Array =>
  Int32Array.from(jobs.flatMap((j) => shop.jobs[j]!.blocks));

/** Blocks in the order of the published plan; what it does not know comes last, by due date. */
export function publishedOrder(shop: Shop): Int32Array {
  const start = shop.blocks.map(({ first }) => (shop.basePlace[first]! >= 0 ? shop.baseStart[first]! : NEVER));
  const due = (id: number): number => shop.jobs[shop.blocks[id]!.job]!.due;
  // A job's blocks keep their order even where the published plan knows only some of them.
  shop.jobs.forEach(({ blocks }) =>
    blocks.slice(1).forEach((id, k) => (start[id] = Math.max(start[id]!, start[blocks[k]!]!))),
  );
  return Int32Array.from(shop.blocks.keys()).sort((x, y) => start[x]! - start[y]! || due(x) - due(y) || x - y);
}
