import type { Bar } from '#contracts/day.ts';
import type { Formats } from '#src/lib/formats.ts';
import { phaseWords } from '#src/lib/phase-words.ts';

/** The phases in order, each with its pattern, its times and how long it takes. */
export function PhaseList({ phases, formats }: { phases: Bar['phases']; formats: Formats }) {
  return (
    <ol className="flex flex-col gap-0.5" aria-label="Phases">
      {phases.map((phase) => (
        <li key={phase.from + phase.kind} className="figures flex items-center gap-2 text-[0.8125rem]">
          <i className={`phase-${phase.kind} h-3 w-6 shrink-0 rounded-sm`} aria-hidden="true" />
          <span className="grow">{phaseWords[phase.kind]}</span>
          <span className="text-muted">
            {formats.duration((Date.parse(phase.to) - Date.parse(phase.from)) / 60_000)}
          </span>
          <span className="min-w-24 text-right">
            {formats.time(phase.from)} to {formats.time(phase.to)}
          </span>
        </li>
      ))}
    </ol>
  );
}
