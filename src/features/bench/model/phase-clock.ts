import type { BenchStage } from '#contracts/bench.ts';
import type { PhaseKind } from '#contracts/common.ts';

/** Milliseconds since 1970. */
export type RunningPhase = { kind: PhaseKind; from: number; to: number };
export type Timed = Pick<BenchStage, 'from' | 'to' | 'phases' | 'startedAt' | 'finishedAt'>;

/** The phases as they run: from the recorded start where there is one, else as booked. */
export function phasesAsRun(stage: Timed): RunningPhase[] {
  const shift = stage.startedAt === null ? 0 : Date.parse(stage.startedAt) - Date.parse(stage.from);
  return stage.phases.map(({ kind, from, to }) => ({
    kind,
    from: Date.parse(from) + shift,
    to: Date.parse(to) + shift,
  }));
}

/** Where a running stage is. `over`: all phases have run out and nobody has tapped Done. */
export type Clock =
  | { at: 'phase'; phase: RunningPhase; left: number; next: RunningPhase | null; end: number }
  /** Between two phases: something may wait here. */
  | { at: 'pause'; left: number; next: RunningPhase; end: number }
  | { at: 'over'; since: number; end: number };

/** The state of the clock at an instant: reckoned from end times, never counted down, so it is right after any sleep. */
export function clockAt(stage: Timed, now: number): Clock | null {
  const phases = phasesAsRun(stage);
  const end = phases.at(-1)?.to;
  if (end === undefined) return null;
  if (now >= end) return { at: 'over', since: now - end, end };
  const current = phases.findIndex((phase) => now >= phase.from && now < phase.to);
  const phase = phases[current];
  if (phase) return { at: 'phase', phase, left: phase.to - now, next: phases[current + 1] ?? null, end };
  const next = phases.find((candidate) => candidate.from > now);
  return next ? { at: 'pause', left: next.from - now, next, end } : null;
}

/** How much of the stage lies behind, 0 to 1. */
export function fractionDone(stage: Timed, now: number): number {
  const phases = phasesAsRun(stage);
  const from = phases[0]?.from ?? now;
  const to = phases.at(-1)?.to ?? now;
  return to <= from ? 1 : Math.min(1, Math.max(0, (now - from) / (to - from)));
}

/** `7:05`, `1:07:05`. What is left is rounded up, so that a clock stands at 0:00 only when it is over. */
export function countdown(ms: number): string {
  const seconds = Math.max(0, Math.ceil(ms / 1000));
  const two = (n: number) => String(n).padStart(2, '0');
  const hours = Math.floor(seconds / 3600);
  const minutes = Math.floor((seconds % 3600) / 60);
  return hours > 0 ? `${hours}:${two(minutes)}:${two(seconds % 60)}` : `${minutes}:${two(seconds % 60)}`;
}
