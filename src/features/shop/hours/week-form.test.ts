import { describe, expect, it } from 'vitest';
import { weekdays } from '#contracts/recurrence.ts';
import { readDay, readWeek, weekForm } from './model/week-form.ts';

describe('hours of a day as typed', () => {
  it.each([
    ['7:00-18:00', [{ from: 420, to: 1080 }]],
    [
      '7-12, 13-18',
      [
        { from: 420, to: 720 },
        { from: 780, to: 1080 },
      ],
    ],
    [
      '13-18; 7 to 12',
      [
        { from: 420, to: 720 },
        { from: 780, to: 1080 },
      ],
    ],
    ['22-6', [{ from: 1320, to: 1800 }]],
    ['16-24', [{ from: 960, to: 1440 }]],
    ['7 am - 3:30 pm', [{ from: 420, to: 930 }]],
    ['', []],
    ['closed', []],
  ])('%s', (text, spans) => expect(readDay(text)).toEqual({ spans }));
  it.each(['7', '7-', 'morning', '7-12-18'])('%s is none', (text) => expect(readDay(text)).toHaveProperty('fault'));
  it('refuses hours that meet each other', () => {
    expect(readDay('7-12, 11-18')).toEqual({ fault: 'These hours meet each other.' });
  });
});

describe('a week', () => {
  const week = [
    { day: 'MO' as const, from: 420, to: 1080 },
    { day: 'SA' as const, from: 480, to: 720 },
    { day: 'SA' as const, from: 780, to: 900 },
  ];
  it.each(['24', '12'] as const)('comes back as it was typed, on a clock of %s hours', (clock) => {
    expect(readWeek(weekForm(week, clock))).toEqual({ week, faults: null });
  });
  it('says which day is wrong', () => {
    const form = Object.fromEntries(weekdays.map((day) => [day, ''])) as ReturnType<typeof weekForm>;
    expect(readWeek({ ...form, TU: 'all day' }).faults).toEqual({
      TU: 'Write hours such as 7:00-18:00, or 7-12, 13-18.',
    });
  });
});
