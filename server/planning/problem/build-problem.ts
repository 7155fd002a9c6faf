import { LEAST_PURGE_MINUTES } from '#chemistry/purge/purge-minutes.ts';
import type { Assignment, Job, Mode, Place, Problem } from '#planner/types.ts';
import type { OpenJob } from '#server/db/open-jobs.ts';
import type { Resources } from '#server/db/resources.ts';
import { closedSpans, openSpans } from '../calendars.ts';
import { airBook } from '../air/air-book.ts';
import { standingOf, type Facts } from '../facts.ts';
import { localDayOf, spanOfLocalDay } from '../local-time.ts';
import type { Span } from '../spans.ts';
import { chooseFixed, type Purpose } from './choose-fixed.ts';
import { clockFrom, type Clock } from './clock.ts';
import { begunStage, ELSEWHERE, standingMode, toAssignment, type Standing } from './fixed.ts';
import { purgeOf } from './heat.ts';
import { modeAt } from './mode-id.ts';
import { offersFor, type ChosenSpot, type FixedSpot, type Offer } from './offers.ts';
import { rosterOf, type Roster } from './roster.ts';

const DAY = 24 * 3_600_000;
/** How far ahead is planned: three weeks, and three days past the last promise, but not past half a year. */
const HORIZON_DAYS = 21;
const PAST_PROMISE_DAYS = 3;
const LONGEST_DAYS = 180;

/** A planning problem and what is needed to read its answers. */
export type Built = {
  problem: Problem;
  clock: Clock;
  roster: Roster;
  /** By stage: which ways were left, and why the others were not. */
  offers: Map<string, Offer>;
};

/** Calendars of one moment, worked out once for all problems built from the same facts. */
export type Frame = {
  clock: Clock;
  roster: Roster;
  shop: Omit<Problem, 'now' | 'jobs' | 'fixed' | 'baseline'>;
};

export function frameOf(facts: Facts): Frame {
  const { resources } = facts;
  const zone = resources.shop.timeZone;
  const midnight = (at: Date): Date => spanOfLocalDay(localDayOf(at, zone), zone).from;
  const today = midnight(facts.now);
  const clock = clockFrom(
    new Date(Math.min(today.getTime(), ...knownStarts(facts).map((at) => midnight(at).getTime()))),
  );
  // Hours of days gone by are nobody's business; one day back serves what has run overnight.
  const range = { from: new Date(Math.max(clock.origin.getTime(), today.getTime() - DAY)), to: horizonOf(facts) };
  const roster = rosterOf(resources, range, clock);
  const { lampMoveMinutes, cleanups, objective } = resources.shop;
  return {
    clock,
    roster,
    shop: {
      version: 1,
      origin: clock.origin.toISOString(),
      horizon: clock.down(range.to),
      open: clock.free(openSpans(resources, range)),
      purge: purgeOfShop(resources),
      lampMove: lampMoveMinutes,
      cleanups,
      places: placesOf(resources, range, clock),
      lamps: resources.lamps.map((lamp) => ({
        id: lamp.id,
        kw: lamp.kilowatts,
        circuit: lamp.circuitId,
        closed: clock.taken(closedSpans(resources, { lampId: lamp.id }, range)),
      })),
      circuits: resources.circuits.map(({ id, kilowatts }) => ({ id, kw: kilowatts })),
      people: roster.people,
      objective,
    },
  };
}

/** What has begun and what is booked must lie after minute 0. */
function knownStarts({ jobs, bookings, items }: Facts): Date[] {
  const begun = jobs.flatMap((job) => job.stages.flatMap((stage) => stage.startedAt ?? []));
  return [...begun, ...[...bookings.values(), ...items.values()].map(({ from }) => from)];
}

function horizonOf({ now, jobs, bookings, items }: Facts): Date {
  const promises = jobs.flatMap((job) => job.promiseAt?.getTime() ?? []);
  const ends = [...bookings.values(), ...items.values()].map(({ to }) => to.getTime() + DAY);
  const wanted = Math.max(
    now.getTime() + HORIZON_DAYS * DAY,
    ...promises.map((promise) => promise + PAST_PROMISE_DAYS * DAY),
    ...ends,
  );
  return new Date(Math.min(wanted, now.getTime() + LONGEST_DAYS * DAY));
}

/** The planner knows one purge for lamps in all zones: the longest that any booth or heated place asks. */
const purgeOfShop = ({ places }: Resources): number =>
  Math.max(LEAST_PURGE_MINUTES, ...places.filter((place) => !place.retired).map((place) => purgeOf(place) ?? 0));

function placesOf(resources: Resources, range: Span, clock: Clock): Place[] {
  const places = resources.places.map(({ id, kind, zoneId, units }) => ({
    id,
    kind,
    zone: zoneId,
    units,
    closed: clock.taken(closedSpans(resources, { placeId: id }, range)),
  }));
  return [...places, { id: ELSEWHERE, kind: 'rack', zone: null, units: 1_000_000, closed: [] }];
}

/**
 * The problem of a shop at a moment. Ids are those of the tables, but see `roster.ts`. `now` may lie later than the facts:
 * a plan takes a while to make and to read.
 */
export function buildProblem(facts: Facts, frame: Frame, purpose: Purpose, now: Date): Built {
  const { clock, roster, shop } = frame;
  const standing = standingStages(facts, frame, purpose);
  const places = new Map(facts.resources.places.map((place) => [place.id, place]));
  const spots = new Map<string, FixedSpot>();
  for (const [id, { assignment: at }] of standing)
    spots.set(id, { place: places.get(at.place) ?? null, way: at.mode, phases: at.phases });
  const offers = new Map<string, Offer>();
  const chosen = purpose.kind === 'judge' ? chosenSpots(facts, purpose.loose) : null;
  const air = airBook({ ...facts, openings: facts.resources.openings });
  const jobs = facts.jobs.filter((job) => job.stages.length > 0);
  for (const job of jobs)
    for (const [id, offer] of offersFor(job, { resources: facts.resources, roster, fixed: spots, chosen, air }))
      offers.set(id, offer);
  const fixed = sharedLoads([...standing.values()].map(({ assignment }) => assignment));
  return {
    clock,
    roster,
    offers,
    problem: {
      ...shop,
      now: clock.up(now),
      horizon: Math.max(shop.horizon, clock.up(now), ...fixed.map(({ end }) => end)),
      jobs: jobs.map((job) => jobOf(job, clock, standing, offers)),
      fixed,
      baseline: baselineOf(facts, frame, standing, offers),
    },
  };
}

function standingStages(facts: Facts, frame: Frame, purpose: Purpose): Map<string, Standing> {
  const kept = chooseFixed(facts, purpose);
  const parts = { ...frame, now: facts.now };
  const standing = new Map<string, Standing>();
  for (const { job, stage, booked } of kept)
    if (stage.state !== 'waiting') standing.set(stage.id, begunStage(job, stage, booked, parts));
  // A waiting member of a load goes with those that have begun.
  const begun = new Map(
    [...standing.values()].flatMap(({ stage, booked, assignment }) =>
      booked && stage.state === 'running' ? [[booked.loadId, assignment] as const] : [],
    ),
  );
  for (const { job, stage, booked } of kept) {
    if (stage.state !== 'waiting' || booked === null) continue;
    const own = toAssignment(booked, frame);
    const lead = begun.get(booked.loadId);
    const times = lead?.phases.length === own.phases.length ? lead : own;
    const { start, end, phases } = times;
    standing.set(stage.id, { job, stage, booked, assignment: { ...own, start, end, phases } });
  }
  return standing;
}

/** A load of one is no load. */
export function sharedLoads(assignments: readonly Assignment[]): Assignment[] {
  const size = new Map<string, number>();
  for (const { load } of assignments) if (load !== null) size.set(load, (size.get(load) ?? 0) + 1);
  return assignments.map((at) => (at.load !== null && size.get(at.load) === 1 ? { ...at, load: null } : at));
}

/** Where the plan that is judged has each stage. One that is being moved is laid anew, in the air of where it goes. */
const chosenSpots = (facts: Facts, loose: ReadonlySet<string>): Map<string, ChosenSpot> =>
  new Map(
    facts.jobs.flatMap((job) =>
      job.stages.flatMap((stage) => {
        const booked = standingOf(facts, stage);
        if (!booked) return [];
        const { way, placeId } = booked;
        return [[stage.id, { way, placeId, phases: loose.has(stage.id) ? null : booked.phases }] as const];
      }),
    ),
  );

function jobOf(job: OpenJob, clock: Clock, standing: Map<string, Standing>, offers: Map<string, Offer>): Job {
  return {
    id: job.id,
    release: clock.up(job.releaseAt),
    due: job.promiseAt === null ? null : clock.down(job.promiseAt),
    weight: job.weight,
    stages: job.stages.map((stage) => {
      const stands = standing.get(stage.id);
      const modes = stands ? [standingMode(stands)] : (offers.get(stage.id)?.modes ?? []);
      return { id: stage.id, kind: stage.kind, modes: modes.length > 0 ? modes : [NO_WAY] };
    }),
  };
}

/** Keeps a stage without any way in the problem: it can be placed nowhere, so its job is reported and not forgotten. */
const NO_WAY: Mode = {
  id: 'no-way',
  places: [],
  stay: false,
  people: [],
  lamps: [],
  lampCount: 0,
  units: 1,
  family: null,
  load: null,
  gap: { min: 0, max: null, settle: 0 },
  split: false,
  phases: [{ kind: 'work', minutes: 1, attendance: 'none' }],
};

function baselineOf(
  facts: Facts,
  frame: Frame,
  standing: Map<string, Standing>,
  offers: Map<string, Offer>,
): Assignment[] {
  const waiting = new Set(
    facts.jobs
      .flatMap((job) => job.stages.filter(({ id, state }) => state === 'waiting' && !standing.has(id)))
      .map(({ id }) => id),
  );
  return [...facts.bookings.values()]
    .filter(({ stageId }) => waiting.has(stageId))
    .map((booked) => {
      const mode = modeAt(offers.get(booked.stageId)?.modes ?? [], booked.way, booked.placeId);
      const at = toAssignment(booked, frame);
      return mode === undefined ? at : { ...at, mode };
    });
}
