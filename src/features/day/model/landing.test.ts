import { expect, test } from 'vitest';
import { at, barAt, place, rows, uuid, viewOf } from '../testing/sample-day.ts';
import { hintAt } from './landing.ts';

const booth2 = uuid(1, 2);
const ms = (minute: number) => Date.parse(at(minute));
const moved = barAt(1, 480, [['spray', 60]], { window: { earliest: at(450), latest: at(700) } });
const standing = barAt(2, 600, [['spray', 60]], { placeId: booth2 });

test('touching is no clash, overlapping by a minute is', () => {
  const view = viewOf([moved, standing]);
  expect(hintAt(view, moved, booth2, ms(540))).toBeNull();
  expect(hintAt(view, moved, booth2, ms(541))).toMatchObject({ kind: 'taken', by: { jobNumber: 2402 } });
  expect(hintAt(view, moved, booth2, ms(660))).toBeNull();
});

test('a place is taken as long as the part may not be moved', () => {
  const held = { ...standing, heldTo: at(690) };
  expect(hintAt(viewOf([moved, held]), moved, booth2, ms(670))).toMatchObject({ kind: 'taken' });
});

test('the window and closures are told, and a bar is not in its own way', () => {
  const closed = [{ from: at(600), to: at(700), kind: 'maintenance' as const, label: 'Filter change' }];
  const view = viewOf([moved], { rows: [...rows.slice(0, 1), place(2, 'booth', 'Booth 2', { closed })] });
  expect(hintAt(view, moved, booth2, ms(449))).toEqual({ kind: 'too-early', at: ms(450) });
  expect(hintAt(view, moved, booth2, ms(701))).toEqual({ kind: 'too-late', at: ms(700) });
  expect(hintAt(view, moved, booth2, ms(560))).toEqual({ kind: 'closed', label: 'Filter change' });
  expect(hintAt(view, moved, moved.placeId, ms(490))).toBeNull();
});
