import { expect, test } from 'vitest';
import { at, barAt, uuid, viewOf } from '../testing/sample-day.ts';
import { isWhereItWas, moveInView } from './move-in-view.ts';

const elsewhere = uuid(1, 2);

test('a move takes the load and the chain along, and leaves the rest where it is', () => {
  const loadId = uuid(4, 50);
  const bake = barAt(3, 600, [['bake', 30]], { loadId: uuid(4, 51) });
  const clear = barAt(1, 540, [['spray', 20]], { loadId, chain: [bake.id] });
  const mirror = barAt(2, 540, [['spray', 20]], { loadId });
  const other = barAt(4, 700, [['work', 30]]);
  const view = viewOf([clear, mirror, bake, other]);
  const after = moveInView(view, { stageId: mirror.id, start: at(555), placeId: elsewhere });
  expect(after.bars.map((bar) => [bar.from, bar.placeId])).toEqual([
    [at(555), elsewhere],
    [at(555), elsewhere],
    [at(615), elsewhere],
    [at(700), other.placeId],
  ]);
  expect(after.bars[2]?.phases[0]?.to).toBe(at(645));
  expect(after.bars[3]).toBe(other);
});

test('person and pin change for the stage that was moved only', () => {
  const bar = barAt(1, 540, [['spray', 20]]);
  const after = moveInView(viewOf([bar]), {
    stageId: bar.id,
    start: bar.from,
    placeId: bar.placeId,
    personId: uuid(1, 32),
    pinned: true,
  });
  expect(after.bars[0]).toMatchObject({ personName: 'Borys', pinned: true, from: bar.from });
});

test('dropping a bar on its old spot is no move', () => {
  const bar = barAt(1, 540, [['spray', 20]]);
  const back = { stageId: bar.id, start: at(540), placeId: bar.placeId };
  expect(isWhereItWas(bar, back)).toBe(true);
  expect(isWhereItWas(bar, { ...back, start: at(545) })).toBe(false);
  expect(isWhereItWas(bar, { ...back, pinned: true })).toBe(false);
  expect(isWhereItWas(bar, { ...back, personId: null })).toBe(false);
});
