import { liesWithin, minutesWithin, partsWithin } from '../intervals.ts';
import { modeOf, type PlanView, type Report, type Rule, type Sound } from '../plan-view.ts';
import type { Assignment, Interval } from '../types.ts';
import { minutesInLoad } from './order.ts';

/** Rule 8: hands-on phases lie in the person's working time, and one person does one thing at a time. */
export const hands: Rule = (view, report) => {
  for (const s of view.sound) {
    const needed = s.mode.phases.some((p) => p.attendance === 'hands');
    const who = s.at.person;
    if (needed && (who === null || !s.mode.people.includes(who)))
      report('person-not-allowed', s.at.stage, who === null ? [] : [who]);
    if (!needed && who !== null) report('person-not-needed', s.at.stage, [who]);
    inShift(view, s, report);
  }
  oneThing(view, report);
};

function inShift(view: PlanView, s: Sound, report: Report): void {
  const who = s.at.person;
  const shift = (who !== null && view.people.get(who)?.working) || NEVER_AT_WORK;
  s.mode.phases.forEach((phase, k) => {
    if (phase.attendance !== 'hands') return;
    const [from, to] = s.at.phases[k] ?? [0, 0];
    const need = minutesInLoad(view, s, k);
    const fine = s.mode.split ? fillsShift(from, to, need, shift) : liesWithin(from, to, shift);
    if (!fine) report('off-shift', s.at.stage, who === null ? [] : [who], [k, from, to]);
  });
}

/** Split work takes its minutes of the shift, and starts and ends inside it. */
const fillsShift = (from: number, to: number, need: number, shift: readonly Interval[]): boolean =>
  minutesWithin(from, to, shift) === need &&
  (!need || (liesWithin(from, from + 1, shift) && liesWithin(to - 1, to, shift)));

const NEVER_AT_WORK: readonly Interval[] = [];

type Busy = { from: number; to: number; stage: string; fixed: boolean };

/** The minutes of a load that its person is really at work: a split phase only fills the working time inside it. */
function busyParts(view: PlanView, a: Assignment): Interval[] {
  const mode = modeOf(view, a);
  const working = (a.person !== null && view.people.get(a.person)?.working) || NEVER_AT_WORK;
  return a.phases.flatMap((phase, k): Interval[] => {
    if (mode?.phases[k]?.attendance !== 'hands') return [];
    if (!mode.split) return [phase];
    return partsWithin(phase[0], phase[1], working);
  });
}

function oneThing(view: PlanView, report: Report): void {
  const busy = new Map<string, Busy[]>();
  for (const { members, fixed } of view.runs) {
    const a = members[0] as Assignment;
    if (a.person === null) continue;
    const list = busy.get(a.person) ?? [];
    busy.set(a.person, list);
    for (const [from, to] of busyParts(view, a)) list.push({ from, to, stage: a.stage, fixed });
  }
  for (const [who, list] of busy) {
    list.sort((x, y) => x.from - y.from);
    list.forEach((one, i) => {
      for (let k = i + 1; k < list.length; k++) {
        const two = list[k]!;
        if (two.from >= one.to) break;
        if (one.stage !== two.stage && two.to > two.from && !(one.fixed && two.fixed))
          report('person-busy', two.stage, [who, one.stage], [two.from, one.from, one.to]);
      }
    });
  }
}
