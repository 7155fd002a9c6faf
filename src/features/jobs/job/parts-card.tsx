import { Zap } from 'lucide-react';
import type { Job } from '#contracts/jobs.ts';
import { useFormats } from '#src/lib/session.ts';
import { HeatCaution } from '../heat-caution.tsx';
import { assumedLimit, heatLimitOf } from '../model/assumed-limit.ts';
import { substrateWords } from '#src/lib/substrate-words.ts';
import { SideCard } from './side-card.tsx';

/** Parts, and what heat the vehicle stands where that matters. */
export function PartsCard({ job }: { job: Job }) {
  return (
    <SideCard title={job.parts.length === 1 ? 'Part' : 'Parts'}>
      <ul className="flex flex-col gap-1.5">
        {job.parts.map((part) => (
          <li key={part.id} className="flex items-baseline justify-between gap-3">
            <span className="min-w-0">
              {part.name} <span className="text-muted">· {substrateWords[part.substrate]}</span>
            </span>
            <span className="figures shrink-0 text-xs text-muted">
              {part.units === 1 ? '1 unit' : `${part.units} units`}
            </span>
          </li>
        ))}
      </ul>
      <HeatLimit job={job} />
    </SideCard>
  );
}

function HeatLimit({ job }: { job: Job }) {
  const { temperature } = useFormats();
  const { electric, heatLimitCelsius, heatLimitMinutes } = job;
  if (!electric && heatLimitCelsius === null && heatLimitMinutes === null) return null;
  const celsius = heatLimitOf(job);
  const minutes = heatLimitMinutes ?? (electric ? assumedLimit.minutes : null);
  const limit = [
    celsius === null ? '' : `at most ${temperature(celsius, 'limit')}`,
    minutes === null ? '' : `${minutes} min over all bakes`,
  ];
  return (
    <div className="mt-1 flex flex-col gap-2 border-t border-line pt-3">
      <p className="flex items-start gap-2">
        <Zap size={16} aria-hidden="true" className="mt-0.5 shrink-0 text-amber" />
        <span>
          {electric && <b>High-voltage battery on board. </b>}
          Heat: {limit.filter(Boolean).join(', ')}
          {heatLimitCelsius === null && electric && ' (assumed, nothing is recorded)'}.
        </span>
      </p>
      <HeatCaution />
    </div>
  );
}
