import fc from 'fast-check';
import { expect, test } from 'vitest';
import { at, place, viewOf } from '../testing/sample-day.ts';
import { closedTimes, outside } from './closed-times.ts';

test('the shop is shut before it opens and after it closes; a person is off outside the shift', () => {
  const view = viewOf([]);
  const shut = closedTimes(view).filter((time) => time.kind === 'shut');
  expect(shut.map((time) => [time.rowId, time.from, time.to])).toEqual([
    [null, Date.parse(at(0)), Date.parse(at(420))],
    [null, Date.parse(at(1020)), Date.parse(at(1440))],
  ]);
  const ada = closedTimes(view).filter((time) => time.rowId === view.rows.find((row) => row.name === 'Ada')?.id);
  expect(ada.map((time) => (time.to - time.from) / 60_000)).toEqual([420, 30, 480]);
});

test('maintenance keeps its row and its words', () => {
  const closed = [{ from: at(600), to: at(660), kind: 'maintenance' as const, label: 'Filter change' }];
  const row = place(1, 'booth', 'Booth 1', { closed });
  expect(closedTimes(viewOf([], { rows: [row] })).filter((time) => time.kind === 'maintenance')).toMatchObject([
    { rowId: row.id, label: 'Filter change' },
  ]);
});

test('what is inside and what is outside make the whole', () => {
  const stretch = fc.tuple(fc.nat(100), fc.nat(30)).map(([from, length]) => ({ from, to: from + length }));
  fc.assert(
    fc.property(fc.array(stretch, { maxLength: 6 }), (inside) => {
      const gaps = outside({ from: 0, to: 100 }, inside);
      for (let t = 0.5; t < 100; t += 1) {
        const within = (spans: { from: number; to: number }[]) => spans.some((s) => s.from <= t && t < s.to);
        expect(within(gaps)).toBe(!within(inside));
      }
    }),
    { seed: 5, numRuns: 200 },
  );
});
