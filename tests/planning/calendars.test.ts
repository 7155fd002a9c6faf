import { execFileSync } from 'node:child_process';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Closure, Resources, Shift } from '#server/db/resources.ts';
import { closedSpans, openSpans, workingSpans } from '#server/planning/calendars.ts';
import { instantOf, readLocal, spanOfLocalDay } from '#server/planning/local-time.ts';
import { expand, localStarts } from '#server/planning/recurrence.ts';

const NEW_YORK = 'America/New_York';
const HOUR = 3_600_000;
const hours = (span: { from: Date; to: Date }): number => (span.to.getTime() - span.from.getTime()) / HOUR;
const iso = (date: Date): string => date.toISOString();
const starts = (startsLocal: string, rule: string, from: string, to: string): string[] =>
  localStarts({ startsLocal, rule, minutes: 60 }, NEW_YORK, readLocal(from), readLocal(to)).map((start) =>
    new Date(start).toISOString().slice(0, 16),
  );

// RFC 5545, 3.8.5.3: examples as printed there.
describe('recurrence rules', () => {
  it('keep 09:00 on the wall across the clock change, until the instant of UNTIL', () => {
    const weekly = {
      startsLocal: '1997-09-02T09:00',
      rule: 'FREQ=WEEKLY;UNTIL=19971224T000000Z',
      minutes: 60,
    };
    const spans = expand(weekly, NEW_YORK, { from: new Date('1997-09-01T00:00Z'), to: new Date('1998-03-01T00:00Z') });
    expect(spans).toHaveLength(17);
    expect(iso(spans[0]?.from as Date)).toBe('1997-09-02T13:00:00.000Z');
    // EDT until 26 October, EST after.
    expect(spans.map((span) => iso(span.from)).slice(7, 9)).toEqual([
      '1997-10-21T13:00:00.000Z',
      '1997-10-28T14:00:00.000Z',
    ]);
    expect(iso(spans.at(-1)?.from as Date)).toBe('1997-12-23T14:00:00.000Z');
  });

  it('count weeks from the given first day of the week', () => {
    const rule = 'FREQ=WEEKLY;INTERVAL=2;COUNT=4;BYDAY=TU,SU';
    const of = (wkst: string) =>
      starts('1997-08-05T09:00', `${rule};WKST=${wkst}`, '1997-08-01T00:00', '1997-12-01T00:00').map((s) =>
        Number(s.slice(8, 10)),
      );
    expect(of('MO')).toEqual([5, 10, 19, 24]);
    expect(of('SU')).toEqual([5, 17, 19, 31]);
  });

  it('know the last work day of a month and every other month', () => {
    expect(
      starts(
        '1997-09-29T09:00',
        'FREQ=MONTHLY;BYDAY=MO,TU,WE,TH,FR;BYSETPOS=-2',
        '1997-09-01T00:00',
        '1998-03-31T00:00',
      ).map((s) => s.slice(5, 10)),
    ).toEqual(['09-29', '10-30', '11-27', '12-30', '01-29', '02-26', '03-30']);
    expect(
      starts(
        '1997-09-07T09:00',
        'FREQ=MONTHLY;INTERVAL=2;COUNT=10;BYDAY=1SU,-1SU',
        '1997-09-01T00:00',
        '1998-07-01T00:00',
      )
        .map((s) => s.slice(5, 10))
        .join(' '),
    ).toBe('09-07 09-28 11-02 11-30 01-04 01-25 03-01 03-29 05-03 05-31');
  });

  it('take UNTIL as a bare day to its end', () => {
    expect(
      starts('2024-05-01T07:00', 'FREQ=DAILY;UNTIL=20240503', '2024-05-01T00:00', '2024-06-01T00:00'),
    ).toHaveLength(3);
  });

  it('refuse what is no rule', () => {
    expect(() => starts('2024-05-01T07:00', 'EVERY=DAY', '2024-05-01T00:00', '2024-06-01T00:00')).toThrow(RangeError);
  });
});

// RFC 5545, 3.3.5, with its own dates.
describe('local times', () => {
  it('that come twice are the first', () => {
    expect(iso(instantOf(readLocal('2007-11-04T01:30'), NEW_YORK))).toBe('2007-11-04T05:30:00.000Z');
  });
  it('in a gap are read with the offset before it', () => {
    expect(iso(instantOf(readLocal('2007-03-11T02:30'), NEW_YORK))).toBe('2007-03-11T07:30:00.000Z');
  });
  it.each([
    [NEW_YORK, '2024-03-10', 23],
    [NEW_YORK, '2024-11-03', 25],
    ['Australia/Lord_Howe', '2024-10-06', 23.5],
    ['Australia/Lord_Howe', '2024-04-07', 24.5],
    ['Europe/Berlin', '2024-03-31', 23],
    ['Asia/Kathmandu', '2024-03-31', 24],
  ])('the day in %s on %s has %f hours', (zone, day, length) => {
    expect(hours(spanOfLocalDay(day, zone))).toBe(length);
  });
});

const setUp = (part: Partial<Pick<Resources, 'openings' | 'closures' | 'shifts' | 'absences'>>) => ({
  shop: { timeZone: NEW_YORK } as Resources['shop'],
  openings: [],
  closures: [],
  shifts: [],
  absences: [],
  ...part,
});
const shift = (part: Partial<Shift>): Shift => ({
  id: 's',
  personId: 'p',
  startsLocal: '2024-01-01T22:00',
  rule: 'FREQ=DAILY',
  minutes: 480,
  breaks: [],
  ...part,
});
const closure = (part: Partial<Closure>): Closure => ({
  id: 'c',
  kind: 'holiday',
  label: '',
  placeId: null,
  lampId: null,
  startsLocal: '2024-05-02T00:00',
  rule: null,
  minutes: 1440,
  ...part,
});

describe('calendars', () => {
  it.each([
    ['2024-03-09', 7],
    ['2024-11-02', 9],
    ['2024-06-01', 8],
  ])('a shift from 22:00 to 06:00 beginning on %s lasts %i h', (day, length) => {
    const from = instantOf(readLocal(`${day}T12:00`), NEW_YORK);
    const range = { from, to: new Date(from.getTime() + 24 * HOUR) };
    const [night, ...more] = workingSpans(setUp({ shifts: [shift({})] }), 'p', range);
    expect(more).toEqual([]);
    expect(hours(night as never)).toBe(length);
  });

  it('takes breaks, absences and holidays out of shifts', () => {
    const day = shift({
      startsLocal: '2024-05-01T07:00',
      rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR',
      breaks: [{ after: 240, minutes: 30 }],
    });
    const away = { id: 'a', personId: 'p', from: new Date('2024-05-03T14:00Z'), to: null, reason: '' };
    const spans = workingSpans(setUp({ shifts: [day], closures: [closure({})], absences: [away] }), 'p', {
      from: new Date('2024-05-01T00:00Z'),
      to: new Date('2024-05-06T00:00Z'),
    });
    expect(spans.map((span) => [iso(span.from).slice(5, 16), iso(span.to).slice(5, 16)])).toEqual([
      ['05-01T11:00', '05-01T15:00'],
      ['05-01T15:30', '05-01T19:00'],
      ['05-03T11:00', '05-03T14:00'],
    ]);
  });

  it('a holiday sends people home and lets parts stand; a breakdown of the whole shop stops the places too', () => {
    const range = { from: new Date('2024-05-01T04:00Z'), to: new Date('2024-05-03T04:00Z') };
    const opening = { id: 'o', startsLocal: '2024-05-01T07:00', rule: 'FREQ=DAILY', minutes: 600 };
    const holiday = setUp({ openings: [opening], closures: [closure({})] });
    expect(openSpans(holiday, range).map(hours)).toEqual([10]);
    expect(closedSpans(holiday, { placeId: 'booth' }, range)).toEqual([]);
    const dark = setUp({ closures: [closure({ kind: 'breakdown' }), closure({ placeId: 'booth', minutes: 60 })] });
    expect(closedSpans(dark, { placeId: 'booth' }, range).map(hours)).toEqual([24]);
  });

  it('clips to what was asked for', () => {
    const range = { from: new Date('2024-06-02T04:00Z'), to: new Date('2024-06-02T05:00Z') };
    expect(workingSpans(setUp({ shifts: [shift({})] }), 'p', range)).toEqual([range]);
  });
});

// The same instants whatever zone the process runs in: each needs a process of its own.
describe('the zone of the process', () => {
  const script = `
    import { expand } from './server/planning/recurrence.ts';
    const range = { from: new Date('2024-03-08T00:00Z'), to: new Date('2024-03-14T00:00Z') };
    const night = { startsLocal: '2024-03-01T22:00', rule: 'FREQ=DAILY;UNTIL=20240312T030000Z', minutes: 480 };
    process.stdout.write(JSON.stringify(expand(night, '${NEW_YORK}', range)));`;
  const run = (TZ: string): string =>
    execFileSync(process.execPath, ['--import', 'tsx', '--input-type=module', '-e', script], {
      cwd: path.resolve(import.meta.dirname, '../..'),
      env: { ...process.env, TZ },
      encoding: 'utf8',
    });
  it('changes nothing', () => {
    const utc = run('UTC');
    expect(JSON.parse(utc)).toHaveLength(5);
    for (const zone of ['America/New_York', 'Pacific/Kiritimati', 'Australia/Lord_Howe']) expect(run(zone)).toBe(utc);
  });
});
