import { minuteMs } from './wall-time.ts';
import type { Bar } from '#contracts/day.ts';

/** Milliseconds; null: no limit on that side. */
export type Window = { earliest: number | null; latest: number | null };
export type Tone = 'room' | 'closing' | 'outside';

const ms = (at: string | null) => (at === null ? null : Date.parse(at));

/** What is left when several stages run as one load: the latest of the earliest, the earliest of the latest. */
export function windowOf(members: readonly Pick<Bar, 'window'>[]): Window {
  const earliest = members.map((m) => ms(m.window.earliest)).filter((at) => at !== null);
  const latest = members.map((m) => ms(m.window.latest)).filter((at) => at !== null);
  return {
    earliest: earliest.length > 0 ? Math.max(...earliest) : null,
    latest: latest.length > 0 ? Math.min(...latest) : null,
  };
}

/** How a start sits in its window: closing under a quarter of it or under 15 minutes left, outside beyond either end. */
export function toneOf({ earliest, latest }: Window, start: number): Tone {
  if (earliest !== null && start < earliest) return 'outside';
  if (latest === null) return 'room';
  const left = latest - start;
  if (left < 0) return 'outside';
  if (left < 15 * minuteMs) return 'closing';
  return earliest !== null && left < (latest - earliest) / 4 ? 'closing' : 'room';
}
