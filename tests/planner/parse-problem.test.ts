import { describe, expect, test } from 'vitest';
import { parseProblem, type Problem } from '#planner/index.ts';
import { assign, mode, phase, smallShop, stage } from './small-shop.ts';

const shop = (): Problem => smallShop([[stage('a', mode({ phases: [phase('cool', 20, 'none')] }))]]);

/** A problem as JSON with one value changed, given by its path. */
function changed(path: string, value: unknown): unknown {
  const json = JSON.parse(JSON.stringify(shop())) as Record<string, unknown>;
  const keys = path.split(/[.[\]]+/).filter(Boolean);
  let at: Record<string, unknown> = json;
  for (const key of keys.slice(0, -1)) at = at[key] as Record<string, unknown>;
  at[keys[keys.length - 1]!] = value;
  return json;
}

const faults = (json: unknown): string[] => {
  const read = parseProblem(json);
  return 'faults' in read ? read.faults : [];
};

const way = 'jobs[0].stages[0].modes[0]';
const other = JSON.parse(JSON.stringify(shop().jobs[0])) as object;

describe('one line for each fault, beginning with its path', () => {
  test.each<[string, unknown, string]>([
    ['version', 2, 'version must be 1, is 2'],
    ['version', undefined, 'version must be 1, is missing'],
    ['origin', 'yesterday', 'origin must be an ISO 8601 instant, is "yesterday"'],
    ['horizon', undefined, 'horizon is missing'],
    ['now', -5, 'now must not be negative, is -5'],
    ['now', 2000, 'horizon must not lie before now (2000), is 1000'],
    ['purge', 2.5, 'purge must be whole minutes, is 2.5'],
    ['purge', '3', 'purge must be whole minutes, is "3"'],
    ['open', [[10, 5]], 'open[0] must end after it starts, is [10, 5]'],
    ['open', [[10]], 'open[0] must be [from, to], is [10]'],
    ['places', null, 'places must be a list, is null'],
    ['places[1].id', 'booth', 'places[1] repeats the id "booth"'],
    ['places[0].kind', 'oven', 'places[0].kind must be one of booth, prep, rack, is "oven"'],
    ['lamps[0].circuit', 'mains', 'lamps[0].circuit names an unknown circuit "mains"'],
    [
      'people[0].working',
      [
        [0, 50],
        [40, 90],
      ],
      'people[0].working[1] overlaps the interval before it',
    ],
    ['jobs[0].weight', -1, 'jobs[0].weight must be a number, zero or more, is -1'],
    ['jobs[0].stages', [], 'jobs[0].stages must not be empty'],
    ['jobs[1]', other, 'jobs[1] repeats the id "job-1"'],
    [`${way}.places`, ['booth-9'], `${way}.places[0] names an unknown place "booth-9"`],
    [`${way}.people`, ['eve'], `${way}.people[0] names an unknown person "eve"`],
    [`${way}.gap`, { min: 30, max: 20, settle: 0 }, `${way}.gap can never be met: max 20 is less than min 30`],
    [`${way}.gap`, { min: 5, max: null, settle: 6 }, `${way}.gap.settle must not be more than min 5, is 6`],
    [`${way}.phases[0].minutes`, -20, `${way}.phases[0].minutes must not be negative, is -20`],
    [`${way}.phases[0].lamp`, true, `${way}.phases need a lamp, but lampCount is 0`],
    [
      `${way}.phases[0].attendance`,
      'ghosts',
      `${way}.phases[0].attendance must be one of hands, onsite, none, is "ghosts"`,
    ],
    ['fixed', [assign('z', 0, [20])], 'fixed[0].stage names an unknown stage "z"'],
    ['fixed', [assign('a', 0, [20], { mode: 'no' })], 'fixed[0].mode names an unknown mode "no"'],
    ['fixed', [assign('a', 0, [20, 5])], 'fixed[0].phases must be 1 as in its mode, are 2'],
    ['fixed', [assign('a', 0, [20]), assign('a', 0, [20])], 'fixed[1] repeats the id "a"'],
    ['objective.flow', 'much', 'objective.flow must be a number, zero or more, is "much"'],
  ])('%s = %j', (path, value, line) => {
    expect(faults(changed(path, value))).toContain(line);
  });

  test('all of them at once', () => {
    const json = { ...shop(), horizon: -1, purge: null, lamps: 'none' };
    expect(faults(json).length).toBeGreaterThanOrEqual(3);
  });

  test.each([null, 5, 'text', [], undefined])('not an object: %j', (json) => {
    expect(faults(json)).toEqual(['problem must be an object']);
  });
});

test('what may be absent gets its default', () => {
  const read = parseProblem({
    version: 1,
    horizon: 100,
    places: [{ id: 'booth', kind: 'booth', units: 1 }],
    jobs: [
      {
        id: 'j',
        stages: [
          {
            id: 's',
            modes: [{ id: 'm', places: ['booth'], phases: [{ kind: 'cool', minutes: 5, attendance: 'none' }] }],
          },
        ],
      },
    ],
  });
  expect(read).toMatchObject({
    problem: {
      now: 0,
      open: [],
      lamps: [],
      circuits: [],
      cleanups: [],
      fixed: [],
      baseline: [],
      objective: { tardiness: 0, unplaced: 0 },
      jobs: [
        {
          release: 0,
          due: null,
          weight: 1,
          stages: [{ modes: [{ units: 1, gap: { min: 0, max: null, settle: 0 } }] }],
        },
      ],
    },
  });
});
