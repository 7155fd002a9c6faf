import fc from 'fast-check';
import { expect, it } from 'vitest';
import type { Way } from '#contracts/sheets.ts';
import { checkPlan, parseProblem, plan } from '#planner/index.ts';
import type { OpenJob } from '#server/db/open-jobs.ts';
import type { Facts } from '#server/planning/facts.ts';
import { frameOf } from '#server/planning/problem/build-problem.ts';
import { problemToPlan } from '#server/planning/problem/problem-to-plan.ts';
import { judge } from '#server/planning/judge.ts';
import { readPlan, readUnplaced } from '#server/planning/read-plan.ts';
import { toReasons } from '#server/planning/reasons.ts';
import {
  airDry,
  at,
  booked,
  boothBake,
  facts,
  item,
  job,
  lamp,
  lampCure,
  MONDAY,
  person,
  place,
  posted,
  spray,
  stage,
  way,
} from './factories.ts';

const WAYS: Way[][] = [
  [
    way({
      placeKinds: ['prep', 'booth'],
      skill: 'prep',
      split: true,
      phases: [{ kind: 'work', minutes: 90, attendance: 'hands' }],
    }),
  ],
  [spray({ family: 'primer', load: 'primer' })],
  [boothBake(), lampCure(), airDry()],
  [spray({ family: 'base', gap: { min: 15, max: 1440, settle: 15 } }), spray({ id: 'spot', placeKinds: ['prep'] })],
  [boothBake({ bakeCelsius: 70 }), airDry()],
  [way({ id: 'polish', placeKinds: ['prep', 'rack'], skill: 'prep', gap: { min: 30, max: null, settle: 0 } })],
];
const CIRCUIT = { id: '01890000-0000-7000-8000-00000000c1c1', name: 'North', kilowatts: 9 };

const flags = fc.integer({ min: 0, max: 255 });
const shops = fc.record({
  places: fc.array(
    fc.record({ kind: fc.constantFrom('booth', 'prep', 'rack'), units: fc.integer({ min: 1, max: 6 }), flags }),
    { minLength: 1, maxLength: 5 },
  ),
  people: fc.array(fc.record({ flags, trained: fc.constantFrom(null, '2021-06-05', '2021-01-10', '2024-02-29') }), {
    maxLength: 3,
  }),
  lamps: fc.integer({ min: 0, max: 2 }),
  jobs: fc.array(
    fc.record({
      stages: fc.array(fc.nat(WAYS.length - 1), { minLength: 1, maxLength: 5 }),
      begun: fc.nat(3),
      flags,
      units: fc.integer({ min: 1, max: 4 }),
      hour: fc.integer({ min: -30, max: 60 }),
    }),
    { maxLength: 5 },
  ),
  closures: fc.array(
    fc.record({ place: fc.nat(4), hour: fc.integer({ min: 0, max: 60 }), minutes: fc.integer({ min: 1, max: 3000 }) }),
    { maxLength: 3 },
  ),
  minute: fc.integer({ min: -600, max: 900 }),
});
type Drawn = typeof shops extends fc.Arbitrary<infer T> ? T : never;

const bit = (of: number, which: number): boolean => (of & (1 << which)) > 0;
const hoursFrom = (hours: number): Date => new Date(MONDAY.getTime() + hours * 3_600_000);

function shopOf(drawn: Drawn): Facts {
  const zoneId = '01890000-0000-7000-8000-00000000aaaa';
  const places = drawn.places.map(({ kind, units, flags: f }) =>
    place({
      kind,
      units,
      zoneId: bit(f, 0) ? zoneId : null,
      bakes: bit(f, 1),
      retired: bit(f, 2) && bit(f, 3),
      airFlowM3PerHour: bit(f, 4) && bit(f, 5) ? null : 4000,
    }),
  );
  const people = drawn.people.map(({ flags: f, trained }) =>
    person({
      sprayTrainedOn: trained,
      skills: bit(f, 0) ? ['prep'] : ['paint', 'prep'],
      retired: bit(f, 1) && bit(f, 2),
    }),
  );
  const bookings: Facts['bookings'] = new Map();
  const items: Facts['items'] = new Map();
  const jobs = drawn.jobs.map((one): OpenJob => {
    const stages = one.stages.map((which, i) => {
      const begun = i < one.begun;
      const start = hoursFrom(one.hour + 2 * i);
      const state = !begun ? 'waiting' : i === one.begun - 1 && bit(one.flags, 0) ? 'running' : 'done';
      const times = {
        startedAt: begun ? start : null,
        finishedAt: state === 'done' ? new Date(start.getTime() + 3_000_000) : null,
      };
      const made = stage(WAYS[which] ?? [], { state, ...times });
      const spot = places[(which + i) % places.length];
      if (spot && bit(one.flags, 1 + (i % 3))) {
        const b = booked(made, start, spot.id, { personId: people[0]?.id ?? null, pinned: bit(one.flags, 4) });
        bookings.set(made.id, posted(b, { state: state === 'waiting' ? 'planned' : state }));
        items.set(made.id, item(b));
      }
      return made;
    });
    return job(stages, {
      electric: bit(one.flags, 5),
      promiseAt: bit(one.flags, 6) ? hoursFrom(one.hour) : null,
      releaseAt: hoursFrom(one.hour - 10),
      parts: [{ name: 'Part', substrate: bit(one.flags, 7) ? 'abs' : 'steel', units: one.units }],
    });
  });
  const closures = drawn.closures.map(({ place: which, hour, minutes }, i) => ({
    id: `c${i}`,
    kind: which === 4 ? ('maintenance' as const) : ('breakdown' as const),
    label: '',
    placeId: which === 4 ? null : (places[which % places.length]?.id ?? null),
    lampId: null,
    startsLocal: hoursFrom(hour).toISOString().slice(0, 16),
    rule: null,
    minutes,
  }));
  const lamps = Array.from({ length: drawn.lamps }, () => lamp({ circuitId: CIRCUIT.id, kilowatts: 5 }));
  const now = new Date(MONDAY.getTime() + drawn.minute * 60_000 + 12_345);
  const of = facts(
    {
      places,
      people,
      lamps,
      circuits: [CIRCUIT],
      closures,
      shop: { cleanups: [{ from: 'primer', to: 'base', minutes: 15 }] },
    },
    jobs,
    { now },
  );
  return {
    ...of,
    bookings,
    items,
    draft:
      drawn.minute % 2 === 0
        ? {
            id: 'd',
            planNumber: 1,
            version: 1,
            cost: null,
            bound: null,
            unplaced: [],
            updatedBy: null,
            updatedAt: at(1, '06:00'),
            air: null,
          }
        : null,
  };
}

it('whatever the shop and whatever has happened: the problem reads, the plan keeps every rule, nobody is dropped', () => {
  const met = { placed: 0, unplaced: 0, fixed: 0, broken: 0, reread: 0 };
  fc.assert(
    fc.property(shops, fc.constantFrom('all' as const, 'rest' as const), (drawn, scope) => {
      const of = shopOf(drawn);
      const built = problemToPlan(of, scope, 5);
      const parsed = parseProblem(JSON.parse(JSON.stringify(built.problem)));
      expect('faults' in parsed ? parsed.faults : []).toEqual([]);
      const made = plan(built.problem, { seed: 1, evaluations: 3 });
      expect(checkPlan(built.problem, made).violations).toEqual([]);
      let n = 0;
      const items = readPlan(of, built, made, () => `load-${n++}`);
      const unplaced = readUnplaced(of, built, made);
      met.placed += items.length;
      met.unplaced += unplaced.length;
      met.fixed += built.problem.fixed.length;
      const there = new Set(items.map(({ stageId }) => stageId));
      for (const one of of.jobs) {
        const waiting = one.stages.filter(({ state }) => state === 'waiting');
        const said = unplaced.some(({ jobId, reason }) => jobId === one.id && reason.length > 10);
        expect(said || waiting.every(({ id }) => there.has(id))).toBe(true);
      }
      // Looking at it again as if drawn by hand finds nothing that the planner has broken.
      const drawnByHand: Facts = {
        ...of,
        items: new Map(items.map((i) => [i.stageId, { ...i, id: i.stageId }])),
        draft: of.draft,
      };
      if (of.draft === null) return;
      const fixed = new Set(built.problem.fixed.map(({ stage: id }) => id));
      const judged = judge(drawnByHand, frameOf(drawnByHand), { loose: new Set(), now: of.now });
      const mine = judged.verdict.violations.filter(({ stage: id, ids }) => ![id, ...ids].some((x) => fixed.has(x)));
      expect(mine).toEqual([]);
      met.reread += 1;
      met.broken += judged.verdict.violations.length;
      expect(toReasons(drawnByHand, judged.built, judged.verdict.violations)).toBeInstanceOf(Array);
    }),
    { numRuns: 150, seed: 20_261_201 },
  );
  // None of it was empty talk.
  expect(
    Object.values(met).every((count) => count > 20),
    JSON.stringify(met),
  ).toBe(true);
});
