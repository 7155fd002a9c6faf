import { describe, expect, it } from 'vitest';
import { judge } from '#server/planning/judge.ts';
import { layPhases } from '#server/planning/lay-phases.ts';
import { moveInDraft } from '#server/planning/move.ts';
import { occupancyRows } from '#server/planning/occupancy-rows.ts';
import { frameOf } from '#server/planning/problem/build-problem.ts';
import type { Facts } from '#server/planning/facts.ts';
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

const mode = (phases: object[], split = false) => ({ phases, split }) as never;
const hands = (minutes: number, more = {}) => ({ kind: 'work', minutes, attendance: 'hands', ...more });

describe('laying phases', () => {
  const hours = {
    working: [
      [0, 240],
      [270, 600],
    ] as [number, number][],
    open: [[0, 600]] as [number, number][],
  };
  it('one after the other', () =>
    expect(layPhases([mode([hands(20), { kind: 'flash', minutes: 10, attendance: 'none' }])], 5, hours)).toEqual([
      [5, 25],
      [25, 35],
    ]));
  it('work that may pause goes on after the break', () =>
    expect(layPhases([mode([hands(60)], true)], 200, hours)).toEqual([[200, 290]]));
  it('work that may not pause is left to the rules', () =>
    expect(layPhases([mode([hands(60)])], 200, hours)).toEqual([[200, 260]]));
  it('a phase that may wait lets the next begin when its people are back', () =>
    expect(
      layPhases([mode([{ kind: 'flash', minutes: 10, attendance: 'none', wait: 45 }, hands(20)])], 225, hours),
    ).toEqual([
      [225, 235],
      [270, 290],
    ]));
  it('spraying adds up over a load, flashing does not', () => {
    const one = mode([
      { kind: 'spray', minutes: 20, attendance: 'hands' },
      { kind: 'flash', minutes: 10, attendance: 'none' },
    ]);
    expect(layPhases([one, one, one], 0, hours)).toEqual([
      [0, 60],
      [60, 70],
    ]);
  });
});

const booth = place();
const prep = place({ kind: 'prep', name: 'Prep' });
const rack = place({ kind: 'rack', name: 'Rack' });
const painter = person();
const second = person({ name: 'Second' });
const circuit = { id: 'north', name: 'North', kilowatts: 10 };
const lamps = [lamp({ circuitId: 'north' }), lamp({ circuitId: 'north' })];
const shop = { places: [booth, prep, rack], people: [painter, second], lamps, circuits: [circuit] };
const mine = { personId: painter.id };

const taken = (of: Facts): string[][] => {
  const judged = judge(of, frameOf(of), { loose: new Set(), now: of.now });
  const names = new Map(
    [...of.resources.places, ...of.resources.people, ...of.resources.lamps].map(({ id, name }) => [id, name]),
  );
  const hour = (instant: Date): string => new Date(instant.getTime() + 7_200_000).toISOString().slice(11, 16);
  const loads = new Map([...of.bookings.values()].map((b) => [b.stageId, b.loadId]));
  return occupancyRows(judged, of.now, (id) => loads.get(id) ?? id).map((row) => [
    names.get(row.resourceId) ?? '',
    hour(row.from),
    hour(row.to),
  ]);
};

describe('what a plan takes', () => {
  it('a booth until the bake on the spot begins, a place while the part settles, a rack never', () => {
    const [clear, bake, dry] = [stage([spray()]), stage([boothBake()]), stage([airDry()])];
    const bookings = [
      posted(booked(clear, at(1, '08:00'), booth.id, mine)),
      posted(booked(bake, at(1, '08:45'), booth.id)),
      posted(booked(dry, at(1, '10:00'), rack.id)),
    ];
    expect(taken(facts(shop, [job([clear, bake, dry])], { bookings })).sort()).toEqual([
      ['Booth', '08:00', '08:45'],
      ['Booth', '08:45', '09:38'],
      ['Painter', '08:00', '08:20'],
    ]);
  });

  it('hands only while they work, lamps from the first to the last lit minute', () => {
    const sand = stage([
      way({ placeKinds: ['prep'], split: true, phases: [{ kind: 'work', minutes: 60, attendance: 'hands' }] }),
    ]);
    const cure = stage([lampCure()]);
    const bookings = [
      posted(booked(sand, at(1, '10:30'), prep.id, { ...mine, phases: [[0, 90]], to: at(1, '12:00') })),
      posted(booked(cure, at(1, '12:10'), prep.id, { lampIds: [lamps[0]?.id ?? ''] })),
    ];
    expect(taken(facts(shop, [job([sand, cure])], { bookings })).sort()).toEqual(
      [
        ['Lamp', '12:10', '12:30'],
        ['Painter', '10:30', '11:00'],
        ['Painter', '11:30', '12:00'],
        ['Prep', '10:30', '12:00'],
        ['Prep', '12:10', '12:30'],
      ].sort(),
    );
  });

  it('what overran makes way for what is written after it: rows never clash', () => {
    const running = stage([way()], { state: 'running', startedAt: at(1, '08:00') });
    const next = stage([way()]);
    const bookings = [
      posted(booked(running, at(1, '08:00'), booth.id, mine), { state: 'running' }),
      posted(booked(next, at(1, '08:40'), booth.id, { personId: second.id })),
    ];
    const rows = taken(facts(shop, [job([running]), job([next])], { bookings, now: at(1, '08:50') }));
    expect(rows).toEqual([
      ['Booth', '08:50', '09:10'],
      ['Second', '08:50', '09:10'],
    ]);
  });
});

describe('a move', () => {
  const cures = [stage([lampCure()]), stage([lampCure()])] as const;
  const prep2 = place({ kind: 'prep', name: 'Prep 2' });
  const [one, two] = lamps.map(({ id }) => id);
  const of = (kilowatts: number): Facts =>
    facts(
      { ...shop, places: [prep, prep2], circuits: [{ ...circuit, kilowatts }] },
      [job([cures[0]]), job([cures[1]])],
      {
        items: [
          item(booked(cures[0], at(1, '09:00'), prep.id, { lampIds: [one ?? ''] })),
          item(booked(cures[1], at(1, '13:00'), prep2.id, { lampIds: [one ?? ''] })),
        ],
      },
    );
  const move = (kilowatts: number) =>
    moveInDraft(
      of(kilowatts),
      cures[1],
      { stageId: cures[1].id, start: at(1, '09:10'), placeId: prep2.id },
      () => 'load',
    );

  it('takes another lamp where its own is busy', () => expect(move(12).changed).toMatchObject([{ lampIds: [two] }]));
  it('is refused where the circuit cannot carry both', () =>
    expect(move(10).reasons.map(({ code }) => code)).toContain('circuit-full'));

  it('says nothing of what was broken before it', () => {
    const [left, right] = [stage([way()]), stage([way()])];
    const items = [left, right].map((s) => item(booked(s, at(1, '09:00'), booth.id, mine)));
    const third = stage([way()]);
    const broken = facts(shop, [job([left]), job([right]), job([third])], {
      items: [...items, item(booked(third, at(1, '13:00'), booth.id, mine))],
    });
    const calm = { stageId: third.id, start: at(1, '14:00'), placeId: booth.id };
    expect(moveInDraft(broken, third, calm, () => 'load').reasons).toEqual([]);
    expect(moveInDraft(broken, third, { ...calm, start: at(1, '09:15') }, () => 'load').reasons).not.toEqual([]);
  });
});
