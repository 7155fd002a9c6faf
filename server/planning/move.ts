import type { Reason } from '#contracts/reasons.ts';
import type { Assignment, Minutes, Mode } from '#planner/types.ts';
import type { Booked } from '#server/db/bookings.ts';
import type { OpenStage } from '#server/db/open-jobs.ts';
import { sameBooking, type Facts } from './facts.ts';
import { freeLamps, isFree, type Others } from './free-hands.ts';
import { judge, newlyBroken, type Judged } from './judge.ts';
import { layPhases } from './lay-phases.ts';
import { buildProblem, frameOf, type Built, type Frame } from './problem/build-problem.ts';
import { toAssignment } from './problem/fixed.ts';
import { toReasons } from './reasons.ts';
import { toBooked } from './read-plan.ts';

export type Move = {
  stageId: string;
  start: Date;
  placeId: string;
  /** Absent: whoever has it keeps it if free, otherwise the first who may. */
  personId?: string | null | undefined;
  way?: string | undefined;
  pinned?: boolean | undefined;
};

/** What a move comes to: the items that change, the rules it would break, and the plan as it would be then. */
export type Moved = { changed: Booked[]; reasons: Reason[]; judged: Judged | null };

/** Stages that start together, and who follows on the spot. */
type Group = { stages: OpenStage[]; before: Booked[] };

/** A draft's item that stays exactly where it is: nothing to ask, nothing to write. */
function changesNothing(move: Move, now: Booked | undefined): boolean {
  return (
    now !== undefined &&
    now.from.getTime() === move.start.getTime() &&
    now.placeId === move.placeId &&
    (move.personId === undefined || move.personId === now.personId) &&
    (move.way ?? now.way) === now.way &&
    (move.pinned ?? now.pinned) === now.pinned
  );
}

/**
 * Moves a stage that has not begun in the open draft. Its load goes with it, and so do the stages done where it leaves the
 * part, at the distance they had. Pure: writes nothing.
 */
export function moveInDraft(facts: Facts, stage: OpenStage, move: Move, newId: () => string): Moved {
  if (changesNothing(move, facts.items.get(stage.id))) return { changed: [], reasons: [], judged: null };
  const frame = frameOf(facts);
  const groups = groupsOf(facts, stage);
  const loose = new Set(groups.flatMap(({ stages }) => stages.map(({ id }) => id)));
  const now = new Date(Math.floor(facts.now.getTime() / 60_000) * 60_000);
  const before = judge(facts, frame, { loose, now });
  const placed = placeGroups(facts, frame, { groups, loose, move, now, others: before, newId });
  const moved = withItems(facts, placed);
  const after = judge(moved, frame, { loose, now });
  const broken = newlyBroken(before.verdict.violations, after.verdict.violations);
  const changed = placed.filter((item) => {
    const old = facts.items.get(item.stageId);
    return !old || !sameBooking(old, item) || old.pinned !== item.pinned;
  });
  return { changed, reasons: toReasons(moved, after.built, broken), judged: after };
}

/** The stage's load, then, step by step, the stages that stay where it leaves the part. */
function groupsOf(facts: Facts, stage: OpenStage): Group[] {
  const stages = facts.jobs.flatMap((job) => job.stages);
  const sharing = (first: readonly OpenStage[]): Group => {
    const loads = new Set(first.flatMap(({ id }) => facts.items.get(id)?.loadId ?? []));
    const mates = stages.filter(({ id, state }) => state === 'waiting' && loads.has(facts.items.get(id)?.loadId ?? ''));
    const all = [...new Map([...first, ...mates].map((member) => [member.id, member])).values()];
    return { stages: all, before: all.flatMap(({ id }) => facts.items.get(id) ?? []) };
  };
  const next = ({ id }: OpenStage): OpenStage[] => {
    const chain = facts.jobs.find((job) => job.stages.some((other) => other.id === id))?.stages ?? [];
    const after = chain[chain.findIndex((other) => other.id === id) + 1];
    const item = after && facts.items.get(after.id);
    const stays = after?.ways.find((way) => way.id === item?.way)?.stay === true;
    return after && stays && after.state === 'waiting' ? [after] : [];
  };
  const groups = [sharing([stage])];
  for (let last = groups[0]; last; last = groups.at(-1)) {
    const followers = last.stages.flatMap(next);
    if (followers.length === 0) break;
    groups.push(sharing(followers));
  }
  return groups;
}

type Setting = {
  groups: Group[];
  loose: ReadonlySet<string>;
  move: Move;
  now: Date;
  others: Judged;
  newId: () => string;
};

function placeGroups(facts: Facts, frame: Frame, setting: Setting): Booked[] {
  const { groups, loose, move, now } = setting;
  const wanted = groups.flatMap((group, i) => group.stages.map((stage) => wantedItem(group, stage, i === 0, setting)));
  // The ways and places wanted decide what is offered, how long the purge lasts and who may do it.
  const { problem } = buildProblem(withItems(facts, wanted), frame, { kind: 'judge', loose }, now);
  const modes = new Map(problem.jobs.flatMap((job) => job.stages.map(({ id, modes: [mode] }) => [id, mode] as const)));
  const others: Others = {
    problem,
    assignments: setting.others.plan.assignments.filter(({ stage }) => !loose.has(stage)),
    modeOf: (at) => modes.get(at.stage),
  };
  const placed: Assignment[] = [];
  const keep = new Map(wanted.map((item) => [item.stageId, item]));
  let start: Minutes = frame.clock.down(move.start);
  groups.forEach((group, i) => {
    const items = group.stages.flatMap(({ id }) => keep.get(id) ?? []);
    if (i > 0) start = followingStart(groups[i - 1], group, placed, frame, modes);
    const beside = { ...others, assignments: [...others.assignments, ...placed] };
    placed.push(...placeLoad(items, start, beside, frame, i === 0 ? move.personId : undefined));
  });
  return placed.map((at) => {
    const item = keep.get(at.stage);
    return toBooked(at, frame.clock, { loadId: item?.loadId ?? setting.newId(), pinned: item?.pinned ?? false });
  });
}

function wantedItem(group: Group, stage: OpenStage, leads: boolean, { move, newId }: Setting): Booked {
  const old = group.before.find(({ stageId }) => stageId === stage.id);
  const way = (leads ? move.way : undefined) ?? old?.way ?? stage.ways[0]?.id ?? '';
  const phases = stage.ways.find(({ id }) => id === way)?.phases ?? [];
  let minute = 0;
  return {
    stageId: stage.id,
    personId: null,
    lampIds: [],
    loadId: newId(),
    ...old,
    way,
    placeId: move.placeId,
    from: move.start,
    to: move.start,
    phases: phases.map(({ minutes }): [number, number] => [minute, (minute += minutes)]),
    pinned: stage.id === move.stageId && move.pinned !== undefined ? move.pinned : (old?.pinned ?? false),
  };
}

/** As long after the stage before it as it was, as far as its window allows. */
function followingStart(
  lead: Group | undefined,
  group: Group,
  placed: readonly Assignment[],
  frame: Frame,
  modes: ReadonlyMap<string, Mode | undefined>,
): Minutes {
  const ids = new Set(lead?.stages.map(({ id }) => id));
  const end = Math.max(...placed.filter(({ stage }) => ids.has(stage)).map((at) => at.end));
  const was = Math.max(...(lead?.before ?? []).map(({ to }) => frame.clock.down(to)));
  const began = Math.min(...group.before.map(({ from }) => frame.clock.down(from)));
  const gaps = group.stages.flatMap(({ id }) => modes.get(id)?.gap ?? []);
  const least = Math.max(0, ...gaps.map(({ min }) => min));
  const most = Math.min(...gaps.map(({ max }) => max ?? Infinity));
  return end + Math.min(Math.max(began - was, least), most);
}

function placeLoad(
  items: readonly Booked[],
  start: Minutes,
  others: Others,
  frame: Pick<Built, 'clock' | 'roster'>,
  asked: string | null | undefined,
): Assignment[] {
  const drafts = items.map((item) => toAssignment(item, frame));
  const modes = drafts.flatMap((at) => others.modeOf(at) ?? []);
  const mode = modes[0];
  const first = drafts[0];
  if (!mode || !first || modes.some((m) => m.phases.length !== mode.phases.length))
    return drafts.map((at) => shifted(at, start));
  const hours = (person: string | null) => ({
    working: others.problem.people.find(({ id }) => id === person)?.working ?? [],
    open: others.problem.open,
  });
  const hands = mode.phases.some(({ attendance }) => attendance === 'hands');
  const at = frame.clock.instant(start);
  const own = items.find(({ personId }) => personId !== null)?.personId ?? null;
  const preferred = asked === undefined ? own : asked;
  const wish = preferred === null ? null : frame.roster.idAt(preferred, at);
  const may = mode.people.filter((id) => modes.every(({ people }) => people.includes(id)));
  const candidates = asked === undefined && hands ? [...new Set([...(wish ? [wish] : []), ...may])] : [wish];
  const lay = (person: string | null) => layPhases(modes, start, hours(person));
  const free = candidates.find((id) => id !== null && may.includes(id) && isFree(others, id, mode, lay(id)));
  // Nobody is free: as asked, so that the rule says who is in the way.
  const person = hands ? (free ?? candidates[0] ?? null) : (asked ?? null);
  const phases = lay(person);
  const end = phases.at(-1)?.[1] ?? start;
  const lamps = freeLamps(others, mode, first.place, phases, first.lamps) ?? fallbackLamps(mode, first.lamps);
  return drafts.map((draft) => ({ ...draft, person, lamps, start, end, phases }));
}

/** None are free: those it has, filled up, so that the rule says which are in use. */
const fallbackLamps = (mode: Mode, has: readonly string[]): string[] =>
  [...new Set([...has.filter((id) => mode.lamps.includes(id)), ...mode.lamps])].slice(0, mode.lampCount).sort();

function shifted(at: Assignment, start: Minutes): Assignment {
  const by = start - at.start;
  const phases = at.phases.map(([from, to]): [Minutes, Minutes] => [from + by, to + by]);
  return { ...at, start, end: at.end + by, phases };
}

function withItems(facts: Facts, changed: readonly Booked[]): Facts {
  const items = new Map(facts.items);
  for (const item of changed) items.set(item.stageId, { ...item, id: items.get(item.stageId)?.id ?? item.stageId });
  return { ...facts, items };
}
