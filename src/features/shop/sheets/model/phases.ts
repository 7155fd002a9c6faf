import type { Phase, Way } from '#contracts/sheets.ts';
import { minutesFromSheet } from '#chemistry/sheets/minutes-from-sheet.ts';
import type { Coating, PhaseSource } from '#contracts/coatings.ts';

export const phase = (
  kind: Phase['kind'],
  minutes: number,
  attendance: Phase['attendance'],
  more: Partial<Phase> = {},
): Phase => ({ kind, minutes, attendance, ...more });

/** Minutes from the data sheet with their source, or the usual ones without. */
export function sourced(
  source: PhaseSource,
  coating: Coating | null,
  usual: number,
): { minutes: number; source?: PhaseSource } {
  const minutes = coating && minutesFromSheet(source, coating.sheet);
  return minutes === null ? { minutes: usual } : { minutes, source };
}

/** Coats with their flashes between; the painter stays by them. */
export function coatPhases(count: number, spray: number, coating: Coating | null, usualFlash: number): Phase[] {
  const flash = sourced('flash-between', coating, usualFlash);
  return Array.from({ length: count }, (_, i): Phase[] => [
    ...(i > 0 && flash.minutes > 0 ? [{ kind: 'flash' as const, attendance: 'hands' as const, ...flash }] : []),
    phase('spray', spray, 'hands', coating ? { source: 'coat' } : {}),
  ]).flat();
}

export const plainWay: Way = {
  id: 'by-hand',
  label: 'By hand',
  placeKinds: ['prep'],
  stay: false,
  skill: 'prep',
  lampCount: 0,
  family: null,
  load: null,
  gap: { min: 0, max: null, settle: 0 },
  split: true,
  bakeCelsius: null,
  phases: [{ kind: 'work', minutes: 30, attendance: 'hands' }],
};

export function withoutSource({ source: _, ...phase }: Phase): Phase {
  return phase;
}
