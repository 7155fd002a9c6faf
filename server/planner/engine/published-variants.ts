import type { Shop, Variant } from './shop.ts';

/** Per block the variant that was published; -1 where the published plan does not know it or it is no longer offered. */
export function publishedVariants(shop: Shop): Int32Array {
  const mode = new Map(shop.problem.baseline.map((a) => [a.stage, a.mode]));
  const stages = shop.problem.jobs.flatMap((job) => job.stages);
  const way = stages.map((stage, s) => shop.ways[s]![stage.modes.findIndex((m) => m.id === mode.get(stage.id))]);
  const fits = (first: number, { ways, pins }: Variant): boolean =>
    ways.every((w, k) => w === way[first + k] && (pins[k]! < 0 || pins[k] === shop.basePlace[first + k]));
  return Int32Array.from(shop.blocks, ({ first, variants }) => variants.findIndex((variant) => fits(first, variant)));
}
