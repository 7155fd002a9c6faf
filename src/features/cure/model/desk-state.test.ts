import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { firstValues, readDesk, readRows, tabs, writeDesk, writeRows, type FieldKey } from './desk-state.ts';
import { celsiusOf, parseNumber, shownIn, temperatureToken } from './typed.ts';

describe('the address', () => {
  it('says only what differs, and nothing at first', () => {
    expect(writeDesk({ tab: 'flash', values: firstValues })).toBe('');
    expect(writeDesk({ tab: 'dew', values: { ...firstValues, rh: '62' } })).toBe('tab=dew&rh=62');
  });

  it('opens the same view again, whatever was typed', () => {
    const keys = Object.keys(firstValues) as FieldKey[];
    fc.assert(
      fc.property(
        fc.constantFrom(...tabs),
        fc.dictionary(fc.constantFrom(...keys), fc.string({ maxLength: 60 })),
        (tab, given) => {
          const state = { tab, values: { ...firstValues, ...given } };
          expect(readDesk(writeDesk(state))).toEqual(state);
        },
      ),
    );
  });

  it('passes by what it does not know', () => {
    expect(readDesk('?tab=nowhere&other=1')).toEqual({ tab: 'flash', values: firstValues });
  });

  it('holds rows, whose cells cannot break them', () => {
    expect(readRows('20*60C_30*55C')).toEqual([
      ['20', '60C'],
      ['30', '55C'],
    ]);
    expect(writeRows([['2_0*', '60C']])).toBe('20*60C');
    expect(readRows('')).toEqual([]);
  });
});

describe('what is typed', () => {
  it.each([
    ['12,5', 12.5],
    ['12.5', 12.5],
    [' 7 ', 7],
    ['-3', -3],
    ['−3', -3],
    ['.5', 0.5],
    ['5.', 5],
    ['', null],
    ['1e9', null],
    ['1,000.5', null],
    ['twelve', null],
  ])('%j is %j', (text, value) => {
    expect(parseNumber(text)).toBe(value);
  });

  it('keeps a temperature as typed and shows it to the reader of the other unit', () => {
    expect(temperatureToken('140', 'F')).toBe('140F');
    expect(celsiusOf('140F')).toBe(60);
    expect(shownIn('140F', 'F')).toBe('140');
    expect(shownIn('140F', 'C')).toBe('60');
    expect(shownIn('20C', 'F')).toBe('68');
    expect(shownIn('6,F', 'F')).toBe('6,');
    expect(shownIn('warmF', 'C')).toBe('warm');
  });

  it('knows what is no temperature', () => {
    for (const token of ['', 'C', 'warmC', '-300C', '99999F']) expect(celsiusOf(token)).toBeNull();
  });
});
