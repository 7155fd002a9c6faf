import type { PhaseKind } from '#contracts/common.ts';
import type { SheetBody, Way } from '#contracts/sheets.ts';
import { expandSheet } from '#server/sheets/expand-sheet.ts';
import { minutesOf } from '#server/sheets/way-times.ts';

export type ChainLink = {
  key: string;
  title: string;
  /** The quickest way, wait included. */
  way: string;
  ways: number;
  phases: { kind: PhaseKind; minutes: number }[];
  minutes: number;
  /** After the stage before; of the first stage there is none. */
  gap: { min: number; max: number | null; stay: boolean } | null;
};

/** What a job with these options goes through by the quickest ways, if nothing had to wait for anything. */
export function chainOf(body: Pick<SheetBody, 'stages'>, chosen: readonly string[]): ChainLink[] {
  return expandSheet(body, chosen).flatMap(({ key, title, ways }, i) => {
    const cost = (way: Way): number => minutesOf(way.phases) + (i === 0 ? 0 : way.gap.min);
    const [first, ...others] = ways;
    if (!first) return [];
    const quickest = others.reduce((best, way) => (cost(way) < cost(best) ? way : best), first);
    const { min, max } = quickest.gap;
    return [
      {
        key,
        title,
        way: quickest.label,
        ways: ways.length,
        phases: quickest.phases.map(({ kind, minutes }) => ({ kind, minutes })),
        minutes: minutesOf(quickest.phases),
        gap: i === 0 ? null : { min, max, stay: quickest.stay },
      },
    ];
  });
}

export const leastMinutes = (chain: readonly ChainLink[]): number =>
  chain.reduce((sum, { minutes, gap }) => sum + minutes + (gap?.min ?? 0), 0);

/** Width for a length of time: even up to an hour and a half, then ever less, so that a night does not hide the day. */
export const widthOf = (minutes: number): number =>
  minutes <= 90 ? minutes * 1.7 : 153 + 46 * Math.log2(minutes / 90);
