import type { Person } from '#contracts/people.ts';
import { formatDay } from '#src/lib/formats.ts';
import type { Tone } from '#src/ui/badge.tsx';

/** How the spray training stands: a word for the badge and what it means. */
export function trainingWords({ training, sprayTrainedOn }: Person, today: string): { tone: Tone; word: string } {
  const until = training.goodThrough === null ? '' : formatDay(training.goodThrough, 'short', today);
  switch (training.standing) {
    case 'good':
      return { tone: 'plain', word: `good through ${until}` };
    case 'ends-soon':
      return { tone: 'amber', word: training.daysLeft === 0 ? 'last day today' : `${training.daysLeft} days left` };
    case 'lapsed':
      return { tone: 'crimson', word: `lapsed ${until}` };
    case 'not-yet':
      return { tone: 'amber', word: `from ${formatDay(sprayTrainedOn ?? today, 'short', today)}` };
    case 'never-trained':
      return { tone: 'plain', word: 'none' };
    default:
      return training.standing satisfies never;
  }
}
