import type { Problem } from '#planner/index.ts';

export function makeShop(args: Record<string, number | boolean>): Problem;
