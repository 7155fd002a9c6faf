import type { Way } from '#contracts/sheets.ts';
import type { Mode, Phase } from '#planner/types.ts';
import type { OpenJob, OpenStage } from '#server/db/open-jobs.ts';
import type { PlaceSetUp } from '#server/db/resources.ts';
import { airedGap, bookedMinutes, coatingOf, isFlash, phaseMinutes } from '../air/aired-way.ts';
import { modeId } from './mode-id.ts';
import type { Candidate, Narrowed, Offer, Setting } from './offers.ts';
import type { WayRefusal } from './refusals.ts';
import { unitsOf } from './units.ts';

/** A way with its minutes in the air of some of its places. */
type Timed = { way: Way; places: PlaceSetUp[] };
type Where = { job: OpenJob; stage: OpenStage; before: readonly PlaceSetUp[]; setting: Setting };

/** The planner's modes for what is left of a stage's ways. `before`: where the stage before it may leave the part. */
export function toOffer(
  job: OpenJob,
  { stage, candidates, refused }: Narrowed,
  before: readonly PlaceSetUp[],
  setting: Setting,
): Offer {
  const modes = candidates.flatMap((candidate): Mode[] => {
    const made = toModes(candidate, { job, stage, before, setting });
    if (Array.isArray(made)) return made;
    refused.set(candidate.way.id, made);
    return [];
  });
  return { modes, refused };
}

function toModes({ way, places, purge }: Candidate, where: Where): Mode[] | WayRefusal {
  if (places.length === 0) return { code: 'no-place', figures: [] };
  const timed = where.setting.chosen ? [asChosen(way, places, where)] : inTheAir(way, places, where);
  if (!Array.isArray(timed)) return timed;
  const modes: Mode[] = [];
  for (const [group, one] of timed.entries()) {
    const mode = toMode(where.job, one, purge, where.setting);
    if ('code' in mode) return mode;
    modes.push({ ...mode, id: modeId(way.id, group) });
  }
  return modes;
}

/**
 * What the planner may choose: the minutes that the expected air asks, apart for places in which they differ. A part that
 * stays where it was gets the most that any of the places asks, since the planner decides later which it is.
 */
function inTheAir(way: Way, places: PlaceSetUp[], { job, stage, before, setting }: Where): Timed[] | WayRefusal {
  const coatingId = coatingOf(job.stages, stage.id);
  const gap = gapInTheAir(way, { job, stage, before, setting });
  if (gap.max !== null && gap.min > gap.max) return { code: 'flash-past-window', figures: [gap.min, gap.max] };
  const groups = new Map<string, Timed>();
  for (const some of way.stay ? [places] : places.map((place) => [place])) {
    const minutes = phaseMinutes(way, coatingId, some, setting.air);
    const group = groups.get(minutes.join());
    if (group) group.places.push(...some);
    else groups.set(minutes.join(), { way: { ...withMinutes(way, minutes), gap }, places: [...some] });
  }
  return [...groups.values()];
}

function gapInTheAir(way: Way, { job, stage, before, setting }: Where): Way['gap'] {
  const previous = job.stages[job.stages.findIndex(({ id }) => id === stage.id) - 1];
  if (!previous || !isFlash(way, previous)) return way.gap;
  return airedGap(way, coatingOf(job.stages, previous.id), before, setting.air);
}

/** What a plan that is there has chosen: as it was booked, or, where somebody moves it, in the air of where it goes. */
function asChosen(way: Way, places: PlaceSetUp[], { job, stage, setting }: Where): Timed {
  const coatingId = coatingOf(job.stages, stage.id);
  const spot = setting.chosen?.get(stage.id);
  const there = setting.resources.places.filter(({ id }) => id === spot?.placeId);
  const minutes =
    (spot?.phases && bookedMinutes(way, coatingId, spot.phases, setting.air)) ??
    phaseMinutes(way, coatingId, there, setting.air);
  return { way: withMinutes(way, minutes), places };
}

const withMinutes = (way: Way, minutes: readonly number[]): Way => ({
  ...way,
  phases: way.phases.map((phase, k) => ({ ...phase, minutes: minutes[k] ?? phase.minutes })),
});

function toMode(
  job: OpenJob,
  { way, places }: Timed,
  purge: number,
  { resources, roster }: Setting,
): Mode | WayRefusal {
  const hands = way.phases.some((phase) => phase.attendance === 'hands');
  const spraying = way.phases.some((phase) => phase.kind === 'spray');
  const people = hands ? roster.who(way.skill, spraying) : [];
  if (hands && people.length === 0)
    return {
      code: roster.who(way.skill, false).length > 0 ? 'no-trained-person' : 'no-person',
      figures: [],
      skill: way.skill ?? '',
    };
  const lamps = way.lampCount > 0 ? resources.lamps.filter((lamp) => !lamp.retired).map(({ id }) => id) : [];
  if (lamps.length < way.lampCount) return { code: 'no-lamps', figures: [way.lampCount, lamps.length] };
  const timed = withPurge(way, purge);
  if ('code' in timed) return timed;
  return {
    id: way.id,
    places: way.stay ? [] : places.map(({ id }) => id),
    stay: way.stay,
    people,
    lamps,
    lampCount: way.lampCount,
    units: unitsOf(job),
    family: way.family,
    load: way.load,
    split: way.split,
    ...timed,
  };
}

/**
 * A purge phase before the first heat is at least as long as the place asks. A way without one waits that long after the
 * stage before it, or, where it sprays itself, flashes that long.
 */
function withPurge(way: Way, purge: number): Pick<Mode, 'gap' | 'phases'> | WayRefusal {
  const phases: Phase[] = way.phases.map(({ kind, minutes, attendance, lamp, wait }) => ({
    kind,
    minutes,
    attendance,
    ...(lamp === undefined ? {} : { lamp }),
    ...(wait === undefined ? {} : { wait }),
  }));
  const heat = phases.findIndex((phase) => phase.kind === 'bake' || phase.lamp === true);
  if (purge === 0 || heat < 0) return { gap: way.gap, phases };
  const sprayed = phases.slice(0, heat).findLastIndex((phase) => phase.kind === 'spray');
  const between = phases.slice(sprayed + 1, heat);
  const own =
    between.findLast((phase) => phase.kind === 'purge') ?? between.findLast((phase) => phase.kind === 'flash');
  if (own && (own.kind === 'purge' || sprayed >= 0)) {
    own.minutes = Math.max(own.minutes, purge);
    return { gap: way.gap, phases };
  }
  if (sprayed >= 0 || (way.gap.max !== null && way.gap.max < purge)) return { code: 'no-purge', figures: [] };
  return { gap: { ...way.gap, min: Math.max(way.gap.min, purge) }, phases };
}
