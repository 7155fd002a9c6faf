import { expect, test } from 'vitest';
import { toneOf, windowOf } from './window-of.ts';

const minute = 60_000;
const window = { earliest: 0, latest: 120 * minute };

test('closing begins under a quarter of the window or 15 minutes, whichever comes first', () => {
  expect(toneOf(window, 90 * minute)).toBe('room');
  expect(toneOf(window, 91 * minute)).toBe('closing');
  expect(toneOf({ earliest: 0, latest: 40 * minute }, 26 * minute)).toBe('closing');
  expect(toneOf({ earliest: null, latest: 40 * minute }, 24 * minute)).toBe('room');
  expect(toneOf({ earliest: null, latest: 40 * minute }, 26 * minute)).toBe('closing');
});

test('a start before the earliest or after the latest is outside; without limits there is room', () => {
  expect(toneOf(window, -1)).toBe('outside');
  expect(toneOf(window, 121 * minute)).toBe('outside');
  expect(toneOf({ earliest: null, latest: null }, 0)).toBe('room');
});

test('a load has the window that all its stages have in common', () => {
  const iso = (m: number) => new Date(m * minute).toISOString();
  expect(
    windowOf([
      { window: { earliest: iso(10), latest: iso(90) } },
      { window: { earliest: iso(30), latest: null } },
      { window: { earliest: null, latest: iso(60) } },
    ]),
  ).toEqual({ earliest: 30 * minute, latest: 60 * minute });
});
