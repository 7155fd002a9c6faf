import type { MinutesSource, SheetFigures } from './figures.ts';
import { gapFromSheet, type SourcedGap } from './gap-from-sheet.ts';
import { minutesFromSheet } from './minutes-from-sheet.ts';

type TimedPhase = { minutes: number; source?: MinutesSource | undefined };
export type TimedWay = { gap: SourcedGap; bakeCelsius: number | null; phases: readonly TimedPhase[] };
export type TimedStage<Way extends TimedWay = TimedWay> = { coatingId: string | null; ways: readonly Way[] };

/** A stage that a data sheet speaks of, as it is and as the sheet would have it; `ways` in the same order. */
export type Retimed<Way extends TimedWay> = { index: number; before: readonly Way[]; after: Way[]; differs: boolean };

/**
 * What one coating's data sheet makes of the stages of a process sheet or job: those that put it on or cure it, and the one
 * that follows, whose gap comes from the coating below. Only what is sourced is re-timed; what was set by hand stays.
 */
export function retimeStages<Way extends TimedWay>(
  stages: readonly TimedStage<Way>[],
  coating: { id: string; sheet: SheetFigures },
): Retimed<Way>[] {
  let below: string | null = null;
  return stages.flatMap(({ coatingId, ways }, index) => {
    const own = coatingId === coating.id ? coating.sheet : null;
    const under = below === coating.id ? coating.sheet : null;
    below = coatingId ?? below;
    const after = ways.map((way) => retimeWay(way, own, under));
    const differs = after.some((way, i) => way !== ways[i]);
    return own !== null || differs ? [{ index, before: ways, after, differs }] : [];
  });
}

/** The same way where nothing changes. */
export function retimeWay<Way extends TimedWay>(way: Way, own: SheetFigures | null, below: SheetFigures | null): Way {
  const gap = below === null ? way.gap : gapFromSheet(way.gap, below);
  const phases = own === null ? way.phases : way.phases.map((phase) => retimePhase(phase, own));
  const bakes = way.phases.some(({ source }) => source === 'bake');
  const bakeCelsius = bakes && own?.bake ? own.bake.celsius : way.bakeCelsius;
  const same =
    gap === way.gap && bakeCelsius === way.bakeCelsius && phases.every((phase, i) => phase === way.phases[i]);
  return same ? way : { ...way, gap, phases, bakeCelsius };
}

function retimePhase<Phase extends TimedPhase>(phase: Phase, sheet: SheetFigures): Phase {
  const minutes = phase.source === undefined ? null : minutesFromSheet(phase.source, sheet);
  return minutes === null || minutes === phase.minutes ? phase : { ...phase, minutes };
}
