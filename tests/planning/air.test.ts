import psychrolib from 'psychrolib';
import { v7 as uuid } from 'uuid';
import { describe, expect, it } from 'vitest';
import { defaultAirSettings, type AirHours, type AirSource } from '#contracts/air.ts';
import { emptySheet, type CoatingSheet } from '#contracts/coatings.ts';
import { checkPlan, plan } from '#planner/index.ts';
import type { AirOfShop, ZoneAirFacts } from '#server/db/air.ts';
import { openHours } from '#server/planning/air/air-book.ts';
import { gateOf } from '#server/planning/air/gate.ts';
import { minutesInAir } from '#server/planning/air/minutes-in-air.ts';
import type { Facts } from '#server/planning/facts.ts';
import { judgeForPosting } from '#server/planning/judge-for-posting.ts';
import { moveInDraft } from '#server/planning/move.ts';
import { problemToPlan } from '#server/planning/problem/problem-to-plan.ts';
import { readPlan, readUnplaced } from '#server/planning/read-plan.ts';
import { airDry, at, booked, facts, item, job, MONDAY, person, place, posted, spray, stage, way } from './factories.ts';

const sheet = (part: Partial<CoatingSheet> = {}): CoatingSheet => ({ ...emptySheet, ...part });
const zone = (part: Partial<ZoneAirFacts> = {}): ZoneAirFacts => ({
  id: uuid(),
  name: 'Bay',
  places: [],
  source: 'default',
  schedule: [],
  version: 0,
  latest: null,
  ...part,
});
/** A zone that is this cold all day. */
const zoneAt = (celsius: number, humidity = 50, part: Partial<ZoneAirFacts> = {}): ZoneAirFacts =>
  zone({ source: 'schedule', schedule: [{ fromHour: 0, toHour: 24, celsius, humidity }], ...part });
const airOf = (...zones: ZoneAirFacts[]): AirOfShop => ({ settings: defaultAirSettings, zones });

describe('minutes in the air that is expected', () => {
  // exp(Ea/R (1/T1 - 1/T2)) with Ea 50 kJ/mol (from memory) and R 8.314462618: 20 to 30 C is 1.9674 (worked out by hand from
  // the Arrhenius formula), so 10 min set for 30 C are 19.674 at 20 C, in whole minutes 20.
  it('a flash from one point follows 50 kJ/mol in the cold', () => {
    expect(
      minutesInAir(10, 'flash', sheet({ airDry: { minutes: 60, celsius: 30 } }), { celsius: 20, humidity: 50 }),
    ).toBe(20);
    // 20 to 10 C: exp(50000 / 8.314462618 x (1/283.15 - 1/293.15)) = exp(0.72451) = 2.0637; 10 min become 20.64.
    expect(minutesInAir(10, 'flash', null, { celsius: 10, humidity: 50 })).toBe(21);
    expect(minutesInAir(10, 'flash', null, { celsius: 20, humidity: 50 })).toBe(10);
  });

  it('and never gets shorter than it is set: minutes are a minimum', () => {
    for (const celsius of [21, 30, 45]) expect(minutesInAir(10, 'flash', null, { celsius, humidity: 50 })).toBe(10);
  });

  // "2 days at 60 C or 7 days at 22 C" (a coatings engineer's article): 26.95 kJ/mol between the two.
  it('air drying follows the sheet’s own two points, down to the printed bake', () => {
    const own = sheet({
      airDry: { minutes: 10_080, celsius: 22 },
      bake: { minutes: 2880, celsius: 60, measuredAt: 'metal' },
    });
    const dry = (celsius: number) => minutesInAir(10_080, 'air', own, { celsius, humidity: 50 });
    expect(dry(22)).toBe(10_080);
    expect(dry(60)).toBe(2880);
    expect(dry(41)).toBeGreaterThan(2880);
    const ratio = Math.exp((26_950 / 8.314462618) * (1 / 283.15 - 1 / 295.15));
    // 295.15 K to 283.15 K: exp(3241.3 x 0.00014359) = 1.5927, that is 16,055 min at 10 C.
    expect(ratio).toBeCloseTo(1.5927, 3);
    expect(Math.abs(dry(10) / (10_080 * ratio) - 1)).toBeLessThan(0.001);
    // With one point only it is never shorter than it is set.
    expect(
      minutesInAir(180, 'air', sheet({ airDry: { minutes: 180, celsius: 20 } }), { celsius: 30, humidity: 50 }),
    ).toBe(180);
  });

  it('the shop’s own factors: cold air where it asks for more, damp air on top', () => {
    const own = sheet({ coldAir: { belowCelsius: 18, factor: 3 }, dampAir: { abovePercent: 70, factor: 1.25 } });
    expect(minutesInAir(10, 'flash', own, { celsius: 17, humidity: 50 })).toBe(30);
    // 2.0637 at 10 C is less than 3; at 0 C exp(50000/R (1/273.15 - 1/293.15)) = 4.49 is more.
    expect(minutesInAir(10, 'flash', own, { celsius: 10, humidity: 50 })).toBe(30);
    expect(minutesInAir(10, 'flash', own, { celsius: 0, humidity: 50 })).toBe(45);
    expect(minutesInAir(10, 'flash', own, { celsius: 20, humidity: 71 })).toBe(13);
    expect(minutesInAir(10, 'flash', own, { celsius: 17, humidity: 80 })).toBe(38);
  });

  it('a time of nothing stays nothing', () => {
    expect(minutesInAir(0, 'flash', null, { celsius: -5, humidity: 90 })).toBe(0);
  });
});

const problem = (of: Facts) => problemToPlan(of, 'all', 0).problem;
const modesOf = (of: Facts, stageId: string) =>
  problem(of)
    .jobs.flatMap(({ stages }) => stages)
    .find(({ id }) => id === stageId)?.modes ?? [];
const flashes = (of: Facts, stageId: string) =>
  modesOf(of, stageId).map((mode) => mode.phases.filter(({ kind }) => kind === 'flash').map(({ minutes }) => minutes));

describe('a problem', () => {
  const who = person();
  it('has the flashes of the zone in which a stage is done', () => {
    const cold = zoneAt(10);
    const coat = stage([spray()]);
    expect(
      flashes(facts({ places: [place({ zoneId: cold.id })] }, [job([coat])], { air: airOf(cold) }), coat.id),
    ).toEqual([[21]]);
    expect(flashes(facts({ places: [place()] }, [job([coat])], { air: airOf(cold) }), coat.id)).toEqual([[10]]);
  });

  it('takes one mode for each length where places lie in different air, and the plan names the way all the same', () => {
    const [cold, warm] = [zoneAt(10), zoneAt(20)];
    const places = [place({ zoneId: cold.id, name: 'Cold' }), place({ zoneId: warm.id }), place({ zoneId: warm.id })];
    const coats = Array.from({ length: 6 }, () => stage([spray()]));
    const jobs = coats.map((one, i) => job([one], { number: i, title: `Job ${i}` }));
    const shop = facts({ places, people: [who, person(), person()] }, jobs, { air: airOf(cold, warm) });
    const modes = modesOf(shop, coats[0]?.id ?? '');
    expect(modes.map(({ id, places: where }) => [id, where])).toEqual([
      ['spray', [places[0]?.id]],
      ['spray@2', [places[1]?.id, places[2]?.id]],
    ]);
    const built = problemToPlan(shop, 'all', 0);
    const made = plan(built.problem, { seed: 1, evaluations: 40 });
    expect(checkPlan(built.problem, made).violations).toEqual([]);
    const items = readPlan(shop, built, made, uuid);
    expect(items).toHaveLength(6);
    for (const { way: id, placeId, phases } of items) {
      expect(id).toBe('spray');
      expect((phases[1]?.[1] ?? 0) - (phases[1]?.[0] ?? 0)).toBe(placeId === places[0]?.id ? 21 : 10);
    }
    const draft = {
      ...shop,
      ...facts({}, [], { items: items.map(item) }),
      resources: shop.resources,
      jobs,
      air: shop.air,
    };
    expect(judgeForPosting(draft).verdict.violations).toEqual([]);
  });

  it('gives a part that stays where it was the most that any of its places asks', () => {
    const [cold, warm] = [zoneAt(10), zoneAt(20)];
    const places = [place({ zoneId: cold.id }), place({ zoneId: warm.id })];
    const next = stage([spray({ id: 'on', placeKinds: [], stay: true })]);
    const shop = facts({ places }, [job([stage([spray()]), next])], { air: airOf(cold, warm) });
    expect(flashes(shop, next.id)).toEqual([[21]]);
  });

  it('stretches the flash between two stages where the part was sprayed, never the end of the window', () => {
    const cold = zoneAt(10);
    const places = [place({ zoneId: cold.id }), place({ kind: 'rack' })];
    const next = (gap: { min: number; max: number | null; settle: number }) => stage([airDry({ gap })]);
    const gapOf = (after: ReturnType<typeof next>) =>
      modesOf(facts({ places }, [job([stage([spray()]), after])], { air: airOf(cold) }), after.id)[0]?.gap;
    // 20 x 2.0637 = 41.27, 10 x 2.0637 = 20.64.
    expect(gapOf(next({ min: 20, max: 60, settle: 10 }))).toEqual({ min: 42, max: 60, settle: 21 });
    expect(gapOf(next({ min: 0, max: 60, settle: 0 }))).toEqual({ min: 0, max: 60, settle: 0 });
    const late = next({ min: 20, max: 40, settle: 0 });
    const shop = facts({ places }, [job([stage([spray()]), late])], { air: airOf(cold) });
    const built = problemToPlan(shop, 'all', 0);
    expect(built.offers.get(late.id)?.refused.get('air')).toEqual({ code: 'flash-past-window', figures: [42, 40] });
    const made = plan(built.problem, { seed: 1, evaluations: 5 });
    expect(readUnplaced(shop, built, made)[0]?.reason).toMatch(
      /flash 42 min in the air expected there, past the 40 min/,
    );
    // A cool-down before hands has nothing to do with the air.
    const cool = stage([way({ gap: { min: 30, max: null, settle: 0 } })]);
    const baked = stage([way({ phases: [{ kind: 'bake', minutes: 30, attendance: 'onsite' }] })]);
    expect(modesOf(facts({ places }, [job([baked, cool])], { air: airOf(cold) }), cool.id)[0]?.gap.min).toBe(30);
  });

  it('dries by the sheet of the coating that was put on before', () => {
    const id = uuid();
    const coatings = new Map([
      [id, sheet({ airDry: { minutes: 180, celsius: 20 }, coldAir: { belowCelsius: 19, factor: 4 } })],
    ]);
    const dry = stage([airDry({ phases: [{ kind: 'flash', minutes: 180, attendance: 'none' }] })]);
    const cold = zoneAt(18);
    const places = [place(), place({ kind: 'rack', zoneId: cold.id })];
    const shop = facts({ places }, [job([stage([spray()], { coatingId: id }), dry])], { air: airOf(cold), coatings });
    expect(flashes(shop, dry.id)).toEqual([[720]]);
  });

  const by = (source: AirSource, part: Partial<ZoneAirFacts>) => {
    const here = zone({ source, ...part });
    const coat = stage([spray()]);
    const dry = stage([airDry({ phases: [{ kind: 'flash', minutes: 100, attendance: 'none' }] })]);
    const places = [place({ zoneId: here.id }), place({ kind: 'rack', zoneId: here.id })];
    const shop = facts({ places }, [job([coat, dry])], { air: airOf(here) });
    return [flashes(shop, coat.id)[0]?.[0], flashes(shop, dry.id)[0]?.[0]];
  };
  it('of a schedule a flash takes the hours in which the shop is open, what dries through the night too', () => {
    const hours: AirHours[] = [
      { fromHour: 0, toHour: 6, celsius: 10, humidity: 50 },
      { fromHour: 6, toHour: 24, celsius: 20, humidity: 50 },
    ];
    // Open from 07:00 to 17:00. 100 x 2.0637 = 206.37.
    expect(by('schedule', { schedule: hours })).toEqual([10, 207]);
    expect(openHours([{ startsLocal: '2026-01-05T21:30', minutes: 300 }])).toEqual([0, 1, 2, 21, 22, 23]);
  });
  it('of the latest reading: as long as it is not older than twelve hours', () => {
    const latest = { id: uuid(), celsius: 10, humidity: 50, surfaceCelsius: null, source: 'key' as const };
    const before = (hours: number) => new Date(MONDAY.getTime() - hours * 3_600_000);
    expect(by('latest', { latest: { ...latest, at: before(11.9) } })).toEqual([21, 207]);
    expect(by('latest', { latest: { ...latest, at: before(12.1) } })).toEqual([10, 100]);
    expect(by('default', { latest: { ...latest, at: before(0) } })).toEqual([10, 100]);
  });
});

describe('what is booked', () => {
  const who = person();
  const bay = zoneAt(10);
  const booth = place({ zoneId: bay.id });
  const coat = stage([spray()]);
  const shop = { places: [booth], people: [who] };
  const was = booked(coat, at(1, '08:00'), booth.id, { personId: who.id });

  it('keeps the flash it was given when the air turns cold', () => {
    const draft = facts(shop, [job([coat])], { air: airOf(bay), bookings: [posted(was)], items: [item(was)] });
    expect(judgeForPosting(draft).verdict.violations).toEqual([]);
  });

  it('gets the flash of the new air when somebody moves it', () => {
    const draft = facts(shop, [job([coat])], { air: airOf(bay), bookings: [posted(was)], items: [item(was)] });
    const { changed, reasons } = moveInDraft(
      draft,
      coat,
      { stageId: coat.id, start: at(1, '09:00'), placeId: booth.id },
      uuid,
    );
    expect(reasons).toEqual([]);
    expect(changed[0]).toMatchObject({
      from: at(1, '09:00'),
      phases: [
        [0, 20],
        [20, 41],
      ],
    });
    const moved = facts(shop, [job([coat])], { air: airOf(bay), bookings: [posted(was)], items: changed.map(item) });
    expect(judgeForPosting(moved).verdict.violations).toEqual([]);
  });

  it('may not be shorter than any air allows', () => {
    const short = {
      ...was,
      phases: [
        [0, 20],
        [20, 25],
      ] as [number, number][],
      to: at(1, '08:25'),
    };
    const draft = facts(shop, [job([coat])], { air: airOf(bay), items: [item(short)] });
    expect(judgeForPosting(draft).verdict.violations.length).toBeGreaterThan(0);
  });
});

describe('the gate before spraying', () => {
  psychrolib.SetUnitSystem(psychrolib.SI);
  const gate = (celsius: number, humidity: number, surfaceCelsius: number | null, minutesAgo = 10) =>
    gateOf(
      { at: new Date(MONDAY.getTime() - minutesAgo * 60_000), celsius, humidity, surfaceCelsius },
      defaultAirSettings,
      MONDAY,
    );

  // Worked case of ISO 8502-4 practice: 16 C and 71 %, dew point 11, surface 13: refuse.
  it('16 C, 71 %, surface 13 C: shut', () => {
    const shut = gate(16, 71, 13);
    const reference = psychrolib.GetTDewPointFromRelHum(16, 0.71);
    expect(Math.round(reference)).toBe(11);
    expect(Math.abs((shut.dewPointCelsius ?? 0) - reference)).toBeLessThan(0.15);
    expect(shut).toMatchObject({ open: false, fresh: true, surfaceMeasured: true, neededCelsius: 3 });
  });
  // Worked case: dry bulb 21, wet bulb 17: dew point 15, surface 19: fine.
  it('21 C with a wet bulb of 17 C, surface 19 C: open', () => {
    const dew = psychrolib.GetTDewPointFromTWetBulb(21, 17, 101_325);
    expect(Math.round(dew)).toBe(15);
    expect(gate(21, 100 * psychrolib.GetRelHumFromTDewPoint(21, dew), 19).open).toBe(true);
  });
  it('without a measured surface it is held to be as warm as the air, and the gate says so', () => {
    // psychrolib: 20 C and 83 % have their dew point at 17.0, 82 % at 16.8 C.
    expect(gate(20, 84, null)).toMatchObject({ open: false, surfaceMeasured: false, surfaceCelsius: 20 });
    expect(gate(20, 80, null)).toMatchObject({ open: true });
  });
  it('a reading of two hours counts, an older one does not', () => {
    expect(gate(20, 50, null, 120).fresh).toBe(true);
    expect(gate(20, 50, null, 121).fresh).toBe(false);
  });
});
