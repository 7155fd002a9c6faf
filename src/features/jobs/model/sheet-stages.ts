import type { PhaseKind } from '#contracts/common.ts';
import type { SheetBody, Way } from '#contracts/sheets.ts';
import { expandSheet } from '#server/sheets/expand-sheet.ts';

export type StagePreview = {
  key: string;
  title: string;
  /** Phases of the shortest way, in order. */
  phases: { kind: PhaseKind; minutes: number }[];
  /** Minutes of the shortest and of the longest way. */
  least: number;
  most: number;
  /** Minutes that must pass after the stage before, by the way that needs least. */
  wait: number;
  ways: string[];
};

/** The stages that the chosen options leave, in the sheet's order: what a job made from it would have to go through. */
export function stagesLeft(body: SheetBody, options: readonly string[]): StagePreview[] {
  return expandSheet(body, options).map(({ key, title, ways }, i) => {
    const shortest = ways.reduce((best, way) => (minutesOf(way) < minutesOf(best) ? way : best));
    return {
      key,
      title,
      phases: shortest.phases.map(({ kind, minutes }) => ({ kind, minutes })),
      least: minutesOf(shortest),
      most: Math.max(...ways.map(minutesOf)),
      wait: i === 0 ? 0 : Math.min(...ways.map((way) => way.gap.min)),
      ways: ways.map((way) => way.label),
    };
  });
}

/** Minutes a way takes when nothing pauses it. */
export const minutesOf = (way: Pick<Way, 'phases'>): number => way.phases.reduce((sum, p) => sum + p.minutes, 0);

/** Least minutes from the first start to the last end, if one stage followed another at once and the shop never closed. */
export const leastMinutes = (stages: readonly StagePreview[]): number =>
  stages.reduce((sum, stage) => sum + stage.wait + stage.least, 0);
