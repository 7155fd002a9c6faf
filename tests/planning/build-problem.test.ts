import { describe, expect, it } from 'vitest';
import { checkPlan, parseProblem, plan } from '#planner/index.ts';
import type { Facts } from '#server/planning/facts.ts';
import { frameOf } from '#server/planning/problem/build-problem.ts';
import { problemToPlan } from '#server/planning/problem/problem-to-plan.ts';
import { readPlan, readUnplaced } from '#server/planning/read-plan.ts';
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
  person,
  place,
  posted,
  spray,
  stage,
  way,
} from './factories.ts';

const build = (of: Facts, scope: 'all' | 'rest' = 'all') => problemToPlan(of, scope, 0);
const planned = (of: Facts, scope: 'all' | 'rest' = 'all') => {
  const built = build(of, scope);
  const parsed = parseProblem(JSON.parse(JSON.stringify(built.problem)));
  expect(parsed).not.toHaveProperty('faults');
  const made = plan(built.problem, { seed: 1, evaluations: 20 });
  expect(checkPlan(built.problem, made).violations).toEqual([]);
  let n = 0;
  return {
    built,
    made,
    items: readPlan(of, built, made, () => `new-${n++}`),
    unplaced: readUnplaced(of, built, made),
  };
};
const modesOf = (of: Facts, stageId: string): string[] =>
  build(of)
    .problem.jobs.flatMap((j) => j.stages)
    .find(({ id }) => id === stageId)
    ?.modes.map(({ id }) => id) ?? [];

describe('heat', () => {
  const bake = stage([boothBake(), airDry()]);
  const shop = { places: [place(), place({ kind: 'rack' })] };

  it('a bake above what the part stands is not offered', () => {
    const hot = stage([boothBake({ bakeCelsius: 80 }), airDry()]);
    const abs = { parts: [{ name: 'Grille', substrate: 'abs' as const, units: 1 }] };
    expect(modesOf(facts(shop, [job([stage([spray()]), hot], abs)]), hot.id)).toEqual(['air']);
    expect(modesOf(facts(shop, [job([stage([spray()]), hot])]), hot.id)).toEqual(['booth-bake', 'air']);
  });

  // 49 C where no maker's limit is recorded: common practice, a little above the 120 F that several makers print.
  it.each([
    [49, ['booth-bake', 'air']],
    [50, ['air']],
  ])('an electric vehicle with nothing recorded at %i C', (celsius, ways) => {
    const warm = stage([boothBake({ bakeCelsius: celsius }), airDry()]);
    expect(modesOf(facts(shop, [job([stage([spray()]), warm], { electric: true })]), warm.id)).toEqual(ways);
  });

  it('45 minutes of heat count over all bakes of an electric vehicle, what is done included', () => {
    const cool = { bakeCelsius: 45 };
    const primer = stage([boothBake(cool), airDry()]);
    const clear = stage([boothBake(cool), airDry()]);
    const two = job([stage([spray()]), primer, stage([spray()]), clear], { electric: true });
    // 30 + 30 is too long: the primer dries by air.
    expect(modesOf(facts(shop, [two]), primer.id)).toEqual(['air']);
    expect(modesOf(facts(shop, [two]), clear.id)).toEqual(['booth-bake', 'air']);
    const [booth] = shop.places;
    const done = { state: 'done' as const, startedAt: at(1, '06:00'), finishedAt: at(1, '06:33') };
    const baked = { ...primer, ...done };
    const later = job(
      [
        { ...stage([spray()]), ...done, startedAt: at(1, '05:00'), finishedAt: at(1, '05:30') },
        baked,
        stage([spray()]),
        clear,
      ],
      {
        electric: true,
      },
    );
    const bookings = [posted(booked(baked, at(1, '06:00'), booth?.id ?? '', { way: 'booth-bake' }), { state: 'done' })];
    expect(modesOf(facts(shop, [later], { bookings }), clear.id)).toEqual(['air']);
    expect(modesOf(facts(shop, [{ ...later, heatLimitMinutes: 60 }], { bookings }), clear.id)).toContain('booth-bake');
  });

  it('a stage that only heat could do is unplaced, and says why', () => {
    const only = stage([boothBake()]);
    const electric = job([stage([spray()]), only], { electric: true });
    const { unplaced, items } = planned(facts(shop, [electric, job([stage([spray()])])]));
    expect(unplaced).toEqual([
      { jobId: electric.id, stageId: only.id, reason: expect.stringMatching(/heat limit of 49 C/) },
    ]);
    expect(items).toHaveLength(1);
  });

  it('a part that is baked where it stands is only sprayed in booths that may bake so hot', () => {
    const places = [place({ bakes: false }), place({ bakeLimitCelsius: 55 }), place({ airFlowM3PerHour: 0 }), place()];
    const first = stage([spray()]);
    const { problem } = build(facts({ places }, [job([first, stage([boothBake()])])]));
    expect(problem.jobs[0]?.stages[0]?.modes[0]?.places).toEqual([places[3]?.id]);
  });

  it('no heat where the purge is not known', () => {
    const places = [place({ volumeM3: null })];
    const { unplaced } = planned(facts({ places }, [job([stage([spray()]), stage([boothBake()])])]));
    expect(unplaced[0]?.reason).toMatch(/known purge/);
  });

  // International Fire Code 2018, ch. 24: 96 m3 at 5,000 m3/h: 4.608 min.
  it('the purge lasts as long as the booth needs, in whole minutes', () => {
    const slow = facts({ places: [place({ airFlowM3PerHour: 5000 }), place({ kind: 'rack' })] }, [
      job([stage([spray()]), bake]),
    ]);
    const { problem } = build(slow);
    const mode = problem.jobs[0]?.stages[1]?.modes[0];
    expect(mode?.phases[0]).toMatchObject({ kind: 'purge', minutes: 5 });
    expect(problem.purge).toBe(5);
    const fast = build(facts(shop, [job([stage([spray()]), bake])]));
    expect(fast.problem.purge).toBe(3);
  });

  it('a bake without a purge phase waits for it', () => {
    const bare = stage([
      boothBake({ gap: { min: 0, max: 60, settle: 0 }, phases: [{ kind: 'bake', minutes: 30, attendance: 'onsite' }] }),
    ]);
    expect(build(facts(shop, [job([stage([spray()]), bare])])).problem.jobs[0]?.stages[1]?.modes[0]?.gap.min).toBe(3);
  });
});

describe('people', () => {
  // 40 CFR 63.11173: refresher at least every five years. Trained 2021-06-03: good through 2026-06-03.
  const ends = person({ sprayTrainedOn: '2021-06-03' });
  const sprayed = stage([spray()]);

  it('spray until the last day of their training, and do other work after it', () => {
    const early = planned(facts({ people: [ends] }, [job([sprayed], { releaseAt: at(3, '08:00') })]));
    expect(early.items[0]).toMatchObject({ personId: ends.id, from: at(3, '08:00') });
    const late = planned(facts({ people: [ends] }, [job([sprayed], { releaseAt: at(4, '08:00') })]));
    expect(late.items).toEqual([]);
    const sand = planned(facts({ people: [ends] }, [job([stage([way()])], { releaseAt: at(4, '08:00') })]));
    expect(sand.items[0]).toMatchObject({ personId: ends.id, from: at(4, '08:00') });
  });

  it('whose training has lapsed are named as the reason; the shop may turn that off', () => {
    const lapsed = person({ sprayTrainedOn: '2021-01-10' });
    expect(planned(facts({ people: [lapsed] }, [job([sprayed])])).unplaced[0]?.reason).toMatch(/spray training/);
    const warned = planned(facts({ people: [lapsed], shop: { trainingBlocks: false } }, [job([sprayed])]));
    expect(warned.items).toHaveLength(1);
  });

  it('need the skill', () => {
    const helper = person({ skills: ['prep'] });
    expect(planned(facts({ people: [helper] }, [job([sprayed])])).unplaced[0]?.reason).toMatch(/the skill paint/);
  });
});

describe('what stands', () => {
  const booth = place();
  const who = person();
  const shop = { places: [booth], people: [who] };

  it('done stages stand as they happened, running ones as long as planned and at least until now', () => {
    const done = stage([spray()], { state: 'done', startedAt: at(1, '07:10'), finishedAt: at(1, '07:33') });
    const running = stage([way()], { state: 'running', startedAt: new Date(at(1, '07:40').getTime() + 20_000) });
    const one = job([done, running, stage([way()])]);
    const mine = { personId: who.id };
    const bookings = [
      posted(booked(done, at(1, '07:00'), booth.id, mine), { state: 'done' }),
      posted(booked(running, at(1, '07:30'), booth.id, mine), { state: 'running' }),
    ];
    const minute = (time: string) => (at(1, time).getTime() - at(1, '00:00').getTime()) / 60_000;
    const soon = build(facts(shop, [one], { bookings, now: at(1, '07:50') })).problem;
    expect(soon.fixed.map(({ start, end }) => [start, end])).toEqual([
      [minute('07:10'), minute('07:33')],
      [minute('07:40'), minute('08:10')],
    ]);
    const over = planned(facts(shop, [one], { bookings, now: at(1, '08:45') }));
    expect(over.built.problem.fixed[1]?.end).toBe(minute('08:45'));
    expect(over.items).toHaveLength(1);
  });

  it('a posted booking about to start stays, unless something has happened since', () => {
    const soon = stage([way()]);
    const one = job([soon]);
    const bookings = [posted(booked(soon, at(1, '07:30'), booth.id, { personId: who.id }))];
    expect(planned(facts(shop, [one], { bookings })).items[0]?.from).toEqual(at(1, '07:30'));
    const broken = { id: 'x', kind: 'breakdown' as const, label: 'Fan', placeId: booth.id, lampId: null, rule: null };
    const closures = [{ ...broken, startsLocal: '2026-06-01T07:00', minutes: 120 }];
    expect(planned(facts({ ...shop, closures }, [one], { bookings })).items[0]?.from).toEqual(at(1, '09:00'));
  });

  it('a pin stays; without it the same stage is planned anew', () => {
    const one = stage([way()]);
    const spot = booked(one, at(2, '09:00'), booth.id, { personId: who.id });
    const pinned = facts(shop, [job([one])], { items: [item({ ...spot, pinned: true })] });
    expect(planned(pinned).items[0]).toMatchObject({ from: at(2, '09:00'), pinned: true });
    expect(planned(facts(shop, [job([one])], { items: [item(spot)] })).items[0]?.from).toEqual(at(1, '07:05'));
  });

  it('for the rest, everything that is booked stays', () => {
    const one = stage([way()]);
    const spot = item(booked(one, at(2, '09:00'), booth.id, { personId: who.id }));
    const other = stage([way()]);
    const { items } = planned(facts(shop, [job([one]), job([other])], { items: [spot] }), 'rest');
    expect(items.find(({ stageId }) => stageId === one.id)).toMatchObject({ from: spot.from, loadId: spot.loadId });
    expect(items.find(({ stageId }) => stageId === other.id)?.from).toEqual(at(1, '07:05'));
  });

  it('what nobody had booked happened elsewhere, and its window still counts', () => {
    const done = stage([spray()], { state: 'done', startedAt: at(1, '06:00'), finishedAt: at(1, '06:30') });
    const next = stage([way({ gap: { min: 90, max: null, settle: 0 } })]);
    const { items } = planned(facts(shop, [job([done, next])]));
    expect(items[0]?.from).toEqual(at(1, '08:00'));
  });

  it('two that shared a booth run keep sharing it when one is pinned', () => {
    const pair = [stage([way({ load: 'a' })]), stage([way({ load: 'a' })])] as const;
    const load = {
      loadId: '01890000-0000-7000-8000-000000000001',
      personId: who.id,
      phases: [[0, 60]] as [number, number][],
    };
    const items = pair.map((one, i) =>
      item(booked(one, at(2, '09:00'), booth.id, { ...load, pinned: i === 0, to: at(2, '10:00') })),
    );
    const { built } = planned(facts(shop, [job([pair[0]]), job([pair[1]])], { items }));
    expect(built.problem.fixed.map(({ load: key }) => key)).toEqual([load.loadId, load.loadId]);
  });
});

it('rounds so that no minute is given away: what is free shrinks, what is closed grows', () => {
  const shop = { places: [place()] };
  const one = job([stage([way()])], {
    releaseAt: new Date('2026-06-01T06:00:10Z'),
    promiseAt: new Date('2026-06-01T09:00:50Z'),
  });
  const of = facts(shop, [one], { now: new Date('2026-06-01T05:00:01Z') });
  const away = {
    id: 'a',
    personId: of.resources.people[0]?.id ?? '',
    from: new Date('2026-06-01T10:00:30Z'),
    to: null,
    reason: '',
  };
  of.resources.absences.push(away);
  const { problem } = build(of);
  expect(problem.origin).toBe('2026-05-31T22:00:00.000Z');
  expect(problem.now).toBe(7 * 60 + 5 + 1);
  expect(problem.jobs[0]).toMatchObject({ release: 8 * 60 + 1, due: 11 * 60 });
  expect(problem.people[0]?.working.at(-1)).toEqual([11 * 60 + 30, 12 * 60]);
  expect(frameOf(of).shop.horizon).toBeGreaterThanOrEqual(21 * 1440);
});

it('lamps are offered with their circuit, and a shop without enough of them says so', () => {
  const circuit = { id: 'c', name: 'North', kilowatts: 10 };
  const places = [place(), place({ kind: 'prep' })];
  const cure = stage([lampCure({ lampCount: 2 })]);
  const one = [job([stage([spray()]), cure])];
  const lamps = [lamp({ circuitId: 'c', kilowatts: 5 }), lamp({ circuitId: 'c', kilowatts: 5 })];
  expect(planned(facts({ places, lamps, circuits: [circuit] }, one)).items[1]?.lampIds).toHaveLength(2);
  const few = planned(facts({ places, lamps: lamps.slice(1), circuits: [circuit] }, one));
  expect(few.unplaced[0]?.reason).toMatch(/needs 2 lamps, the shop has 1/);
});
