import type { PhaseKind } from '#contracts/common.ts';
import type { PlaceUse } from '#contracts/use.ts';
import { clipSpan, subtractSpans, type Span } from '../planning/spans.ts';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;

/** `held`: taken, but nothing is done there. */
type Doing = PhaseKind | 'held';
/** What counts where several things are said of one moment: the members of a load are one booth run. */
const weight: Doing[] = ['spray', 'bake', 'purge', 'work', 'setup', 'flash', 'cool', 'held'];

export type UsedSpan = Span & { doing: Doing };

export type Use = {
  from: Date;
  to: Date;
  phases: (Span & { kind: PhaseKind; hands: boolean })[];
  startedAt: Date | null;
  finishedAt: Date | null;
  /** Planned work that pauses when the person's shift does: their shifts; null where it never pauses. */
  shifts: Span[] | null;
  next: { startsAt: Date; stay: boolean; settle: number } | null;
};

/**
 * What a booking did to its place. Recorded times move the phases to the true start and cut them at the true end; the
 * last one takes up what is left over, and what has not ended lasts until now at least. Nothing recorded: as planned.
 */
export function usedSpans(use: Use, now: Date): UsedSpan[] {
  const phases = truePhases(use, now);
  const first = phases[0];
  const last = phases.at(-1);
  if (!first || !last) return [];
  const held: UsedSpan = { doing: 'held', from: first.from, to: holdEnd(last.to, use.next) };
  const doing = phases.flatMap((phase) =>
    subtractSpans([phase], phase.hands ? pauses(phase, use.shifts) : []).map((span): UsedSpan => ({
      ...span,
      doing: phase.kind,
    })),
  );
  return [held, ...doing];
}

function truePhases(use: Use, now: Date): Use['phases'] {
  if (use.startedAt === null) return use.phases;
  const shift = use.startedAt.getTime() - use.from.getTime();
  const moved = use.phases.map((phase) => ({ ...phase, from: later(phase.from, shift), to: later(phase.to, shift) }));
  const plannedEnd = later(use.to, shift);
  const end = use.finishedAt ?? (now > plannedEnd ? now : plannedEnd);
  const begun = moved.filter((phase) => phase.from < end);
  const last = begun.pop();
  return last ? [...begun, { ...last, to: end }] : [];
}

const later = (instant: Date, ms: number): Date => new Date(instant.getTime() + ms);

function holdEnd(end: Date, next: Use['next']): Date {
  if (next === null) return end;
  if (next.stay) return next.startsAt > end ? next.startsAt : end;
  return later(end, next.settle * MINUTE);
}

/** Time off between two stretches of work. Work before the first shift or after the last is overtime, not a pause. */
function pauses(phase: Span, shifts: Span[] | null): Span[] {
  if (shifts === null) return [];
  return subtractSpans([phase], shifts).filter((off) => off.from > phase.from && off.to < phase.to);
}

type Tally = Pick<PlaceUse, 'hours' | 'openHours' | 'busyOpenHours'>;

/**
 * Hours of one place in a range. Each moment counts once, so the hours never add up to more than the range is long.
 * `open` is when the place could be used. Busy means that something is done; a place that is only held is not busy.
 */
export function tally(used: UsedSpan[], open: Span[], range: Span): Tally {
  const hours = { setup: 0, work: 0, spray: 0, flash: 0, purge: 0, bake: 0, cool: 0, held: 0 };
  let busyOpenHours = 0;
  sweep(used, open, range, (doing, isOpen, ms) => {
    hours[doing] += ms / HOUR;
    if (isOpen && doing !== 'held') busyOpenHours += ms / HOUR;
  });
  const openMs = open.flatMap((span) => clipSpan(span, range) ?? []).reduce((sum, span) => sum + length(span), 0);
  return { hours, openHours: openMs / HOUR, busyOpenHours };
}

const length = (span: Span): number => span.to.getTime() - span.from.getTime();

type Edge = { at: number; what: Doing | 'open'; step: 1 | -1 };

function sweep(
  used: UsedSpan[],
  open: Span[],
  range: Span,
  tell: (doing: Doing, isOpen: boolean, ms: number) => void,
): void {
  const labelled = [
    ...used.map(({ doing, ...span }) => ({ ...span, what: doing })),
    ...open.map((span) => ({ ...span, what: 'open' as const })),
  ];
  const edges = labelled
    .flatMap((span) => clipSpan(span, range) ?? [])
    .flatMap(({ from, to, what }): Edge[] => [
      { at: from.getTime(), what, step: 1 },
      { at: to.getTime(), what, step: -1 },
    ])
    .sort((a, b) => a.at - b.at);
  const going = new Map<Edge['what'], number>();
  const isOn = (what: Edge['what']): boolean => (going.get(what) ?? 0) > 0;
  edges.forEach(({ at, what, step }, i) => {
    going.set(what, (going.get(what) ?? 0) + step);
    const until = edges[i + 1]?.at ?? at;
    const doing = weight.find(isOn);
    if (doing !== undefined && until > at) tell(doing, isOn('open'), until - at);
  });
}
