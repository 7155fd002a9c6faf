import { gapFromSheet } from '#chemistry/sheets/gap-from-sheet.ts';
import { minutesFromSheet } from '#chemistry/sheets/minutes-from-sheet.ts';
import { coatings } from '../coatings.ts';
import type { CoatingSheet } from '#contracts/coatings.ts';
import type { Gap, Phase, SheetSeed } from './types.ts';

/** Keeps the mark of a data sheet on times that are its own; others, such as a shorter lamp time, are set by hand. */
export function onlyTrueSources(seed: SheetSeed): SheetSeed {
  let below: CoatingSheet | null = null;
  const stages = seed.stages.map((stage) => {
    const own = sheetOf(stage.coating);
    const under = below;
    below = own ?? below;
    const ways = stage.ways.map((way) => ({
      ...way,
      gap: trueGap(way.gap, under),
      phases: way.phases.map((phase) => truePhase(phase, own)),
    }));
    return { ...stage, ways };
  });
  return { ...seed, stages };
}

const sheetOf = (coating: string | null): CoatingSheet | null =>
  coatings.find(({ key }) => key === coating)?.sheet ?? null;

function truePhase(phase: Phase, sheet: CoatingSheet | null): Phase {
  const { source, ...byHand } = phase;
  if (source === undefined) return phase;
  const isTrue = sheet !== null && (source === 'coat' || minutesFromSheet(source, sheet) === phase.minutes);
  return isTrue ? phase : byHand;
}

function trueGap(gap: Gap, below: CoatingSheet | null): Gap {
  const { source: _, ...byHand } = gap;
  return below !== null && gapFromSheet(gap, below) === gap ? gap : byHand;
}
