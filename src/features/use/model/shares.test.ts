import { describe, expect, it } from 'vitest';
import type { PlaceUse } from '#contracts/use.ts';
import { figuresOf, hoursText, scaleOf, shareText, stackOf } from './shares.ts';

const none = { setup: 0, work: 0, spray: 0, flash: 0, purge: 0, bake: 0, cool: 0, held: 0 };
const place = (given: Partial<PlaceUse> = {}): PlaceUse => ({
  placeId: '0190a5a0-0000-7000-8000-000000000001',
  name: 'Booth 1',
  kind: 'booth',
  hours: none,
  openHours: 0,
  busyOpenHours: 0,
  bookings: 0,
  recorded: 0,
  ...given,
});

describe('use of a place', () => {
  // ISO 22400-2 worked case: planned busy time 480 min, production time 330 min: 0.6875.
  it('is the busy share of open hours', () => {
    const figures = figuresOf([place({ hours: { ...none, spray: 5.5 }, openHours: 8, busyOpenHours: 5.5 })]);
    expect(figures.share).toBeCloseTo(0.6875, 10);
    expect(figures.free).toBeCloseTo(2.5, 10);
    expect(figures.outside).toBe(0);
  });

  it('is not there where the place was never open', () => {
    expect(figuresOf([place()]).share).toBeNull();
    expect(shareText(null)).toBe('n/a');
  });

  it('counts holding a part as neither busy nor outside', () => {
    const held = figuresOf([place({ hours: { ...none, work: 2, held: 6 }, openHours: 4, busyOpenHours: 2 })]);
    expect(held).toMatchObject({ busy: 2, free: 2, share: 0.5, outside: 0 });
  });

  it('tells work outside open hours', () => {
    const night = figuresOf([place({ hours: { ...none, flash: 10 }, openHours: 8, busyOpenHours: 3 })]);
    expect(night).toMatchObject({ busy: 10, free: 5, outside: 7 });
  });

  it('adds places up before it divides', () => {
    const both = figuresOf([
      place({ hours: { ...none, spray: 9 }, openHours: 10, busyOpenHours: 9, bookings: 3, recorded: 2 }),
      place({ hours: { ...none, bake: 1 }, openHours: 30, busyOpenHours: 1, bookings: 1, recorded: 1 }),
    ]);
    expect(both).toMatchObject({ share: 0.25, bookings: 4, recorded: 3 });
  });
});

describe('the stacked bar', () => {
  const busy = figuresOf([place({ hours: { ...none, spray: 2, bake: 4, held: 1 }, openHours: 10, busyOpenHours: 6 })]);

  it('shows what was done in one order, then what was left of the open hours', () => {
    expect(stackOf(busy, 20).segments).toEqual([
      { doing: 'spray', hours: 2, left: 0, width: 10 },
      { doing: 'bake', hours: 4, left: 10, width: 20 },
      { doing: 'held', hours: 1, left: 30, width: 5 },
      { doing: 'free', hours: 3, left: 35, width: 15 },
    ]);
    expect(stackOf(busy, 20).openMark).toBe(50);
  });

  it('uses one scale for all, as long as the longest bar', () => {
    const night = figuresOf([place({ hours: { ...none, flash: 14 }, openHours: 8 })]);
    expect(scaleOf([busy, night])).toBe(14);
    expect(stackOf(night, 14).segments.map((s) => s.doing)).toEqual(['flash']);
  });

  it('has something to divide by when there is nothing', () => {
    expect(scaleOf([])).toBe(1);
  });
});

describe('figures in words', () => {
  it('do not call a little nothing', () => {
    expect([0, 0.01, 0.25, 12.34].map(hoursText)).toEqual(['0', '<0.1', '0.3', '12.3']);
    expect([0.6875, 0, 1].map(shareText)).toEqual(['69 %', '0 %', '100 %']);
  });
});
