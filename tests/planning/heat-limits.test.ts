import { describe, expect, it } from 'vitest';
import type { Substrate } from '#contracts/common.ts';
import { celsiusFromFahrenheit } from '#chemistry/units/temperature.ts';
import type { Facts } from '#server/planning/facts.ts';
import { problemToPlan } from '#server/planning/problem/problem-to-plan.ts';
import { airDry, boothBake, facts, job, lamp, lampCure, place, spray, stage } from './factories.ts';

const booth = place({ bakeLimitCelsius: 93 });
const shop = {
  places: [booth, place({ kind: 'rack' }), place({ kind: 'prep', bakes: false })],
  circuits: [{ id: 'c', name: 'Circuit', kilowatts: 12 }],
  lamps: [lamp({ circuitId: 'c' })],
};
const offered = (of: Facts, stageId: string) => {
  const { offers } = problemToPlan(of, 'all', 0);
  const offer = offers.get(stageId);
  return { ways: offer?.modes.map(({ id }) => id), refused: Object.fromEntries(offer?.refused ?? []) };
};
const bakedAt = (celsius: number, substrate: Substrate, part = {}) => {
  const bake = stage([boothBake({ bakeCelsius: celsius }), airDry()]);
  const parts = [{ name: 'Part', substrate, units: 1 }];
  return offered(facts(shop, [job([stage([spray()]), bake], { parts, ...part })]), bake.id);
};

describe('what the planner is offered: heat that the part stands', () => {
  // A vehicle maker's specification for PP and TPO covers: at most 80 C. ABS softens at 68 C (published), so it is kept
  // below. Steel, aluminium and composite 80 C: from memory.
  it.each<[Substrate, number, boolean]>([
    ['pp-tpo', 80, true],
    ['pp-tpo', 80.1, false],
    ['abs', 60, true],
    ['abs', 68, false],
    ['steel', 80, true],
    ['steel', 81, false],
    ['aluminium', 80, true],
    ['aluminium', 81, false],
    ['composite', 80, true],
    ['composite', 81, false],
  ])('%s at %f C: %s', (substrate, celsius, offers) => {
    expect(bakedAt(celsius, substrate).ways).toEqual(offers ? ['booth-bake', 'air'] : ['air']);
  });

  it('a lamp as well as a booth, and the weakest of several parts', () => {
    const cure = stage([lampCure({ bakeCelsius: 70 }), airDry()]);
    const parts = (['steel', 'abs'] as const).map((substrate) => ({ name: 'Part', substrate, units: 1 }));
    const of = facts(shop, [job([stage([spray()]), cure], { parts })]);
    expect(offered(of, cure.id)).toMatchObject({
      ways: ['air'],
      refused: { lamp: { code: 'heat-limit', figures: [70, 60] } },
    });
  });

  it('heat of an unknown temperature is offered to nobody', () => {
    const cure = stage([lampCure({ bakeCelsius: null }), airDry()]);
    const of = facts(shop, [job([stage([spray()]), cure])]);
    expect(offered(of, cure.id)).toMatchObject({ ways: ['air'], refused: { lamp: { code: 'heat-unknown' } } });
  });
});

describe('a battery on board', () => {
  // Several makers print 120 F, which is 48.889 C and never rounded up to 49.
  it('the recorded 120 F is kept as it is', () => {
    const limit = celsiusFromFahrenheit(120);
    expect(limit).toBeCloseTo(48.889, 3);
    const recorded = { electric: true, heatLimitCelsius: limit };
    expect(bakedAt(limit, 'steel', recorded).ways).toContain('booth-bake');
    expect(bakedAt(49, 'steel', recorded)).toMatchObject({
      ways: ['air'],
      refused: { 'booth-bake': { code: 'heat-limit' } },
    });
    // Nothing recorded: 49 C (common practice).
    expect(bakedAt(49, 'steel', { electric: true }).ways).toContain('booth-bake');
  });

  // Nothing recorded: 45 min, counted over all bakes of the job, by booth and by lamp.
  it.each([
    [15, ['lamp', 'air']],
    [16, ['air']],
  ])('30 min in the booth and %i min under a lamp', (minutes, ways) => {
    const primer = stage([
      lampCure({ bakeCelsius: 45, phases: [{ kind: 'bake', minutes, attendance: 'onsite', lamp: true }] }),
      airDry(),
    ]);
    const bake = stage([boothBake({ bakeCelsius: 45 }), airDry()]);
    const of = facts(shop, [job([stage([spray()]), primer, stage([spray()]), bake], { electric: true })]);
    expect(offered(of, primer.id).ways).toEqual(ways);
    expect(offered(of, bake.id).ways).toEqual(['booth-bake', 'air']);
  });
});

// Booth air: never above 93 C (200 F; International Fire Code 2018, ch. 24) where the booth has no limit of its own.
it('a booth without a limit of its own bakes at 93 C and not above', () => {
  const open = { ...shop, places: [place({ bakeLimitCelsius: null }), place({ kind: 'rack' })] };
  const at = (celsius: number) => {
    const bake = stage([boothBake({ bakeCelsius: celsius }), airDry()]);
    return offered(facts(open, [job([stage([spray()]), bake], { parts: [] })]), bake.id).ways;
  };
  expect(at(93)).toEqual(['booth-bake', 'air']);
  expect(at(94)).toEqual(['air']);
});
