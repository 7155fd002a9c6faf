/** A half-open stretch of time `[from, to)`. */
export type Span = { from: Date; to: Date };

const byStart = (a: Span, b: Span): number => a.from.getTime() - b.from.getTime();

/** Sorted, overlaps and touching neighbours joined, empty ones left out. */
export function joinSpans(spans: readonly Span[]): Span[] {
  const out: Span[] = [];
  for (const span of [...spans].sort(byStart)) {
    const last = out.at(-1);
    if (span.from >= span.to) continue;
    if (!last || span.from > last.to) out.push({ ...span });
    else if (span.to > last.to) last.to = span.to;
  }
  return out;
}

/** What is left of `spans` without `cuts`; sorted and joined. */
export function subtractSpans(spans: readonly Span[], cuts: readonly Span[]): Span[] {
  const holes = joinSpans(cuts);
  return joinSpans(spans).flatMap((span) => {
    const left: Span[] = [];
    let from = span.from;
    for (const hole of holes) {
      if (hole.to <= from || hole.from >= span.to) continue;
      if (hole.from > from) left.push({ from, to: hole.from });
      from = hole.to;
    }
    return from < span.to ? [...left, { from, to: span.to }] : left;
  });
}

/** The part of a span inside `range`; null where they do not meet. */
export function clipSpan<T extends Span>(span: T, range: Span): T | null {
  const from = span.from > range.from ? span.from : range.from;
  const to = span.to < range.to ? span.to : range.to;
  return from < to ? { ...span, from, to } : null;
}
