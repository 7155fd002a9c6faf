import { describe, expect, it } from 'vitest';
import { formatDuration } from '#src/lib/formats.ts';
import { standingNow, startsIn } from './start-words.ts';

const at = (clock: string) => `2026-03-12T${clock}:00.000Z`;
const say = { duration: formatDuration, when: (iso: string) => iso.slice(11, 16) };
const standing = (earliest: string | null, latest: string | null, now: string) =>
  standingNow(
    { window: { earliest: earliest && at(earliest), latest: latest && at(latest) } },
    Date.parse(at(now)),
    say,
  );

describe('starting now', () => {
  // Worked: sealer ends 09:00, at least 15 min, at most 72 h: colour from 09:15 on.
  it('is too early before the window, and says how long to wait', () => {
    expect(standing('09:15', '12:00', '09:05')).toEqual({
      tone: 'early',
      words: 'Too early: wait until 09:15, 10 min more',
    });
  });

  // Worked: mixed at 10:00 with a pot life of 45 min: 10:44 is fine, 10:46 is too late.
  it('closes with the pot life', () => {
    expect(standing('10:00', '10:45', '10:44')).toEqual({ tone: 'closing', words: 'Start by 10:45, 1 min left' });
    expect(standing('10:00', '10:45', '10:45')?.tone).toBe('closing');
    expect(standing('10:00', '10:45', '10:46')).toMatchObject({
      tone: 'late',
      words: expect.stringMatching(/^Too late/),
    });
  });

  it('has nothing to say without a window', () => {
    expect(standing(null, null, '09:00')).toBeNull();
    expect(standing('08:00', null, '09:00')).toEqual({ tone: 'room', words: 'The window is open and does not close' });
  });
});

describe('the plan seen from now', () => {
  it('is said in minutes', () => {
    const words = (now: string) => startsIn(at('09:20'), Date.parse(at(now)), formatDuration);
    expect([words('09:08'), words('09:20'), words('10:30')]).toEqual(['in 12 min', 'now', '1 h 10 min ago']);
  });
});
