import type { SheetBody, Way } from '#contracts/sheets.ts';

export type StageSeed = Omit<SheetBody['stages'][number], 'coatingId'> & { coating: string | null };
export type SheetSeed = Omit<SheetBody, 'stages'> & { key: string; name: string; stages: StageSeed[] };
export type Phase = Way['phases'][number];
export type Gap = Way['gap'];
