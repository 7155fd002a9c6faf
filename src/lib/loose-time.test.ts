import { describe, expect, it } from 'vitest';
import { parseLooseTime } from './loose-time.ts';

describe('a time typed loosely', () => {
  it.each([
    ['9', 9 * 60],
    ['09', 9 * 60],
    ['930', 9 * 60 + 30],
    ['0930', 9 * 60 + 30],
    ['9:30', 9 * 60 + 30],
    ['14.15', 14 * 60 + 15],
    ['14,15', 14 * 60 + 15],
    ['9h30', 9 * 60 + 30],
    ['17h', 17 * 60],
    [' 7 : 05 ', 7 * 60 + 5],
    ['0', 0],
    ['2359', 23 * 60 + 59],
    ['9am', 9 * 60],
    ['9 pm', 21 * 60],
    ['2:30 p.m.', 14 * 60 + 30],
    ['12 am', 0],
    ['12pm', 12 * 60],
    ['230p', 14 * 60 + 30],
  ])('%s', (typed, minutes) => {
    expect(parseLooseTime(typed)).toBe(minutes);
  });

  it.each(['', 'soon', '24', '2400', '9:60', '960', '12345', '13pm', '0am', '9:3', '-9', '9:30:00', '1e1'])(
    '%j is none',
    (typed) => {
      expect(parseLooseTime(typed)).toBeNull();
    },
  );
});
