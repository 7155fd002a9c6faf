import { describe, expect, it } from 'vitest';
import { sampleBench, sampleStage } from '../testing/sample-bench.ts';
import { benchList, tapped } from './bench-list.ts';

const numbers = (stages: readonly { jobNumber: number }[]) => stages.map((stage) => stage.jobNumber);

describe('the bench in the order of need', () => {
  it('has what runs, one thing to begin next, the rest and what is done', () => {
    const list = benchList(sampleBench().stages);
    expect(numbers(list.now)).toEqual([2418]);
    expect(list.next?.jobNumber).toBe(2423);
    expect(numbers(list.later)).toEqual([2424, 2425]);
    expect(numbers(list.done)).toEqual([2413]);
  });

  it('offers what can be begun before what has to wait for others', () => {
    const blocked = sampleStage(1, { start: '08:00', ready: false });
    const ready = sampleStage(2, { start: '09:00' });
    expect(benchList([blocked, ready]).next?.id).toBe(ready.id);
    expect(benchList([blocked]).next?.id).toBe(blocked.id);
    expect(benchList([]).next).toBeNull();
  });

  it('lists by time whatever the order it came in', () => {
    const [late, early] = [sampleStage(1, { start: '14:00' }), sampleStage(2, { start: '07:00' })];
    expect(
      numbers([benchList([late, early]).next, ...benchList([late, early]).later].filter((s) => s !== null)),
    ).toEqual([2414, 2413]);
  });
});

describe('a tap before the server has answered', () => {
  const at = '2026-03-12T08:32:00.000Z';
  it('starts what waits and finishes what runs', () => {
    const stages = sampleBench().stages;
    const [, running, waiting] = stages;
    expect(tapped(stages, waiting?.id ?? '', 'start', at)[2]).toMatchObject({ state: 'running', startedAt: at });
    expect(tapped(stages, running?.id ?? '', 'finish', at)[1]).toMatchObject({ state: 'done', finishedAt: at });
  });

  it('changes nothing a second time, nor anything else', () => {
    const stages = sampleBench().stages;
    const [done, running] = stages;
    expect(tapped(stages, running?.id ?? '', 'start', at)).toEqual(stages);
    expect(tapped(stages, done?.id ?? '', 'finish', at)).toEqual(stages);
  });
});
