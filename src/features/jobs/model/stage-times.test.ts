import { describe, expect, it } from 'vitest';
import { formatDuration } from '#src/lib/formats.ts';
import { sampleJob } from '../testing/sample-jobs.ts';
import { latenessWords, minutesLater, piecesOf } from './stage-times.ts';

describe('what is drawn of a stage', () => {
  it('is its booking, or its first way where it has none', () => {
    const [first, ...others] = sampleJob().stages;
    const last = others.at(-1);
    expect(first && piecesOf(first)).toEqual([{ kind: 'work', size: 50 }]);
    expect(last?.booking).toBeNull();
    expect(last && piecesOf(last)).toEqual([{ kind: 'work', size: 40 }]);
  });
});

describe('actual times', () => {
  const planned = '2026-03-12T08:00:00.000Z';
  const words = (actual: string) => latenessWords(minutesLater(actual, planned), formatDuration);
  it('are compared with the plan in words', () => {
    expect(words('2026-03-12T08:02:00.000Z')).toBe('as planned');
    expect(words('2026-03-12T08:41:00.000Z')).toBe('41 min later than planned');
    expect(words('2026-03-12T06:30:00.000Z')).toBe('1 h 30 min sooner than planned');
    expect(latenessWords(minutesLater(null, planned), formatDuration)).toBe('');
  });
});
