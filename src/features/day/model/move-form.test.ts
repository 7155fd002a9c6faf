import { expect, test } from 'vitest';
import { at, barAt, day, uuid, zone } from '../testing/sample-day.ts';
import { entryOf, moveOf } from './move-form.ts';

const bar = barAt(1, 540, [['spray', 20]]);
const entry = entryOf(bar, zone, () => '9:00');

test('a form that was not touched moves nothing', () => {
  expect(moveOf(entry, bar, zone)).toEqual({ stageId: bar.id, start: bar.from, placeId: bar.placeId });
});

test('loosely typed times are times of the shop’s day', () => {
  for (const time of ['14.15', '1415', '2:15 pm', '14:15'])
    expect(moveOf({ ...entry, time }, bar, zone)).toMatchObject({ start: at(14 * 60 + 15) });
  expect(moveOf({ ...entry, day: '2027-03-28', time: '12' }, bar, zone)).toMatchObject({
    start: '2027-03-28T10:00:00.000Z',
  });
});

test('what cannot be understood is named, and nothing is sent', () => {
  expect(moveOf({ ...entry, time: 'noonish' }, bar, zone)).toMatchObject({ field: 'time' });
  expect(moveOf({ ...entry, day: '2027-02-30' }, bar, zone)).toMatchObject({ field: 'day' });
  expect(moveOf({ ...entry, day }, bar, zone)).not.toHaveProperty('field');
});

test('person and pin are sent only where they were chosen', () => {
  const ada = uuid(1, 31);
  expect(moveOf({ ...entry, personId: ada, pinned: true }, bar, zone)).toMatchObject({ personId: ada, pinned: true });
});
