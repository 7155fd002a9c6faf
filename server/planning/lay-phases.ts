import type { Interval, Minutes, Mode, Phase } from '#planner/types.ts';

const ADD_UP = new Set<Phase['kind']>(['setup', 'work', 'spray']);

type Hours = { working: readonly Interval[]; open: readonly Interval[] };

/**
 * The phases of a load from a start on, one after the other as early as they go: hands-on work that may pause takes
 * working time only, and where a phase may wait, the next one begins when its people are there. What cannot be kept
 * is laid all the same and left to the rules.
 */
export function layPhases(modes: readonly Mode[], start: Minutes, hours: Hours): Interval[] {
  const lead = modes[0];
  if (!lead) return [];
  let at = start;
  return lead.phases.map((phase, k) => {
    const minutes = minutesOf(modes, k);
    const wait = lead.phases[k - 1]?.wait ?? 0;
    const within = phase.attendance === 'hands' ? hours.working : phase.attendance === 'onsite' ? hours.open : null;
    const from = within && wait > 0 ? firstFit(at, at + wait, minutes, within) : at;
    const to = phase.attendance === 'hands' && lead.split ? afterWork(from, minutes, hours.working) : from + minutes;
    at = to;
    return [from, to];
  });
}

/** Setting up, working and spraying add up over the members of a load; the others take the longest (planning rule 5). */
function minutesOf(modes: readonly Mode[], k: number): Minutes {
  const all = modes.map((mode) => mode.phases[k]?.minutes ?? 0);
  const kind = modes[0]?.phases[k]?.kind;
  return kind && ADD_UP.has(kind) ? all.reduce((a, b) => a + b, 0) : Math.max(...all);
}

function firstFit(from: Minutes, latest: Minutes, minutes: Minutes, within: readonly Interval[]): Minutes {
  const starts = within.map(([s, e]) => (Math.max(s, from) + minutes <= e ? Math.max(s, from) : Infinity));
  const first = Math.min(Infinity, ...starts);
  return first <= latest ? first : from;
}

function afterWork(from: Minutes, minutes: Minutes, working: readonly Interval[]): Minutes {
  let left = minutes;
  for (const [s, e] of working) {
    const begins = Math.max(s, from);
    if (begins >= e) continue;
    if (e - begins >= left) return begins + left;
    left -= e - begins;
  }
  return from + minutes;
}
