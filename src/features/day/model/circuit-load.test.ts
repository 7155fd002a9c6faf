import { expect, test } from 'vitest';
import { at, barAt, day, uuid, viewOf, zone } from '../testing/sample-day.ts';
import { loadPath, loadSteps, peakOf, stripTop } from './circuit-load.ts';

const circuit = uuid(5, 1);
const lampA = uuid(1, 21);
const lampB = uuid(1, 22);
const minutes = (steps: { at: number; kilowatts: number }[]) =>
  steps.map((step) => [(step.at - Date.parse(at(0))) / 60_000, step.kilowatts]);

test('lamps that burn at the same time add up, and only while they burn', () => {
  const view = viewOf([
    barAt(
      1,
      480,
      [
        ['work', 20],
        ['bake', 40],
        ['cool', 20],
      ],
      { lampIds: [lampA], placeId: uuid(1, 11) },
    ),
    barAt(2, 510, [['bake', 60]], { lampIds: [lampB], placeId: uuid(1, 12) }),
  ]);
  expect(minutes(loadSteps(view, circuit))).toEqual([
    [500, 6],
    [510, 10.5],
    [540, 4.5],
    [570, 0],
  ]);
  expect(peakOf(loadSteps(view, circuit), 10)).toEqual({ kilowatts: 10.5, over: true });
  expect(peakOf(loadSteps(view, circuit), 10.5).over).toBe(false);
});

test('a load of two jobs under one lamp draws its power once; one lamp after another leaves no dent', () => {
  const shared = { loadId: uuid(4, 9), lampIds: [lampA], placeId: uuid(1, 11) };
  const view = viewOf([
    barAt(1, 480, [['bake', 30]], shared),
    barAt(2, 480, [['bake', 30]], shared),
    barAt(3, 510, [['bake', 30]], { lampIds: [lampA], placeId: uuid(1, 12) }),
  ]);
  expect(minutes(loadSteps(view, circuit))).toEqual([
    [480, 6],
    [540, 0],
  ]);
});

test('the outline lies on the time axis', () => {
  const axis = { zone, days: [day], fromMinute: 420, toMinute: 1020 };
  const steps = [
    { at: Date.parse(at(480)), kilowatts: 5 },
    { at: Date.parse(at(540)), kilowatts: 0 },
  ];
  expect(loadPath(steps, axis, 10)).toBe('M0 100H100V50H200V100H1000V100Z');
  expect(loadPath([], axis, 10)).toBe('');
  expect(stripTop([], 10)).toBeCloseTo(11.5);
});
