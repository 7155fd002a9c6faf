import { Ban, CalendarCheck, Check, Hourglass, Play, type LucideIcon } from 'lucide-react';
import type { JobState } from '#contracts/jobs.ts';
import { Badge, type Tone } from '#src/ui/badge.tsx';

const states: Record<JobState, { word: string; tone: Tone; Icon: LucideIcon }> = {
  waiting: { word: 'Waiting', tone: 'amber', Icon: Hourglass },
  planned: { word: 'Planned', tone: 'petrol', Icon: CalendarCheck },
  running: { word: 'Running', tone: 'ember', Icon: Play },
  done: { word: 'Done', tone: 'moss', Icon: Check },
  withdrawn: { word: 'Withdrawn', tone: 'plain', Icon: Ban },
};

/** A job's state as a word with its mark. */
export function StateMark({ state }: { state: JobState }) {
  const { word, tone, Icon } = states[state];
  return (
    <Badge tone={tone}>
      <Icon size={12} aria-hidden="true" />
      {word}
    </Badge>
  );
}

export const LateMark = () => (
  <Badge tone="crimson" solid>
    late
  </Badge>
);
