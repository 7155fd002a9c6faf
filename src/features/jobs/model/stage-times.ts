import type { JobStage } from '#contracts/jobs.ts';
import type { PieceKind } from '#src/lib/phase-words.ts';

const minute = 60_000;

/** What to draw for a stage: as booked, or by the first of its ways where it is not booked. Sizes in minutes. */
export function piecesOf(stage: JobStage): { kind: PieceKind; size: number }[] {
  if (stage.booking)
    return stage.booking.phases.map(({ kind, from, to }) => ({
      kind,
      size: (Date.parse(to) - Date.parse(from)) / minute,
    }));
  return (stage.ways[0]?.phases ?? []).map(({ kind, minutes }) => ({ kind, size: minutes }));
}

/** Whole minutes that something came after its plan; negative: before. Null where there is nothing to compare. */
export function minutesLater(actual: string | null, planned: string | null): number | null {
  if (actual === null || planned === null) return null;
  return Math.round((Date.parse(actual) - Date.parse(planned)) / minute);
}

/** `on time`, `6 min later than planned`, `6 min sooner than planned`. Up to two minutes are no difference. */
export function latenessWords(minutes: number | null, duration: (minutes: number) => string): string {
  if (minutes === null) return '';
  if (Math.abs(minutes) <= 2) return 'as planned';
  return `${duration(Math.abs(minutes))} ${minutes > 0 ? 'later' : 'sooner'} than planned`;
}
