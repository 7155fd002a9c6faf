import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { Reason } from '#contracts/reasons.ts';
import { formatsFor } from './formats.ts';
import { reasonText, ruleText } from './reason-texts.ts';

const formats = formatsFor({ zone: 'Europe/Berlin', clock: '24', unit: 'C' }, () => Date.parse('2026-03-12T08:00:00Z'));
const reason = (more: Partial<Reason>): Reason => ({
  code: 'place-taken',
  rule: 4,
  stageId: null,
  ids: ['a', 'b'],
  names: ['Booth 1', 'Tailgate: clear'],
  at: ['2026-03-12T09:00:00Z', '2026-03-12T09:40:00Z', '2026-03-12T10:00:00Z', '2026-03-13T10:30:00Z'],
  minutes: [20, 45, 60],
  ...more,
});
const say = (more: Partial<Reason>) => reasonText(reason(more), formats);

/** Codes as they are written in a file of the server: in the planner's union, and where services refuse. */
const codesIn = (path: string, pattern: RegExp) =>
  [...readFileSync(path, 'utf8').matchAll(pattern)].map((match) => match[1] ?? '');

describe('sentences for reasons', () => {
  it('name things, times and lengths for the reader', () => {
    expect(say({})).toBe('Booth 1 is taken by Tailgate: clear until 10:40.');
    expect(say({ code: 'too-late', rule: 2, names: ['Door: sealer'], minutes: [4325, 4320] })).toBe(
      'It would start 3 days after Door: sealer; the window closes after 3 days.',
    );
    expect(say({ code: 'too-soon', rule: 2, names: ['Door: sealer'], minutes: [-15, 20] })).toBe(
      'It would start 15 min before Door: sealer is over.',
    );
    expect(say({ code: 'off-shift', rule: 8, names: ['Ada'] })).toBe('Ada is not at work for all of 10:00 to 10:40.');
    expect(say({ code: 'heat-limit', rule: 1, names: ['Booth bake'], minutes: [60, 48.889] })).toBe(
      'Booth bake bakes at 60 °C, above the heat limit of 48 °C of this vehicle or part.',
    );
  });
  it('say the day where it is not today', () => {
    expect(say({ code: 'spray-meets-lamp', rule: 12 })).toContain('tomorrow 11:30');
  });

  const planner = codesIn('server/planner/types.ts', /^ {2}\| '([a-z-]+)'/gm);
  const ways = codesIn('server/planning/problem/refusals.ts', /\{ code: '([a-z-]+)'/g);
  it('read the codes that the server knows', () => {
    expect(planner).toEqual(expect.arrayContaining(['too-soon', 'spray-meets-lamp', 'fixed-changed']));
    expect(ways).toContain('heat-limit');
  });
  it.each([...new Set([...planner, ...ways])])('there is one for %s', (code) => {
    const sentence = say({ code });
    expect(sentence).toMatch(/^[A-Z0-9].*\.$/);
    expect(sentence).not.toContain('Not allowed');
    expect(sentence).not.toMatch(/undefined|NaN|another one/);
  });

  it('show an unknown code with its rule, and say nothing is missing where figures are', () => {
    expect(say({ code: 'brand-new', rule: 7 })).toBe(
      'Not allowed (rule 7, closed times; brand-new): Booth 1, Tailgate: clear.',
    );
    expect(say({ code: 'place-taken', names: [], at: [] })).toBe(
      'Another one is taken by another one until another time.',
    );
    expect(ruleText(null)).toBe('');
  });
});
