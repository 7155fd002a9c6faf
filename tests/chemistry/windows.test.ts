import { describe, expect, it } from 'vitest';
import { windowAfterCoat, windowVerdict } from '#chemistry/windows/coat-window.ts';
import { handsFromMs } from '#chemistry/windows/cool-down.ts';
import { remedyForMissedWindow } from '#chemistry/windows/missed-window.ts';
import { potLifeEndMs, potLifeMinutesAt, potLifeVerdict } from '#chemistry/windows/pot-life.ts';

const at = (text: string) => Date.parse(text);

describe('window after a coat', () => {
  // Worked case: sealer ends Monday 09:00, at least 15 min, at most 72 h. 2026-03-02 is a Monday.
  const window = windowAfterCoat(at('2026-03-02T09:00Z'), { minimumMinutes: 15, maximumMinutes: 72 * 60 });

  it('opens Monday 09:15, and Thursday 09:00 is the last unsanded minute', () => {
    expect(window).toEqual({ earliestMs: at('2026-03-02T09:15Z'), latestMs: at('2026-03-05T09:00Z') });
  });

  it.each([
    ['2026-03-02T09:14Z', { code: 'too-early', minutesToWait: 1 }],
    ['2026-03-02T09:15Z', { code: 'in-window', minutesLeft: 72 * 60 - 15 }],
    ['2026-03-05T09:00Z', { code: 'in-window', minutesLeft: 0 }],
    ['2026-03-05T09:01Z', { code: 'missed', minutesLate: 1 }],
  ] as const)('at %s: %o', (start, verdict) => {
    expect(windowVerdict(window, at(start))).toEqual(verdict);
  });

  it('has no end where the sheet prints none', () => {
    const open = windowAfterCoat(0, { minimumMinutes: 10, maximumMinutes: null });
    expect(open).toEqual({ earliestMs: 600_000, latestMs: null });
    expect(windowVerdict(open, 1e12)).toEqual({ code: 'in-window', minutesLeft: null });
  });

  it('counts elapsed minutes across a change of clocks: 2026-03-29 in Europe, 24 h are 24 h', () => {
    const night = windowAfterCoat(at('2026-03-28T18:00+01:00'), { minimumMinutes: 0, maximumMinutes: 24 * 60 });
    expect(night.latestMs).toBe(at('2026-03-29T19:00+02:00'));
  });

  it('refuses a maximum below the minimum', () => {
    expect(() => windowAfterCoat(0, { minimumMinutes: 30, maximumMinutes: 20 })).toThrow(
      /maximumMinutes must be at least/,
    );
    expect(windowAfterCoat(0, { minimumMinutes: 20, maximumMinutes: 20 }).latestMs).toBe(1_200_000);
  });
});

describe('a missed window (common practice)', () => {
  it('costs a sanding, and over base one more coat of it', () => {
    expect(remedyForMissedWindow('primer')).toEqual(['sand-again']);
    expect(remedyForMissedWindow('sealer')).toEqual(['sand-again']);
    expect(remedyForMissedWindow('clear')).toEqual(['sand-again']);
    expect(remedyForMissedWindow('base')).toEqual(['sand-again', 'one-more-base-coat']);
    expect(remedyForMissedWindow('adhesion-promoter')).toEqual(['promoter-again']);
  });
});

describe('pot life', () => {
  // Worked case: 45 min, mixed 10:00: a coat begun 10:44 is fine, 10:46 refused.
  const mix = { mixedMs: at('2026-03-02T10:00Z'), potLifeMinutes: 45 };

  it.each([
    ['2026-03-02T09:59Z', { code: 'not-mixed-yet', minutesBefore: 1 }],
    ['2026-03-02T10:00Z', { code: 'usable', minutesLeft: 45 }],
    ['2026-03-02T10:44Z', { code: 'usable', minutesLeft: 1 }],
    ['2026-03-02T10:45Z', { code: 'usable', minutesLeft: 0 }],
    ['2026-03-02T10:46Z', { code: 'expired', minutesOver: 1 }],
  ] as const)('at %s: %o', (start, verdict) => {
    expect(potLifeVerdict(mix, at(start))).toEqual(verdict);
  });

  it('ends 45 minutes after mixing', () => {
    expect(potLifeEndMs(mix)).toBe(at('2026-03-02T10:45Z'));
  });

  it('is shorter in a hot room, rounded down, and never longer than printed in a cold one', () => {
    const printed = { minutes: 60, celsius: 20 };
    // 60 min / 1.9674, the Arrhenius ratio from 20 to 30 C at 50 kJ/mol.
    expect(potLifeMinutesAt(printed, 30)).toBe(30);
    expect(potLifeMinutesAt(printed, 20)).toBe(60);
    expect(potLifeMinutesAt(printed, 10)).toBe(60);
  });
});

describe('cool-down', () => {
  it('is half an hour from heat off unless the shop says otherwise', () => {
    expect(handsFromMs(0)).toBe(1_800_000);
    expect(handsFromMs(0, 15)).toBe(900_000);
  });
});
