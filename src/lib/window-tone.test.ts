import { describe, expect, it } from 'vitest';
import { windowTone } from './window-tone.ts';

const at = (hhmm: string) => `2026-03-12T${hhmm}:00Z`;
const window = { earliest: at('09:00'), latest: at('13:00') };

describe('how a start sits in its window', () => {
  // Under a quarter of four hours left: from 12:00 on.
  it.each([
    ['08:59', 'outside'],
    ['09:00', 'room'],
    ['12:00', 'room'],
    ['12:01', 'closing'],
    ['13:00', 'closing'],
    ['13:01', 'outside'],
  ])('%s: %s', (start, tone) => {
    expect(windowTone(window, at(start))).toBe(tone);
  });
  it('warns 15 min before the end of a short window, and of one without a beginning', () => {
    const short = { earliest: at('09:00'), latest: at('09:40') };
    expect([at('09:25'), at('09:26')].map((start) => windowTone(short, start))).toEqual(['room', 'closing']);
    const open = { earliest: null, latest: at('09:40') };
    expect([at('09:25'), at('09:26')].map((start) => windowTone(open, start))).toEqual(['room', 'closing']);
  });
  it('has room where nothing closes', () => {
    expect(windowTone({ earliest: at('09:00'), latest: null }, at('20:00'))).toBe('room');
    expect(windowTone({ earliest: null, latest: null }, at('20:00'))).toBe('room');
  });
});
