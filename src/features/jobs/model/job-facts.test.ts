import { describe, expect, it } from 'vitest';
import type { Reader } from '#src/lib/formats.ts';
import { sampleJob } from '../testing/sample-jobs.ts';
import { changedFacts, factsSchema, typeFacts, type JobFacts } from './job-facts.ts';

const reader: Reader = { zone: 'Europe/Amsterdam', clock: '24', unit: 'C' };
const change = (given: Partial<JobFacts>, job = sampleJob(), who = reader) => {
  const before = typeFacts(job, who);
  const after = { ...before, ...given };
  return changedFacts(before, after, factsSchema(who).parse(after));
};

describe('a change of a job', () => {
  it('sends nothing where nothing was typed over', () => {
    expect(change({})).toEqual({});
  });

  it('sends only the fields that were typed over', () => {
    expect(change({ notes: 'New', promise: { day: '2026-03-14', time: '12' } })).toEqual({
      notes: 'New',
      promiseAt: '2026-03-14T11:00:00.000Z',
    });
    expect(change({ promise: { day: '', time: '' } })).toEqual({ promiseAt: null });
  });

  it('does not move a limit by the way it is written', () => {
    // 120 F as several vehicle makers print it, kept in Celsius.
    const job = sampleJob({ heatLimitCelsius: ((120 - 32) * 5) / 9 });
    expect(typeFacts(job, reader).heatLimit).toBe('48.888');
    expect(change({ notes: 'x' }, job)).toEqual({ notes: 'x' });
    expect(typeFacts(job, { ...reader, unit: 'F' }).heatLimit).toBe('120');
  });

  it('lets go of the limit with the battery', () => {
    expect(change({ electric: false })).toEqual({ electric: false, heatLimitCelsius: null, heatLimitMinutes: null });
  });
});
