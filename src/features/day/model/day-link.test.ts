import fc from 'fast-check';
import { expect, test } from 'vitest';
import { spans } from './day-range.ts';
import { readDayLink, writeDayLink } from './day-link.ts';

const today = '2027-03-11';

test('an empty or senseless address opens today', () => {
  const plain = { date: today, span: 'day', plan: null, stage: null, people: true, allHours: false };
  expect(readDayLink(new URLSearchParams(), today)).toEqual(plain);
  expect(readDayLink(new URLSearchParams('date=2027-02-30&view=year&plan=mine'), today)).toEqual(plain);
});

test('what is written is read back', () => {
  const link = fc.record({
    date: fc.constantFrom(today, '2027-12-31'),
    span: fc.constantFrom(...spans),
    plan: fc.constantFrom('posted' as const, 'draft' as const, null),
    stage: fc.option(fc.uuid()),
    people: fc.boolean(),
    allHours: fc.boolean(),
  });
  fc.assert(
    fc.property(link, (given) => {
      expect(readDayLink(writeDayLink(given, today), today)).toEqual(given);
    }),
    { seed: 3, numRuns: 100 },
  );
});
