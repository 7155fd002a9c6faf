import type { PieceKind } from '#src/lib/phase-words.ts';

/** Classes of phases.css. */
export const phaseClass: Record<PieceKind, string> = {
  setup: 'phase-setup',
  work: 'phase-work',
  spray: 'phase-spray',
  flash: 'phase-flash',
  purge: 'phase-purge',
  bake: 'phase-bake',
  cool: 'phase-cool',
  held: 'phase-held',
  free: '',
};
