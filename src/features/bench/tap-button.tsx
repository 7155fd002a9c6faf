import { Check, Play } from 'lucide-react';
import type { BenchStage } from '#contracts/bench.ts';
import { Button } from '#src/ui/button.tsx';

export type Waiting = 'sending' | 'stuck' | null;
export type OnTap = ((stage: BenchStage, deed: 'start' | 'finish', at: number) => void) | null;

type TapButtonProps = {
  stage: BenchStage;
  deed: 'start' | 'finish';
  now: number;
  waiting: Waiting;
  onTap: OnTap;
  /** The one thing to do now. */
  main: boolean;
};

const words = { start: 'Start', finish: 'Done' };

/** Twenty millimetres high and as wide as the phone. Shows when a tap is under way; a second one would change nothing. */
export function TapButton({ stage, deed, now, waiting, onTap, main }: TapButtonProps) {
  if (!onTap) return null;
  const icon = deed === 'start' ? <Play size={26} aria-hidden="true" /> : <Check size={28} aria-hidden="true" />;
  return (
    <Button
      size="glove"
      look={main ? 'primary' : 'plain'}
      icon={icon}
      className="w-full"
      aria-label={`${words[deed]}: ${stage.jobNumber} ${stage.title}`}
      onClick={() => onTap(stage, deed, now)}
      disabled={waiting === 'sending' && deed === 'start'}
    >
      {words[deed]}
    </Button>
  );
}

/** Stands with what a tap has changed before the server knows of it. */
export function PendingMark({ waiting }: { waiting: Waiting }) {
  return (
    <p role="status" className={waiting ? 'text-base font-semibold text-amber' : 'sr-only'}>
      {waiting === 'sending' && 'Sending…'}
      {waiting === 'stuck' && 'Not sent yet'}
    </p>
  );
}
