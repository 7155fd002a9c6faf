import type { SheetFigures } from './figures.ts';

export type SourcedGap = {
  min: number;
  max: number | null;
  /** Minutes of the wait for which the place stays taken. */
  settle: number;
  source?: 'recoat' | 'next' | 'heat' | undefined;
};

/**
 * A gap with its sourced ends taken from the data sheet of the coating below; the others stay as the shop set them. An end
 * set by hand never lies after the recoat window nor before the beginning. A place held for the whole wait is held for the
 * new one, else for as long as before. The same gap where nothing changes or nothing is sourced.
 */
export function gapFromSheet<Gap extends SourcedGap>(gap: Gap, sheet: SheetFigures): Gap {
  if (gap.source === undefined) return gap;
  const min = gap.source === 'heat' ? sheet.flashBeforeHeat : sheet.flashBeforeNext;
  const max = notBefore(min, endOf(gap, sheet));
  const settle = gap.settle === gap.min ? min : Math.min(gap.settle, min);
  return min === gap.min && max === gap.max && settle === gap.settle ? gap : { ...gap, min, max, settle };
}

function endOf({ source, max }: SourcedGap, { recoatWithin }: SheetFigures): number | null {
  if (source === 'recoat') return recoatWithin;
  if (source === 'heat' || recoatWithin === null) return max;
  return max === null ? recoatWithin : Math.min(max, recoatWithin);
}

const notBefore = (min: number, max: number | null): number | null => (max === null ? null : Math.max(min, max));
