import type { BenchStage } from '#contracts/bench.ts';

export type BenchList = { now: BenchStage[]; next: BenchStage | null; later: BenchStage[]; done: BenchStage[] };

/**
 * The day in the order in which a painter needs it: what runs, the one thing to begin next, the rest, what is done. Next
 * is the first that can be begun; where none can, the first of all.
 */
export function benchList(stages: readonly BenchStage[]): BenchList {
  const byStart = [...stages].sort((a, b) => Date.parse(a.from) - Date.parse(b.from) || (a.id < b.id ? -1 : 1));
  const waiting = byStart.filter((stage) => stage.state === 'waiting');
  const next = waiting.find((stage) => stage.ready) ?? waiting[0] ?? null;
  return {
    now: byStart.filter((stage) => stage.state === 'running'),
    next,
    later: waiting.filter((stage) => stage !== next),
    done: byStart.filter((stage) => stage.state === 'done'),
  };
}

/** The list as it will be once the tap has arrived. */
export function tapped(stages: readonly BenchStage[], id: string, deed: 'start' | 'finish', at: string): BenchStage[] {
  return stages.map((stage) => {
    if (stage.id !== id) return stage;
    if (deed === 'start') return stage.state === 'waiting' ? { ...stage, state: 'running', startedAt: at } : stage;
    return stage.state === 'running' ? { ...stage, state: 'done', finishedAt: at } : stage;
  });
}
