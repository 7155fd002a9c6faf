import type { Absence, Closure, ClosureKind, Resources, Shift } from '#server/db/resources.ts';
import { expand, expandStarts, wallSpan } from './recurrence.ts';
import { clipSpan, joinSpans, subtractSpans, type Span } from './spans.ts';

export type ClosedSpan = Span & { kind: ClosureKind; label: string };
type SetUp = Pick<Resources, 'shop' | 'openings' | 'closures' | 'shifts' | 'absences'>;

/** When somebody is on the premises: opening hours less whatever closes the whole shop. */
export function openSpans(setUp: SetUp, range: Span): Span[] {
  const zone = setUp.shop.timeZone;
  return subtractSpans(
    setUp.openings.flatMap((opening) => expand(opening, zone, range)),
    wholeShopClosures(setUp, range),
  );
}

/** Closures of one place or lamp, or with `null` those of the whole shop; in order, not joined, so labels stay. */
export function closuresOf(
  setUp: SetUp,
  of: { placeId: string } | { lampId: string } | null,
  range: Span,
): ClosedSpan[] {
  const wanted = (c: Closure): boolean => {
    if (of === null) return c.placeId === null && c.lampId === null;
    return 'placeId' in of ? c.placeId === of.placeId : c.lampId === of.lampId;
  };
  return setUp.closures
    .filter(wanted)
    .flatMap((c) => expand(c, setUp.shop.timeZone, range).map((span) => ({ ...span, kind: c.kind, label: c.label })))
    .sort((a, b) => a.from.getTime() - b.from.getTime());
}

/**
 * When a place or a lamp may not be used. A holiday or closure of the whole shop sends people home while parts may stand
 * and dry; maintenance or a breakdown of the whole shop (power, air) stops every place and lamp too.
 */
export function closedSpans(setUp: SetUp, of: { placeId: string } | { lampId: string }, range: Span): Span[] {
  const all = closuresOf(setUp, null, range).filter((c) => c.kind === 'maintenance' || c.kind === 'breakdown');
  return joinSpans([...closuresOf(setUp, of, range), ...all].map(({ from, to }) => ({ from, to })));
}

/** Shifts less breaks, absences and whatever closes the whole shop. */
export function workingSpans(setUp: SetUp, personId: string, range: Span): Span[] {
  const shifts = setUp.shifts.filter((shift) => shift.personId === personId);
  if (shifts.length === 0) return [];
  return subtractSpans(
    shifts.flatMap((shift) => shiftSpans(shift, setUp.shop.timeZone, range)),
    [...absencesOf(setUp, personId, range), ...wholeShopClosures(setUp, range)],
  );
}

export function absencesOf(setUp: SetUp, personId: string, range: Span): (Span & { reason: string })[] {
  return setUp.absences
    .filter((absence) => absence.personId === personId)
    .flatMap((absence: Absence) => {
      const span = { from: absence.from, to: absence.to ?? range.to, reason: absence.reason };
      return clipSpan(span, range) ?? [];
    });
}

const wholeShopClosures = (setUp: SetUp, range: Span): Span[] => closuresOf(setUp, null, range);

/** Breaks are counted on the wall clock from the start of the shift, as its length is. */
function shiftSpans(shift: Shift, zone: string, range: Span): Span[] {
  return expandStarts(shift, zone, range).flatMap(({ start }) => {
    const whole = wallSpan(start, shift.minutes, zone);
    const breaks = shift.breaks.map((b) => wallSpan(start + b.after * 60_000, b.minutes, zone));
    return subtractSpans([whole], breaks).flatMap((span) => clipSpan(span, range) ?? []);
  });
}
