import type { Formats } from './formats.ts';
import { windowTone } from './window-tone.ts';

/** The window and the start in words: what the little line says without eyes. */
export function windowWords(
  window: { earliest: string | null; latest: string | null },
  start: string,
  f: Formats,
): string {
  const { earliest, latest } = window;
  const near = (at: string) => (f.dayOf(at) === f.dayOf(start) ? f.time(at) : f.dateTime(at));
  const ends = [earliest === null ? '' : `from ${near(earliest)}`, latest === null ? '' : `to ${near(latest)}`];
  const tone = windowTone(window, start);
  const verdict = { room: '', closing: ', closing soon', outside: ', outside its window' }[tone];
  return `Window ${ends.filter(Boolean).join(' ') || 'open'}, starts ${near(start)}${verdict}`;
}
