import { expect, it } from 'vitest';
import type { Bar } from '#contracts/day.ts';
import type { Reason } from '#contracts/reasons.ts';
import { otherStage } from './other-stage.ts';

const bar = (id: string, title: string) => ({ id, title, jobNumber: 8 }) as Bar;
const about = (stageId: string | null): Reason => {
  return { code: 'too-soon', rule: 2, stageId, ids: [], names: [], at: [], minutes: [] };
};

it('names another stage than the one that was to be moved, where it is on the board', () => {
  const subjectOf = otherStage('clear', [bar('clear', 'Clear'), bar('bake', 'Bake clear')]);
  expect(subjectOf(about('bake'))).toBe('8 bake clear');
  expect(subjectOf(about('clear'))).toBeNull();
  expect(subjectOf(about('elsewhere'))).toBeNull();
  expect(subjectOf(about(null))).toBeNull();
});
