import type * as z from 'zod';
import type { placeKind } from '#contracts/common.ts';

export type PlaceKind = z.output<typeof placeKind>;

export const placeKindWords: Record<PlaceKind, string> = { booth: 'booth', prep: 'prep station', rack: 'rack' };
