import type { BenchStage } from '#contracts/bench.ts';
import { windowTone } from '#src/lib/window-tone.ts';

/** `early` and `late`: outside of the window; `closing`: little of it is left. */
export type Standing = { tone: 'early' | 'room' | 'closing' | 'late'; words: string };
type Say = { duration: (minutes: number) => string; when: (at: string) => string };

/** How it would be to start at this moment, by the window that the chemistry leaves; null where there is none. */
export function standingNow({ window }: Pick<BenchStage, 'window'>, now: number, say: Say): Standing | null {
  const { earliest, latest } = window;
  if (earliest === null && latest === null) return null;
  if (earliest !== null && now < Date.parse(earliest)) {
    const wait = Math.ceil((Date.parse(earliest) - now) / 60_000);
    return { tone: 'early', words: `Too early: wait until ${say.when(earliest)}, ${say.duration(wait)} more` };
  }
  if (latest === null) return { tone: 'room', words: 'The window is open and does not close' };
  const left = Date.parse(latest) - now;
  if (left < 0)
    return { tone: 'late', words: `Too late: the window closed at ${say.when(latest)}. Ask the lead before you go on` };
  return {
    tone: windowTone(window, now) === 'closing' ? 'closing' : 'room',
    words: `Start by ${say.when(latest)}, ${say.duration(Math.floor(left / 60_000))} left`,
  };
}

/** When it is planned, seen from now: `in 12 min`, `now`, `12 min ago`. */
export function startsIn(from: string, now: number, duration: (minutes: number) => string): string {
  const minutes = Math.round((Date.parse(from) - now) / 60_000);
  if (minutes === 0) return 'now';
  return minutes > 0 ? `in ${duration(minutes)}` : `${duration(-minutes)} ago`;
}
