import { expect, test } from 'vitest';
import { windowOf } from './window-of.ts';

test('a load has the window that all its stages have in common', () => {
  const at = (minute: number) => new Date(minute * 60_000).toISOString();
  expect(
    windowOf([
      { window: { earliest: at(10), latest: at(90) } },
      { window: { earliest: at(30), latest: null } },
      { window: { earliest: null, latest: at(60) } },
    ]),
  ).toEqual({ earliest: at(30), latest: at(60) });
  expect(windowOf([{ window: { earliest: null, latest: null } }])).toEqual({ earliest: null, latest: null });
});

test('instants are compared as instants, whatever their offset', () => {
  const window = { earliest: '2027-03-11T09:30:00+01:00', latest: null };
  expect(windowOf([{ window }, { window: { earliest: '2027-03-11T09:00:00Z', latest: null } }]).earliest).toBe(
    '2027-03-11T09:00:00Z',
  );
});
