import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { recurring, ruleFault, weekdays } from '#contracts/recurrence.ts';
import { parseLooseDuration } from './loose-duration.ts';
import { formOf, newRecurrence, readRecurrence, type RecurrenceForm } from './recurrence.ts';
import { nextTimes, timesBetween } from './recurrence-dates.ts';
import { sayDays, sayRecurrence } from './recurrence-words.ts';

const NEW_YORK = 'America/New_York';
const at = (startsLocal: string, rule: string | null, minutes = 60) => ({ startsLocal, rule, minutes });
/** Local days `MM-DD` of the next times in New York. */
const dates = (startsLocal: string, rule: string, count: number): string =>
  nextTimes(at(startsLocal, rule), NEW_YORK, Date.parse('1997-09-01T00:00Z'), count)
    .map(({ from }) =>
      new Intl.DateTimeFormat('en-CA', { timeZone: NEW_YORK, month: '2-digit', day: '2-digit' }).format(from),
    )
    .join(' ');

// RFC 5545, 3.8.5.3, as printed there; DTSTART;TZID=America/New_York:19970902T090000 unless another is given.
describe('examples of RFC 5545', () => {
  const examples: [words: string, startsLocal: string, rule: string, days: string][] = [
    [
      'every day, 10 times',
      '1997-09-02T09:00',
      'FREQ=DAILY;COUNT=10',
      '09-02 09-03 09-04 09-05 09-06 09-07 09-08 09-09 09-10 09-11',
    ],
    ['every 2 days', '1997-09-02T09:00', 'FREQ=DAILY;INTERVAL=2', '09-02 09-04 09-06 09-08 09-10'],
    ['every 10 days, 5 times', '1997-09-02T09:00', 'FREQ=DAILY;INTERVAL=10;COUNT=5', '09-02 09-12 09-22 10-02 10-12'],
    [
      'every Tuesday, 10 times',
      '1997-09-02T09:00',
      'FREQ=WEEKLY;COUNT=10',
      '09-02 09-09 09-16 09-23 09-30 10-07 10-14 10-21 10-28 11-04',
    ],
    [
      'every 2 weeks on Tuesday',
      '1997-09-02T09:00',
      'FREQ=WEEKLY;INTERVAL=2;WKST=SU',
      '09-02 09-16 09-30 10-14 10-28 11-11',
    ],
    [
      'every Tuesday and Thursday, 10 times',
      '1997-09-02T09:00',
      'FREQ=WEEKLY;COUNT=10;WKST=SU;BYDAY=TU,TH',
      '09-02 09-04 09-09 09-11 09-16 09-18 09-23 09-25 09-30 10-02',
    ],
    [
      'every 2 weeks on Tuesday and Thursday, 8 times',
      '1997-09-02T09:00',
      'FREQ=WEEKLY;INTERVAL=2;COUNT=8;WKST=SU;BYDAY=TU,TH',
      '09-02 09-04 09-16 09-18 09-30 10-02 10-14 10-16',
    ],
    [
      'on the first Friday of the month, 10 times',
      '1997-09-05T09:00',
      'FREQ=MONTHLY;COUNT=10;BYDAY=1FR',
      '09-05 10-03 11-07 12-05 01-02 02-06 03-06 04-03 05-01 06-05',
    ],
    [
      'on the last day of the month',
      '1997-09-30T09:00',
      'FREQ=MONTHLY;BYMONTHDAY=-1',
      '09-30 10-31 11-30 12-31 01-31 02-28',
    ],
    [
      'every year on 10 June, 4 times',
      '1998-06-10T09:00',
      'FREQ=YEARLY;COUNT=4;BYMONTH=6;BYMONTHDAY=10',
      '06-10 06-10 06-10 06-10',
    ],
    [
      'every year on the fourth Thursday of November',
      '1997-11-27T09:00',
      'FREQ=YEARLY;BYMONTH=11;BYDAY=4TH',
      '11-27 11-26 11-25',
    ],
  ];
  it.each(examples)('%s', (words, startsLocal, rule, days) => {
    expect(dates(startsLocal, rule, days.split(' ').length)).toBe(days);
    expect(sayDays(at(startsLocal, rule))).toBe(words);
    // Through the fields and back: the same days, whatever the rule looks like then.
    const back = readRecurrence(formOf(at(startsLocal, rule)), 'length').value;
    expect(back?.minutes).toBe(60);
    expect(dates(startsLocal, back?.rule ?? '', days.split(' ').length)).toBe(days);
  });

  it('count weeks from the given first day of the week', () => {
    const rule = 'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU';
    const of = (wkst: string) =>
      nextTimes(at('1997-08-05T09:00', `${rule};WKST=${wkst}`), NEW_YORK, 0).map(({ from }) => from.getUTCDate());
    expect(of('MO')).toEqual([5, 10, 19, 24]);
    expect(of('SU')).toEqual([5, 17, 19, 31]);
  });

  it('keep 9:00 on the wall when the clocks go back on 26 October 1997', () => {
    const times = nextTimes(
      at('1997-09-02T09:00', 'FREQ=WEEKLY;UNTIL=19971224T000000Z'),
      NEW_YORK,
      Date.parse('1997-10-20T00:00Z'),
      50,
    );
    expect(times.slice(0, 2).map(({ from }) => from.toISOString())).toEqual([
      '1997-10-21T13:00:00.000Z',
      '1997-10-28T14:00:00.000Z',
    ]);
    expect(times.at(-1)?.from.toISOString()).toBe('1997-12-23T14:00:00.000Z');
  });

  it('that the fields cannot say stay a rule, and are said as far as they can be', () => {
    for (const rule of [
      'FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-2',
      'FREQ=MONTHLY;BYDAY=FR;BYMONTHDAY=13',
      'FREQ=MONTHLY;INTERVAL=2;COUNT=10;BYDAY=1SU,-1SU',
    ]) {
      const form = formOf(at('1997-09-29T09:00', rule));
      expect(form).toMatchObject({ repeat: 'own', rule });
      expect(readRecurrence(form, 'length').value?.rule).toBe(rule);
      expect(sayDays(at('1997-09-29T09:00', rule))).not.toBe('');
    }
    expect(sayDays(at('1997-09-29T09:00', 'FREQ=MONTHLY;BYDAY=FR;BYSETPOS=-2'))).toBe(
      'by the rule FREQ=MONTHLY;BYDAY=FR;BYSETPOS=-2',
    );
  });
});

describe('a night in which the clocks change', () => {
  // The hour on the wall stays: Berlin, 29 March 2026, 2:00 becomes 3:00.
  it('leaves hour and length on the wall', () => {
    const [first, second] = nextTimes(
      at('2026-03-27T22:00', 'FREQ=DAILY', 480),
      'Europe/Berlin',
      Date.parse('2026-03-27T12:00Z'),
    );
    expect([first?.from.toISOString(), first?.to.toISOString()]).toEqual([
      '2026-03-27T21:00:00.000Z',
      '2026-03-28T05:00:00.000Z',
    ]);
    expect([second?.from.toISOString(), second?.to.toISOString()]).toEqual([
      '2026-03-28T21:00:00.000Z',
      '2026-03-29T04:00:00.000Z',
    ]);
  });
});

describe('times of a span', () => {
  const between = (recurring: ReturnType<typeof at>, from: string, to: string) =>
    timesBetween(recurring, NEW_YORK, Date.parse(from), Date.parse(to)).map(({ from: start }) => start.toISOString());

  it('keep the hour on the wall when the clocks go back on 26 October 1997', () => {
    // "Daily until December 24, 1997" of RFC 5545, 3.8.5.3: 9:00 EDT until 25 October, 9:00 EST from the 26th on.
    const daily = at('1997-09-02T09:00', 'FREQ=DAILY;UNTIL=19971224T000000Z');
    expect(between(daily, '1997-10-25T04:00Z', '1997-10-27T05:00Z')).toEqual([
      '1997-10-25T13:00:00.000Z',
      '1997-10-26T14:00:00.000Z',
    ]);
    expect(between(daily, '1997-12-22T05:00Z', '1998-01-01T05:00Z')).toHaveLength(2);
  });

  it('are those that reach into it too, but not those that only touch it', () => {
    const nights = at('1997-09-02T22:00', 'FREQ=WEEKLY;BYDAY=TU', 480);
    // From Tuesday 22:00 EDT, 2:00 UTC, to Wednesday 6:00 EDT, 10:00 UTC.
    expect(between(nights, '1997-09-10T09:59Z', '1997-09-17T02:00Z')).toEqual(['1997-09-10T02:00:00.000Z']);
    expect(between(nights, '1997-09-10T10:00Z', '1997-09-17T02:01Z')).toEqual(['1997-09-17T02:00:00.000Z']);
    const once = at('1997-09-01T00:00', null, 14 * 1440);
    expect(between(once, '1997-09-14T00:00Z', '1997-10-01T00:00Z')).toEqual(['1997-09-01T04:00:00.000Z']);
    expect(between(once, '1997-09-15T04:00Z', '1997-10-01T00:00Z')).toEqual([]);
  });
});

describe('in words', () => {
  const says: [string, string, string | null, number][] = [
    ['every 2 weeks on Friday at 7:00 for 2 h', '2026-03-13T07:00', 'FREQ=WEEKLY;INTERVAL=2;BYDAY=FR', 120],
    ['on the first Monday of the month at 12:00 for 45 min', '2026-03-02T12:00', 'FREQ=MONTHLY;BYDAY=1MO', 45],
    ['every 3 months on the 15th at 6:30 for 1 day', '2026-03-15T06:30', 'FREQ=MONTHLY;INTERVAL=3;BYMONTHDAY=15', 1440],
    ['Monday to Friday at 7:30 for 9 h', '2026-03-02T07:30', 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR', 540],
    ['every year on 25 December, all day', '2026-12-25T00:00', 'FREQ=YEARLY;BYMONTH=12;BYMONTHDAY=25', 1440],
    ['once, Thu 24 Dec 2026 for 3 days', '2026-12-24T00:00', null, 4320],
    [
      'every Monday at 7:00 for 1 h, until Thu 31 Dec 2026',
      '2026-03-02T07:00',
      'FREQ=WEEKLY;BYDAY=MO;UNTIL=20261231T235959',
      60,
    ],
    ['on the last Friday of the month at 7:00 for 1 h', '2026-03-27T07:00', 'FREQ=MONTHLY;BYDAY=FR;BYSETPOS=-1', 60],
  ];
  it.each(says)('%s', (words, startsLocal, rule, minutes) => {
    expect(recurring.safeParse(at(startsLocal, rule, minutes)).success).toBe(true);
    expect(sayRecurrence(at(startsLocal, rule, minutes), '24')).toBe(words);
  });
  it('follows the reader’s clock', () => {
    expect(sayRecurrence(at('2026-03-13T19:00', 'FREQ=DAILY', 30), '12')).toBe('every day at 7:00 pm for 30 min');
  });
});

describe('fields', () => {
  const form = newRecurrence('2026-03-13');
  const read = (more: Partial<RecurrenceForm>, measure: 'length' | 'end' = 'length') =>
    readRecurrence({ ...form, ...more }, measure);
  it('become a rule', () => {
    expect(read({ repeat: 'weekly', every: '2', time: '7', length: '2 h' }).value).toEqual(
      at('2026-03-13T07:00', 'FREQ=WEEKLY;INTERVAL=2;BYDAY=FR', 120),
    );
    expect(read({ repeat: 'monthly', monthBy: 'weekday', stops: 'after', count: '4' }).value?.rule).toBe(
      'FREQ=MONTHLY;BYDAY=2FR;COUNT=4',
    );
    expect(read({ repeat: 'yearly', allDay: true, days: '2', stops: 'on', until: '2030-01-01' }).value).toEqual(
      at('2026-03-13T00:00', 'FREQ=YEARLY;BYMONTH=3;BYMONTHDAY=13;UNTIL=20300101T235959', 2880),
    );
  });
  it('take an end instead of a length, past midnight and on another day too', () => {
    expect(read({ repeat: 'weekly', time: '22', end: '6' }, 'end').value?.minutes).toBe(480);
    expect(read({ time: '12', endDay: '2026-03-16', end: '7' }, 'end').value?.minutes).toBe(3 * 1440 - 300);
    expect(read({ time: '12', endDay: '2026-03-13', end: '7' }, 'end').faults).toEqual({
      end: 'It ends before it begins.',
    });
  });
  it('say which of them is wrong', () => {
    expect(read({ day: '', time: '25', length: 'long', repeat: 'weekly', weekdays: [], every: '0' }).faults).toEqual({
      day: 'Choose a day.',
      time: 'Enter a time, such as 7 or 7:30.',
      length: 'Enter a length, such as 2 h, 90 min or 3 days.',
      every: 'Enter a whole number from 1.',
      weekdays: 'Choose at least one day.',
    });
    expect(read({ repeat: 'own', rule: 'FREQ=HOURLY' }).faults).toEqual({ rule: 'FREQ cannot be HOURLY.' });
    expect(read({ repeat: 'daily', stops: 'on', until: '2026-03-01' }).faults).toEqual({
      until: 'The last day lies before the first.',
    });
  });
  it('make only rules that can be kept, and come back from them as they were', () => {
    const any = fc.record({
      repeat: fc.constantFrom('daily', 'weekly', 'monthly', 'yearly'),
      every: fc.integer({ min: 1, max: 60 }).map(String),
      weekdays: fc.subarray([...weekdays], { minLength: 1 }),
      monthBy: fc.constantFrom('day', 'last-day', 'weekday'),
      rank: fc.constantFrom('1', '2', '3', '4', '-1'),
      stops: fc.constantFrom('never', 'on', 'after'),
      until: fc.constant('2027-01-31'),
    }) as fc.Arbitrary<Partial<RecurrenceForm>>;
    fc.assert(
      fc.property(any, (more) => {
        const { value } = read(more);
        expect(recurring.safeParse(value).success).toBe(true);
        expect(value && readRecurrence(formOf(value), 'length').value).toEqual(value);
        // Each comes at least twice, unless it may only come a few times.
        expect(value && nextTimes(value, NEW_YORK, Date.parse('2026-03-01T00:00Z'), 2).length).toBeGreaterThan(
          more.stops === 'on' ? -1 : 0,
        );
      }),
    );
  });
});

describe('rules that are refused', () => {
  it.each([
    ['FREQ=SECONDLY', 'FREQ cannot be SECONDLY'],
    ['EVERY=DAY', 'EVERY is no part that is known here'],
    ['INTERVAL=2', 'FREQ is missing'],
    ['FREQ=DAILY;COUNT=3;UNTIL=20270101', 'COUNT and UNTIL exclude each other'],
    ['FREQ=WEEKLY;BYDAY=1MO', 'BYDAY of a WEEKLY rule takes no number'],
    ['FREQ=WEEKLY;BYMONTHDAY=3', 'BYMONTHDAY is not for WEEKLY'],
    ['FREQ=DAILY;BYMONTH=2;BYMONTHDAY=30', 'there is never such a day'],
    ['FREQ=DAILY;BYSETPOS=2', 'BYSETPOS needs BYDAY or BYMONTHDAY to choose from, and more than a day'],
    ['', ' is no part that is known here'],
  ])('%s', (rule, fault) => expect(ruleFault(rule)).toBe(fault));
});

describe('a length typed loosely', () => {
  it.each([
    ['90', 90],
    ['2 h', 120],
    ['1.5h', 90],
    ['1,5 h', 90],
    ['1:30', 90],
    ['1 h 30 min', 90],
    ['2 days 3 h', 3060],
    ['3 days', 4320],
    ['soon', null],
    ['', null],
  ])('%s', (text, minutes) => expect(parseLooseDuration(text)).toBe(minutes));
});
