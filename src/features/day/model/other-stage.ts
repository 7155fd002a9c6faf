import type { Bar } from '#contracts/day.ts';
import type { Reason } from '#contracts/reasons.ts';
import { numbersOf } from './describe.ts';

/** Names the stage that a reason is about where it is another than the one that was to be moved, as the next of its chain. */
export const otherStage =
  (movedId: string, bars: readonly Bar[]) =>
  ({ stageId }: Reason): string | null => {
    const bar = stageId === movedId ? undefined : bars.find(({ id }) => id === stageId);
    return bar ? `${numbersOf([bar])} ${bar.title.toLowerCase()}` : null;
  };
