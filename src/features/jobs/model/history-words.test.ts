import { describe, expect, it } from 'vitest';
import { differences, sayValue, type Say } from './field-words.ts';
import { historyWords } from './history-words.ts';
import { weightOf, weights } from './weights.ts';

const say: Say = { moment: (iso) => `at ${iso.slice(11, 16)}`, temperature: (celsius) => `${celsius} °C` };

describe('history in words', () => {
  it('says what changed, from what to what', () => {
    const detail = {
      before: { promiseAt: '2026-03-13T15:00:00.000Z', weight: 1 },
      after: { promiseAt: '2026-03-14T11:00:00.000Z', weight: 9 },
    };
    expect(historyWords({ kind: 'job-changed', detail }, say)).toEqual([
      'Changed the promise and weight',
      'Promise: from at 15:00 to at 11:00',
      'Weight: from ordinary to first of all',
    ]);
  });

  it('names the stages of a tap', () => {
    expect(historyWords({ kind: 'stage-started', detail: { stages: ['Prime', 'Prime mirror'] } }, say)).toEqual([
      'Started Prime and Prime mirror',
    ]);
    expect(historyWords({ kind: 'stage-finished', detail: {} }, say)).toEqual(['Finished a stage']);
  });

  it('says what fell free, whether it is counted or listed', () => {
    const words = (bookings: unknown) => historyWords({ kind: 'job-withdrawn', detail: { bookings } }, say);
    expect(words(3)).toEqual(['Withdrew the job', '3 bookings fell free']);
    expect(words(['a'])).toEqual(['Withdrew the job', '1 booking fell free']);
    expect(words(0)).toEqual(['Withdrew the job']);
  });

  it('survives details it does not know and leaves out what is not for people', () => {
    expect(historyWords({ kind: 'job-changed', detail: { before: null, after: 'x' } }, say)).toEqual([
      'Changed the job',
    ]);
    expect(historyWords({ kind: 'draft-changed', detail: {} }, say)).toBeNull();
  });
});

describe('differences', () => {
  it('take the same instant written otherwise as the same', () => {
    const before = { promiseAt: '2026-03-13T15:00:00Z', notes: 'a' };
    expect(differences(before, { promiseAt: '2026-03-13T15:00:00.000Z', notes: 'a' }, say)).toEqual([]);
  });

  it('quote text, shorten long text, and say nothing for nothing', () => {
    const [found] = differences({ notes: '' }, { notes: 'x'.repeat(200) }, say);
    expect(found?.from).toBe('nothing');
    expect(found?.to.length).toBeLessThan(90);
    expect(sayValue('heatLimitCelsius', 48.889, say)).toBe('48.889 °C');
    expect(sayValue('electric', false, say)).toBe('no');
  });
});

describe('weights', () => {
  it('give every number of the contract a word', () => {
    expect([1, 2, 3, 4, 5, 6, 7, 8, 9].map((n) => weightOf(n).value)).toEqual([1, 1, 3, 3, 6, 6, 6, 9, 9]);
    expect(new Set(weights.map((w) => w.word)).size).toBe(weights.length);
  });
});
