import { describe, expect, test } from 'vitest';
import { tally, usedSpans, type Use } from '#server/services/booth-use.ts';

// Hand-made days; the arithmetic stands beside each figure. All times UTC.
const at = (time: string): Date => new Date(`2026-03-02T${time}:00Z`);
const span = (from: string, to: string) => ({ from: at(from), to: at(to) });
const phase = (kind: Use['phases'][number]['kind'], from: string, to: string, hands = false) => ({
  kind,
  hands,
  ...span(from, to),
});
const day = span('00:00', '23:59');
const open = [span('07:00', '18:00')];
const evening = at('20:00');

/** Booth, 09:00 to 11:00: set-up 10, spray 20, flash 20, spray 20, flash 10, bake 40. */
const painted: Use = {
  ...span('09:00', '11:00'),
  phases: [
    phase('setup', '09:00', '09:10', true),
    phase('spray', '09:10', '09:30', true),
    phase('flash', '09:30', '09:50'),
    phase('spray', '09:50', '10:10', true),
    phase('flash', '10:10', '10:20'),
    phase('bake', '10:20', '11:00'),
  ],
  startedAt: null,
  finishedAt: null,
  shifts: null,
  next: null,
};
const none = { setup: 0, work: 0, spray: 0, flash: 0, purge: 0, bake: 0, cool: 0, held: 0 };
const minutes = (use: ReturnType<typeof tally>) =>
  Object.fromEntries(Object.entries(use.hours).map(([kind, hours]) => [kind, Math.round(hours * 60 * 1e6) / 1e6]));

describe('hours of a place', () => {
  test('as planned, where nothing is recorded', () => {
    const use = tally(usedSpans(painted, evening), open, day);
    // spray 20 + 20, flash 20 + 10
    expect(minutes(use)).toEqual({ ...none, setup: 10, spray: 40, flash: 30, bake: 40 });
    expect(use.openHours).toBe(11); // 07 to 18
    expect(use.busyOpenHours).toBeCloseTo(2, 9); // 09 to 11, all of it inside
  });

  test('begun 15 minutes late and done 25 minutes later than that: the last phase takes up the rest', () => {
    const late = { ...painted, startedAt: at('09:15'), finishedAt: at('11:40') };
    // phases move by 15: bake 10:35 to 11:15, drawn out to 11:40 = 65
    expect(minutes(tally(usedSpans(late, evening), open, day))).toEqual({
      ...none,
      setup: 10,
      spray: 40,
      flash: 30,
      bake: 65,
    });
  });

  test('done early: what was not reached did not happen', () => {
    const early = { ...painted, startedAt: at('09:00'), finishedAt: at('10:00') };
    // setup 10, spray 20, flash 20, then 10 of the second coat
    expect(minutes(tally(usedSpans(early, evening), open, day))).toEqual({ ...none, setup: 10, spray: 30, flash: 20 });
  });

  test('still running past its planned end: until now', () => {
    const running = { ...painted, startedAt: at('09:00') };
    // bake 10:20 to 11:30
    expect(minutes(tally(usedSpans(running, at('11:30')), open, day))).toMatchObject({ bake: 70 });
    // and before that end, the plan speaks of the rest
    expect(minutes(tally(usedSpans(running, at('10:00')), open, day))).toMatchObject({ bake: 40 });
  });

  test('held: idle between phases, while settling, and until the next stage begins on the spot', () => {
    const waits: Use = {
      ...painted,
      ...span('09:00', '10:00'),
      phases: [phase('spray', '09:00', '09:20', true), phase('spray', '09:35', '10:00', true)],
    };
    const settles = { ...waits, next: { startsAt: at('12:00'), stay: false, settle: 30 } };
    // idle 09:20 to 09:35 = 15, settling 10:00 to 10:30 = 30
    expect(minutes(tally(usedSpans(settles, evening), open, day))).toEqual({ ...none, spray: 45, held: 45 });
    const stays = { ...waits, next: { startsAt: at('12:00'), stay: true, settle: 30 } };
    // idle 15, then 10:00 to 12:00 = 120
    const use = tally(usedSpans(stays, evening), open, day);
    expect(minutes(use)).toEqual({ ...none, spray: 45, held: 135 });
    expect(use.busyOpenHours).toBeCloseTo(0.75, 9); // held is not busy
  });

  test('the members of a load are one booth run', () => {
    const use = tally([...usedSpans(painted, evening), ...usedSpans(painted, evening)], open, day);
    expect(minutes(use)).toEqual({ ...none, setup: 10, spray: 40, flash: 30, bake: 40 });
    expect(use.busyOpenHours).toBeCloseTo(2, 9);
  });

  test('where two things are said of one minute the stronger counts: one is baked 5 minutes longer', () => {
    const longer = { ...painted, startedAt: at('09:00'), finishedAt: at('11:05') };
    const use = tally([...usedSpans(painted, evening), ...usedSpans(longer, evening)], open, day);
    expect(minutes(use)).toEqual({ ...none, setup: 10, spray: 40, flash: 30, bake: 45 });
  });

  test('work that pauses overnight is not work at night, and overtime is no pause', () => {
    const work: Use = {
      ...painted,
      from: at('15:00'),
      to: new Date('2026-03-03T08:30:00Z'),
      phases: [{ kind: 'work', hands: true, from: at('15:00'), to: new Date('2026-03-03T08:30:00Z') }],
      shifts: [
        span('08:00', '16:00'),
        { from: new Date('2026-03-03T08:00:00Z'), to: new Date('2026-03-03T16:00:00Z') },
      ],
    };
    const range = { from: at('00:00'), to: new Date('2026-03-04T00:00:00Z') };
    // 15:00 to 16:00 = 60 and 08:00 to 08:30 = 30; 16:00 to 08:00 = 960 held
    expect(minutes(tally(usedSpans(work, range.to), open, range))).toEqual({ ...none, work: 90, held: 960 });
    const overtime = { ...work, ...span('15:00', '17:00'), phases: [phase('work', '15:00', '17:00', true)] };
    expect(minutes(tally(usedSpans(overtime, range.to), open, range))).toEqual({ ...none, work: 120 });
  });

  test('only what lies in the range counts, and only open minutes are busy open minutes', () => {
    const use = tally(usedSpans(painted, evening), [span('07:00', '10:00')], span('09:20', '10:30'));
    // spray 09:20 to 09:30 and 09:50 to 10:10, flash 20 + 10, bake 10:20 to 10:30
    expect(minutes(use)).toEqual({ ...none, spray: 30, flash: 30, bake: 10 });
    expect(use.openHours).toBeCloseTo(40 / 60, 9); // 09:20 to 10:00
    expect(use.busyOpenHours).toBeCloseTo(40 / 60, 9);
  });
});
