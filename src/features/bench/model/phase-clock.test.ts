import { describe, expect, it } from 'vitest';
import { clockAt, countdown, fractionDone, phasesAsRun, type Timed } from './phase-clock.ts';

const at = (clock: string) => `2026-03-12T${clock}:00.000Z`;
const ms = (clock: string) => Date.parse(at(clock));
const stage = (given: Partial<Timed> = {}): Timed => ({
  from: at('09:00'),
  to: at('10:00'),
  startedAt: null,
  finishedAt: null,
  phases: [
    { kind: 'spray', from: at('09:00'), to: at('09:10') },
    { kind: 'flash', from: at('09:10'), to: at('09:20') },
    { kind: 'bake', from: at('09:30'), to: at('10:00') },
  ],
  ...given,
});

describe('the clock of a stage', () => {
  it('names the phase that runs, what is left of it and what comes', () => {
    expect(clockAt(stage(), ms('09:12'))).toMatchObject({
      at: 'phase',
      phase: { kind: 'flash' },
      left: 8 * 60_000,
      next: { kind: 'bake' },
    });
  });

  it('goes by the recorded start: begun 15 min late, everything is 15 min later', () => {
    const late = stage({ startedAt: at('09:15') });
    expect(clockAt(late, ms('09:27'))).toMatchObject({ at: 'phase', phase: { kind: 'flash' }, left: 8 * 60_000 });
    expect(phasesAsRun(late).at(-1)?.to).toBe(ms('10:15'));
  });

  it('is right again after any sleep, since it only looks at end times', () => {
    const before = clockAt(stage(), ms('09:01'));
    const after = clockAt(stage(), ms('09:45'));
    expect(before).toMatchObject({ phase: { kind: 'spray' } });
    expect(after).toMatchObject({ phase: { kind: 'bake' }, left: 15 * 60_000 });
  });

  it('waits between two phases and says when it is over', () => {
    expect(clockAt(stage(), ms('09:25'))).toMatchObject({ at: 'pause', left: 5 * 60_000, next: { kind: 'bake' } });
    expect(clockAt(stage(), ms('10:00'))).toMatchObject({ at: 'over', since: 0 });
    expect(clockAt(stage(), ms('10:07'))).toMatchObject({ at: 'over', since: 7 * 60_000 });
  });

  it('belongs to the next phase at the very border', () => {
    expect(clockAt(stage(), ms('09:10'))).toMatchObject({ phase: { kind: 'flash' } });
  });

  it('knows how much lies behind', () => {
    expect([ms('08:50'), ms('09:30'), ms('11:00')].map((now) => fractionDone(stage(), now))).toEqual([0, 0.5, 1]);
  });
});

describe('a countdown', () => {
  it('shows minutes and seconds, and hours where there are some', () => {
    expect([425_000, 4_025_000, 59_000].map(countdown)).toEqual(['7:05', '1:07:05', '0:59']);
  });

  it('stands at zero only when nothing is left', () => {
    expect([1, 999, 1000, 1001, 0, -5].map(countdown)).toEqual(['0:01', '0:01', '0:01', '0:02', '0:00', '0:00']);
  });
});
