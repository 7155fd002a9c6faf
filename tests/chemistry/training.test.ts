import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { daysBetween, parseDay } from '#chemistry/training/calendar-day.ts';
import { trainingGoodThrough, trainingStanding } from '#chemistry/training/spray-training.ts';
import { holds } from './holds.ts';

describe('spray training, five years (40 CFR 63.11173(g), subpart HHHHHH)', () => {
  it('of 2021-01-10 is good through 2026-01-10', () => {
    expect(trainingGoodThrough('2021-01-10')).toBe('2026-01-10');
    expect(trainingStanding('2021-01-10', '2026-01-10')).toMatchObject({ code: 'ends-soon', daysLeft: 0 });
    expect(trainingStanding('2021-01-10', '2026-01-11')).toMatchObject({ code: 'lapsed', daysOver: 1 });
  });

  it('of 29 February ends with the 28th, since the rule does not give a day more', () => {
    expect(trainingGoodThrough('2020-02-29')).toBe('2025-02-28');
    expect(trainingStanding('2020-02-29', '2025-03-01').code).toBe('lapsed');
  });

  it('of 28 February runs to a 28th, also into a leap year', () => {
    expect(trainingGoodThrough('2019-02-28')).toBe('2024-02-28');
  });

  it('warns 90 days before', () => {
    expect(trainingStanding('2021-01-10', '2025-10-11')).toMatchObject({ code: 'good', daysLeft: 91 });
    expect(trainingStanding('2021-01-10', '2025-10-12')).toMatchObject({ code: 'ends-soon', daysLeft: 90 });
  });

  it('counts only once it was had', () => {
    expect(trainingStanding(null, '2025-10-11')).toEqual({ code: 'never-trained' });
    expect(trainingStanding('2025-10-12', '2025-10-11')).toEqual({ code: 'not-yet', trained: '2025-10-12' });
    expect(trainingStanding('2025-10-11', '2025-10-11').code).toBe('good');
  });

  it.each(['2023-02-29', '2023-13-01', '2023-00-10', '2023-04-31', '10.01.2021', '2021-1-10', '2021-01-10T00:00', ''])(
    'refuses "%s" as a day',
    (text) => {
      expect(() => trainingGoodThrough(text)).toThrow(/trained must be a day that exists/);
    },
  );

  it('never lasts longer than five years to the day, nor a day less', () => {
    const day = fc
      .date({ min: new Date('1990-01-01'), max: new Date('2090-01-01'), noInvalidDate: true })
      .map((date) => date.toISOString().slice(0, 10));
    holds(
      fc.property(day, (trained) => {
        const days = daysBetween(parseDay('trained', trained), parseDay('through', trainingGoodThrough(trained)));
        expect(days).toBeGreaterThanOrEqual(1825);
        expect(days).toBeLessThanOrEqual(1827);
      }),
    );
  });
});
