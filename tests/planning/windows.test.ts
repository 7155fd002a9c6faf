import { describe, expect, it } from 'vitest';
import { heldTo, NO_WINDOW, windowOf } from '#server/planning/windows.ts';

const at = (text: string): Date => new Date(`2024-05-${text}:00Z`);
const way = (id: string, min: number, max: number | null, settle = 0) => ({ id, gap: { min, max, settle } });

describe('windows', () => {
  // Worked case of a sealer (P): ends Mon 09:00, minimum 15 min, maximum 72 h.
  it('a sealer with 15 min and 72 h opens at 09:15 and closes three days later', () => {
    expect(windowOf(at('06T09:00'), [way('spray', 15, 72 * 60)])).toEqual({
      earliest: at('06T09:15'),
      latest: at('09T09:00'),
    });
  });
  it('spans what any way would allow until one is chosen', () => {
    const ways = [way('lamp', 10, 60), way('air', 30, null)];
    expect(windowOf(at('06T09:00'), ways)).toEqual({ earliest: at('06T09:10'), latest: null });
    expect(windowOf(at('06T09:00'), ways, 'air').earliest).toEqual(at('06T09:30'));
    expect(windowOf(at('06T09:00'), ways, 'lamp').latest).toEqual(at('06T10:00'));
  });
  it('is open without a stage before', () => expect(windowOf(null, [way('lamp', 10, 60)])).toEqual(NO_WINDOW));
});

describe('holding a place', () => {
  const next = (stay: boolean, settle: number) => ({
    way: { stay, gap: { min: 30, max: null, settle } },
    from: at('06T11:00'),
  });
  it('ends with the last stage', () => expect(heldTo(at('06T10:00'), null)).toEqual(at('06T10:00')));
  it('goes on while the part settles', () => expect(heldTo(at('06T10:00'), next(false, 20))).toEqual(at('06T10:20')));
  it('goes on to the next stage on the spot', () =>
    expect(heldTo(at('06T10:00'), next(true, 0))).toEqual(at('06T11:00')));
});
