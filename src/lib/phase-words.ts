import type { PhaseKind } from '#contracts/common.ts';

/** What a piece of a bar can show. `held`: the place is taken and nothing is done; `free`: nothing is booked. */
export type PieceKind = PhaseKind | 'held' | 'free';

/** The phases as people call them, as a noun that can stand alone. */
export const phaseWords: Record<PieceKind, string> = {
  setup: 'set-up',
  work: 'hand work',
  spray: 'spray',
  flash: 'flash',
  purge: 'purge',
  bake: 'bake',
  cool: 'cool-down',
  held: 'held, idle',
  free: 'free',
};

/** `set-up 10 min, spray 20 min, flash 10 min`: a bar in words, equal kinds added up in the order they first come. */
export function phasesInWords(
  phases: readonly { kind: PieceKind; minutes: number }[],
  duration: (minutes: number) => string,
): string {
  const sums = new Map<PieceKind, number>();
  for (const { kind, minutes } of phases) sums.set(kind, (sums.get(kind) ?? 0) + minutes);
  return [...sums].map(([kind, minutes]) => `${phaseWords[kind]} ${duration(minutes)}`).join(', ');
}
