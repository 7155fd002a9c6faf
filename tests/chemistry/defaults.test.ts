import { describe, expect, it } from 'vitest';
import { DEFAULT_GRITS } from '#chemistry/defaults/default-grits.ts';
import * as defaults from '#chemistry/defaults/default-windows.ts';
import { DEFAULT_COOL_DOWN_MINUTES } from '#chemistry/windows/cool-down.ts';

const { DEFAULT_WINDOWS } = defaults;

describe('default windows', () => {
  it('mark makers’ printed figures as published', () => {
    const mark = 'published';
    expect(DEFAULT_WINDOWS.primer.bakeMinutesAt60Celsius).toEqual({ from: 15, to: 30, mark });
    expect(DEFAULT_WINDOWS.primer.airDryMinutes).toEqual({ from: 180, to: 180, mark });
    expect(DEFAULT_WINDOWS['adhesion-promoter'].minutesBeforeNext).toEqual({ from: 10, to: 15, mark });
    expect(DEFAULT_WINDOWS.clear.minutesBetweenCoats).toEqual({ from: 3, to: 15, mark });
    expect(DEFAULT_WINDOWS.clear.bakeMinutesAt60Celsius).toEqual({ from: 20, to: 30, mark });
    expect(defaults.POT_LIFE_MINUTES).toEqual({ from: 45, to: 240, mark });
  });

  it('mark the rest as memory or practice', () => {
    expect(DEFAULT_WINDOWS.base.recoatWindowHours).toEqual({ from: 24, to: 24, mark: 'from-memory' });
    expect(DEFAULT_WINDOWS.base.coats).toEqual({ from: 3, to: 4, mark: 'common-practice' });
    expect(defaults.PRIMER_COATS_OVER_SUBSTRATE.mark).toBe('common-practice');
    expect(new Set(Object.values(DEFAULT_GRITS).map((step) => step.mark))).toEqual(new Set(['common-practice']));
  });

  it('never run backwards, and survive a trip through JSON for the shop to edit', () => {
    const ranges = Object.values(DEFAULT_WINDOWS).flatMap((coat) =>
      Object.values(coat).filter((range) => range !== null),
    );
    expect(ranges.length).toBeGreaterThan(10);
    for (const range of ranges) {
      expect(range.from).toBeGreaterThan(0);
      expect(range.to).toBeGreaterThanOrEqual(range.from);
    }
    expect(JSON.parse(JSON.stringify(DEFAULT_WINDOWS))).toEqual(DEFAULT_WINDOWS);
  });

  it('take the cautious end of the cool-down', () => {
    expect(DEFAULT_COOL_DOWN_MINUTES).toBe(defaults.COOL_DOWN_MINUTES.to);
  });
});
